#pragma once
#include <cmath>
#include <stdexcept>
#include <string>
#include <utility>
#include <vector>

#include "vatwright/vessel/run.hpp"

namespace vatwright {

/// Small duties and vessels for tests, in SI (mol/m3, s, K).
struct Plant {
  Feed feed;
  std::vector<Reaction> reactions;
  int of = 0;
  Operation operation;
  Start start;

  explicit Plant(std::vector<double> c) {
    feed.c_mol_m3 = std::move(c);
    for (std::size_t i = 0; i < feed.c_mol_m3.size(); ++i) {
      feed.species.emplace_back();
      feed.species.back().name = std::string(1, static_cast<char>('A' + i));
    }
    operation.hold_K = 350;
  }
  /// A power law; nu and orders by species index.
  Reaction& react(std::vector<SpeciesFigure> nu, double k, std::vector<SpeciesFigure> orders) {
    Reaction r;
    r.name = "reaction " + std::to_string(reactions.size() + 1);
    for (const SpeciesFigure& n : nu) (n.value < 0 ? r.left : r.right).push_back({n.species, std::abs(n.value)});
    r.nu = std::move(nu);
    RateLaw law;
    PowerLaw power;
    power.k.k = k;
    power.orders = std::move(orders);
    law.law = std::move(power);
    law.per = Per::fluid;
    r.forward = std::move(law);
    reactions.push_back(std::move(r));
    return reactions.back();
  }
  void gas(double T_K, double P_Pa) {
    feed.phase = Phase::gas;
    feed.temperature_K = T_K;
    feed.pressure_Pa = P_Pa;
    operation.hold_K = T_K;
  }
  void adiabatic() { operation.thermal = Thermal::adiabatic; }
  [[nodiscard]] Chemistry chemistry() const {
    return {feed, Kinetics(reactions, static_cast<int>(feed.species.size()), of,
                           feed.c_mol_m3[static_cast<std::size_t>(of)])};
  }
  [[nodiscard]] Stream whole_feed() const {
    return {0, std::vector<double>(reactions.size()), feed.temperature_K, feed.pressure_Pa};
  }
};

inline RateLaw& law_of(Reaction& reaction) { return std::get<RateLaw>(reaction.forward); }
inline RateConstant& constant_of(Reaction& reaction) { return std::get<PowerLaw>(law_of(reaction).law).k; }

inline Vessel tank_of(double volume_m3) {
  Vessel vessel;
  vessel.tag = "K";
  vessel.kind = StirredTank{.volume_m3 = volume_m3, .fill = {0, 1}, .agitator_W = 0};
  return vessel;
}
/// A tube of the volume, 1 m2 across.
inline Vessel tube_of(double volume_m3) {
  Vessel vessel;
  vessel.tag = "P";
  vessel.kind =
      Tube{.bore_m = std::sqrt(4 / 3.14159265358979323846), .length_m = volume_m3, .tubes = 1, .roughness_m = 0};
  return vessel;
}
inline Vessel bed_of(double volume_m3, double voidage = 0.4) {
  Vessel vessel;
  vessel.tag = "B";
  vessel.kind = PackedTube{.bore_m = std::sqrt(4 / 3.14159265358979323846),
                           .length_m = volume_m3,
                           .tubes = 1,
                           .particle_m = 0.004,
                           .voidage = voidage,
                           .bulk_density_kg_m3 = 900};
  return vessel;
}

/// A plant's vessel, rated. Keeps what the run refers to.
class Rated {
 public:
  Rated(const Plant& plant, Vessel vessel) : Rated(plant, std::move(vessel), plant.whole_feed()) {}
  Rated(const Plant& plant, Vessel vessel, Stream arrives)
      : plant_(plant),
        vessel_(std::move(vessel)),
        chemistry_(plant.chemistry()),
        run_(vessel_, chemistry_, plant_.operation, plant_.start, arrives) {}
  Rated(const Rated&) = delete;
  Rated& operator=(const Rated&) = delete;
  /// The outcome, which must be there.
  VesselOutcome at(double feed_m3_s, Detail detail = Detail::full) {
    auto outcome = run_.at(feed_m3_s, detail);
    if (const auto* no = std::get_if<NoAnswer>(&outcome)) throw std::runtime_error("no answer: " + no->why);
    return std::get<VesselOutcome>(std::move(outcome));
  }
  double conversion(double feed_m3_s) { return at(feed_m3_s).conversion; }
  VesselRun& run() { return run_; }
  const Chemistry& chemistry() const { return chemistry_; }

 private:
  Plant plant_;
  Vessel vessel_;
  Chemistry chemistry_;
  VesselRun run_;
};

}  // namespace vatwright
