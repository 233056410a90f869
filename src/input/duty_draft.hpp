#pragma once
#include <cstdint>
#include <string>
#include <vector>

#include "vatwright/field/field.hpp"
#include "vatwright/kinetics/reaction.hpp"
#include "vatwright/rating/duty.hpp"

namespace vatwright {

// The tables of a duty as they are written, before what belongs together is judged together.

struct ProductionDraft : Common {
  Given<std::string> species;
  Given<Raw> amount;
  Given<double> on_stream;
};
struct ShareDraft : Common {  ///< a yield or a selectivity
  Given<std::string> species;
  Given<double> at_least;
};
struct OutletDraft : Common {
  Given<std::string> species;
  Given<Raw> at_least, at_most;
};
struct TargetDraft : Common {
  Given<double> conversion;
  Given<Raw> feed_rate;
  Given<ProductionDraft> production;
  Given<ShareDraft> yield, selectivity;
  Given<std::vector<OutletDraft>> outlet;
};

/// A feed, a stream of it, a charge.
struct FeedDraft : Common {
  Given<std::string> name;
  Given<Raw> feed_rate;
  Given<double> volume;
  Given<double> temperature, pressure, density, heat_capacity, viscosity;
  Given<ByName<Raw>> concentration;
  Given<ByName<double>> fraction;
};
struct EquivalentsDraft : Common {
  Given<std::string> of, to;
  Given<double> ratio;
};
struct DoseDraft : FeedDraft {
  Given<EquivalentsDraft> equivalents;
  Given<double> time;
};
struct CycleDraft : Common {
  Given<double> charging, emptying, cleaning, discharge_at;
};

enum class AntoineScale { kelvin, celsius };
struct AntoineDraft : Common {
  Given<double> A, B, C;
  Given<std::string> pressure;
  Given<AntoineScale> temperature;
};
struct SpeciesDraft : Common {
  Given<double> molar_mass;
  Given<AntoineDraft> antoine;
  Given<bool> solvent, is_volatile;
  Given<std::vector<Raw>> heat_capacity;
};

struct MeasuredDraft : Common {
  Given<Bounds> temperature, conversion;
};
struct RateDraft : Common {
  Given<Raw> k, most;
  Given<std::string> of;
  Given<double> at, theta;
  Given<Raw> activation_energy;
  Given<ByName<double>> orders;
  Given<ByName<Raw>> half, adsorption;
  Given<double> adsorption_power;
  Given<Basis> basis;
  Given<Per> per;
  Given<MeasuredDraft> measured;
  Given<std::vector<double>> conversion;
  Given<std::vector<Raw>> consumption;
  Given<std::string> table;
};
struct EquilibriumDraft : Common {
  Given<Raw> K;
  Given<double> at;
};
struct ReactionDraft : Common {
  Given<std::string> name, equation;
  Given<Raw> releases, absorbs;
  Given<double> heat_at;
  Given<RateDraft> rate, reverse;
  Given<EquilibriumDraft> equilibrium;
};

enum class Mode { continuous, batch, dosed };
/// Keys of [operation] that one vessel may have for itself.
struct VesselOperationDraft : Common {
  Given<Thermal> thermal;
  Given<double> temperature, pressure, fill, catalyst;
  Given<std::string> utility;
};
struct OperationDraft : VesselOperationDraft {
  Given<Mode> mode;
  Given<ByName<VesselOperationDraft>> vessels;
};
struct StartDraft : Common {
  Given<Start::Filled> filled_with;
  Given<double> temperature;
};
struct LimitsDraft : Common {
  Given<Bounds> temperature;
  Given<double> decomposition;
  Given<std::vector<std::string>> wetted;
  Given<std::string> boiling;
};

struct DutyDraft : Common {
  Given<std::int64_t> format;
  Given<std::string> name, conversion_of;
  Given<Phase> phase;
  Given<Amounts> amounts;
  Given<TargetDraft> target;
  Given<std::vector<FeedDraft>> feeds;
  bool one_feed = false;  ///< written as [feed], not [[feed]]
  Given<ByName<SpeciesDraft>> species;
  Given<std::vector<ReactionDraft>> reactions;
  Given<OperationDraft> operation;
  Given<StartDraft> start;
  Given<LimitsDraft> limits;
  Given<FeedDraft> charge;
  Given<DoseDraft> dose;
  Given<CycleDraft> cycle;
};

// The declarations of their keys.
const Fields<DutyDraft>& duty_fields();
const Fields<TargetDraft>& target_fields();
const Fields<ProductionDraft>& production_fields();
const Fields<ShareDraft>& share_fields();
const Fields<OutletDraft>& outlet_fields();
const Fields<FeedDraft>& feed_fields();
const Fields<FeedDraft>& charge_fields();
const Fields<DoseDraft>& dose_fields();
const Fields<EquivalentsDraft>& equivalents_fields();
const Fields<CycleDraft>& cycle_fields();
const Fields<SpeciesDraft>& species_fields();
const Fields<AntoineDraft>& antoine_fields();
const Fields<ReactionDraft>& reaction_fields();
const Fields<RateDraft>& rate_fields();
const Fields<MeasuredDraft>& measured_fields();
const Fields<EquilibriumDraft>& equilibrium_fields();
const Fields<OperationDraft>& operation_fields();
const Fields<VesselOperationDraft>& vessel_operation_fields();
const Fields<StartDraft>& start_fields();
const Fields<LimitsDraft>& limits_fields();

}  // namespace vatwright
