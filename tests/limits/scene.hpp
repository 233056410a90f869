#pragma once
// A vessel with a liquid A -> B in it and an outcome written by hand: what each limit is tried on.
#include <algorithm>
#include <string>

#include "vatwright/limits/limit.hpp"

namespace vatwright::test {

inline Reaction first_order(std::optional<double> releases_J_mol) {
  Reaction r;
  r.name = r.equation = "A -> B";
  r.nu = {{0, -1}, {1, 1}};
  RateLaw law;
  law.law = PowerLaw{RateConstant{.k = 1e-3, .at_K = {}, .moves = RateConstant::Moves::not_at_all}, {{0, 1}}};
  r.forward = law;
  if (releases_J_mol) r.heat = HeatOfReaction{-*releases_J_mol, 298.15, {}};
  return r;
}

/// 1000 mol/m3 of A in 1 kg/L of a liquid with the heat capacity of 4 kJ/kg/K.
inline Chemistry liquid(std::optional<double> releases_J_mol = 60e3) {
  Chemistry c;
  c.feed.species.resize(2);
  c.feed.species[0].name = "A";
  c.feed.species[1].name = "B";
  c.feed.c_mol_m3 = {1000, 0};
  c.feed.density_kg_m3 = 1000;
  c.feed.heat_capacity_J_kg_K = 4000;
  c.kinetics = Kinetics({first_order(releases_J_mol)}, 2, 0, 1000);
  return c;
}

inline Utility tower_water() {
  Utility u;
  u.name = "tower-water";
  u.supply_K = 26 + 273.15;
  u.flow_m3_s = 30.0 / 3600;
  u.density_kg_m3 = 996;
  u.heat_capacity_J_kg_K = 4180;
  return u;
}
inline Utility steam() {
  Utility u;
  u.name = "low-steam";
  u.supply_K = 152 + 273.15;
  u.condensing = true;
  return u;
}

struct Scene {
  Vessel vessel;
  Chemistry chemistry = liquid();
  Operation operation;
  ProductLimits product;
  std::vector<Utility> utilities = {tower_water(), steam()};
  double feed_m3_s = 2.4 / 3600;
  VesselOutcome outcome;
  std::optional<double> arrives_Pa;
  Stands stands = Stands::alone;

  Scene() {
    vessel.tag = "K-201";
    vessel.kind = StirredTank{6.3, {0.30, 0.85}, 0};
    operation.hold_K = 70 + 273.15;
    operation.fill = 0.85;
    outcome.coldest_K = outcome.hottest_K = operation.hold_K;
    outcome.lowest_Pa = outcome.highest_Pa = 3e5;
    outcome.outlet = Stream{feed_m3_s, {900}, operation.hold_K, 3e5};
    outcome.inside = {outcome.outlet};
    outcome.conversion = 0.9;
  }
  /// 14.2 m2 at 380 W/m2/K.
  Scene& with_jacket() {
    Jacket j;
    j.utilities = {"tower-water", "low-steam"};
    j.area_m2 = 14.2;
    j.U_W_m2_K = 380;
    vessel.jacket = j;
    return *this;
  }
  /// One tube of 52.5 mm by 96 m at 650 W/m2/K.
  Scene& as_tube() {
    vessel.kind = Tube{0.0525, 96, 1, 0};
    with_jacket();
    vessel.jacket->area_m2.reset();
    vessel.jacket->U_W_m2_K = 650;
    operation.fill = 1;
    return *this;
  }
  Scene& needs(double cooling_W) {
    outcome.heat = HeatNeed{.cooling_W = cooling_W};
    return *this;
  }
  [[nodiscard]] const Utility* medium() const { return choose_medium(vessel, operation, utilities, outcome); }
  [[nodiscard]] LimitInput input() const {
    return {vessel, chemistry, operation, product, utilities, feed_m3_s, outcome, medium(), arrives_Pa, stands};
  }
  /// The limit of that name, absent where it is not asked.
  [[nodiscard]] std::optional<Limit> limit(std::string_view name) const {
    for (auto& each : check_limits(input())) {
      if (each.name == name) return each;
    }
    return std::nullopt;
  }
};

inline bool holds(const std::optional<Limit>& limit) { return limit && limit->state == Limit::State::holds; }
inline bool broken(const std::optional<Limit>& limit) { return limit && limit->state == Limit::State::broken; }
inline bool untold(const std::optional<Limit>& limit) { return limit && limit->state == Limit::State::cannot_tell; }

}  // namespace vatwright::test
