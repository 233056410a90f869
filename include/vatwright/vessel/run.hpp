#pragma once
#include <memory>
#include <optional>
#include <string>
#include <vector>

#include "vatwright/error/outcome.hpp"
#include "vatwright/thermal/chemistry.hpp"
#include "vatwright/vessel/vessel.hpp"

namespace vatwright {

enum class Thermal { hold, adiabatic, jacketed };

/// How one vessel is run in a duty, after all overrides.
struct Operation {
  Thermal thermal = Thermal::hold;
  double hold_K = 0;                       ///< for hold
  std::optional<double> pressure_Pa;       ///< given for this vessel; it is a let-down on a later vessel
  double fill = 1;                         ///< of a tank with liquid, fraction of the brimful volume
  double catalyst_kg_m3 = 0;               ///< loading of a stirred tank, per m3 of working fluid
  std::optional<std::string> utility;      ///< asked for by name
  const Utility* medium = nullptr;         ///< jacketed: what flows in the jacket; null: nothing does
  std::optional<double> medium_flow_m3_s;  ///< jacketed: how much of it; absent: nothing limits it
};

/// How a tank is brought on line; decides among steady states.
struct Start {
  enum class Filled { feed, product, solvent };
  Filled filled_with = Filled::feed;
  std::optional<double> temperature_K;  ///< left out: the feed's; a held tank starts at its hold temperature
};

/// One steady state: of a stirred tank, or of a tube against its medium where there are several.
struct SteadyState {
  std::vector<double> xi_mol_m3;
  double conversion = 0;  ///< of conversion_of, cumulative from the mixed feed
  double temperature_K = 0;
  std::optional<bool>
      stable;  ///< eigenvalues of the transient balances (held: at constant T); absent: a tube, not known
  std::optional<bool> reached;  ///< the start ends here; absent: a tube, not known
};

/// Along a tube, arrays of equal length.
struct Profile {
  std::vector<double> length_m, volume_m3, conversion, temperature_K, pressure_Pa;
  std::vector<std::optional<double>> medium_K;
  std::vector<double> flux_W_m2;  ///< held: heat that the wall must take there (+); empty where heat is not known
};

/// Heat made and heat removed by a tank over its temperature, arrays of equal length.
struct HeatCurve {
  std::vector<double> temperature_K, made_W, removed_W;
};

/// Heat that a held vessel needs to stay as it is run, or that a jacketed one gives off, + = removed.
struct HeatNeed {
  double cooling_W = 0;        ///< of the whole vessel, agitator counted (held tank: warming of the feed too)
  double preheat_W = 0;        ///< held tubes: to bring what arrives to the hold temperature, + = heating; tanks 0
  double most_flux_W_m2 = 0;   ///< tubes: greatest cooling flux along it (>= 0)
  double least_flux_W_m2 = 0;  ///< tubes: greatest heating flux along it as a negative number (<= 0)
};

/// How far contents that give off heat are above what takes it, and how far they may be before a small upset is no
/// longer self-correcting.
struct DrivingDifference {
  double contents_K = 0;  ///< temperature of the contents less that of the medium beside them (held: Q/(U A))
  double most_K = 0;      ///< 1/(d ln q/dT), q the heat released per volume; of one rate by Arrhenius R T^2/E
};

/// Everything one vessel does with one inlet at one feed rate.
struct VesselOutcome {
  Stream outlet;
  double enters_K = 0;                     ///< of what comes into the vessel (a held tube: after its preheater)
  double conversion = 0;                   ///< cumulative, from the mixed feed
  double coldest_K = 0, hottest_K = 0;     ///< inside (a tube's inlet included; what arrives at a tank not)
  double hottest_at = 0;                   ///< tubes: where, as a fraction of the length
  double lowest_Pa = 0, highest_Pa = 0;    ///< inside
  std::optional<double> pressure_drop_Pa;  ///< tubes; absent where viscosity (gas: or a molar mass) is missing
  std::optional<double>
      let_down_above_Pa;  ///< a let-down was asked to more than what arrives: that much (ruled: does not pass)
  std::optional<double> start_peak_K;        ///< tanks: the hottest while it comes on line
  std::vector<SteadyState> states;           ///< tanks, rising conversion; tubes: where counter-current has several
  bool states_complete = true;               ///< tanks: certain in the range searched
  bool cycle = false;                        ///< tanks: the start ends in a cycle; there is no outlet to speak of
  std::optional<double> uncooled_K;          ///< the hottest that the contents can become if cooling fails at the worst
                                             ///< moment (start-up counted) and the feed stops; held and jacketed alone
  std::optional<DrivingDifference> driving;  ///< at the worst place, where heat must be removed
  std::optional<double> runaway_share;  ///< tubes on their jackets that release heat: the share of its U at which a
                                        ///< tube's hot spot is most sensitive to it; 0: nowhere sensitive
  std::optional<HeatNeed> heat;         ///< absent where heat is not asked or not known, and in adiabatic vessels
  std::vector<Stream> inside;      ///< states to check limits at: tank: its contents; tube: places along it, rising
  std::optional<Profile> profile;  ///< tubes, where Detail::profile was asked
  std::optional<HeatCurve> heat_curve;  ///< tanks whose temperature moves, where Detail::profile was asked
  double residual = 0;                  ///< ruling 37, reckoned apart from the solver
  bool isothermal = true;               ///< decides the bound on the residual: 1e-9 or 1e-6
};

enum class Detail {
  map,     ///< outlet, conversion, states only: what hookups and windows need in their inner loops
  full,    ///< all but the profile
  profile  ///< all
};

/// One vessel with one inlet, to be rated at any number of feed rates: work that serves all rates (the track of a
/// tube, the rate curve of a tank) is done once and kept.
class VesselRun {
 public:
  /// arrives: extents, temperature and pressure of what arrives (its feed_m3_s is not read). All referenced objects
  /// outlive it.
  VesselRun(const Vessel& vessel, const Chemistry& chemistry, const Operation& operation, const Start& start,
            const Stream& arrives);
  ~VesselRun();
  VesselRun(VesselRun&&) noexcept;
  VesselRun& operator=(VesselRun&&) noexcept;

  /// feed_m3_s: how much of the mixed feed passes this vessel, > 0.
  /// NoAnswer: cannot_tell (per unsaid, rate table left, heat missing, ..), does_not_pass (pressure used up), unsolved.
  [[nodiscard]] Outcome<VesselOutcome> at(double feed_m3_s, Detail detail);

  /// The feed rate at which the outlet's conversion passes X on the reached branch, read off the kept track at the
  /// price of one rating; nullopt where no single track serves (several reactions, gas with pressure drop) or X is not
  /// passed.
  [[nodiscard]] std::optional<double> feed_at_conversion(double X);

  /// Evaluations of the rates so far.
  [[nodiscard]] long rate_calls() const;

 private:
  struct Model;
  std::unique_ptr<Model> model_;
};

/// Relative imbalance of moles by extents (and energy), reckoned from the state alone:
///   tank: |xi_in + tau m r - xi| over the sum of the absolute terms, largest over reactions; energy alike.
///   tube: the balance integrated along the stored track by quadrature of the rates, apart from the marching method.
/// (declared here because tests attack it; used by VesselRun::at)

}  // namespace vatwright
