#pragma once
// Sites and duties written by hand, liquid and isothermal unless said.
#include "vatwright/rating/rating.hpp"

namespace vatwright::test {

inline Reaction power_law(const std::string& equation, std::vector<SpeciesFigure> nu, double k,
                          std::vector<SpeciesFigure> orders, double of_coefficient = 1) {
  Reaction r;
  r.name = r.equation = equation;
  r.nu = std::move(nu);
  RateLaw law;
  law.law = PowerLaw{RateConstant{.k = k, .at_K = {}}, std::move(orders)};
  law.of_coefficient = of_coefficient;
  r.forward = law;
  return r;
}

inline Chemistry liquid_of(const std::vector<std::string>& names, std::vector<double> c_mol_m3,
                           std::vector<Reaction> reactions) {
  Chemistry c;
  for (const auto& name : names) {
    Species s;
    s.name = name;
    c.feed.species.push_back(s);
  }
  c.feed.c_mol_m3 = c_mol_m3;
  c.feed.density_kg_m3 = 1000;
  c.feed.heat_capacity_J_kg_K = 4000;
  c.feed.temperature_K = 333.15;
  c.kinetics = Kinetics(std::move(reactions), static_cast<int>(names.size()), 0, c_mol_m3[0]);
  return c;
}

/// A -> B of the first order, 1000 mol/m3 of A.
inline Problem first_order_problem(double k_per_s, double conversion, double feed_m3_s) {
  Problem p;
  p.duty.chemistry = liquid_of({"A", "B"}, {1000, 0}, {power_law("A -> B", {{0, -1}, {1, 1}}, k_per_s, {{0, 1}})});
  p.duty.conversion_of = "A";
  p.duty.target.conversion = conversion;
  p.duty.target.feed_m3_s = feed_m3_s;
  p.duty.hold_K = 333.15;
  return p;
}

inline Vessel tank(double volume_m3, const std::string& tag = "K-1") {
  Vessel v;
  v.tag = tag;
  v.kind = StirredTank{volume_m3, {0, 1}, 0};
  return v;
}
inline Vessel tube(double bore_m, double length_m, const std::string& tag = "P-1") {
  Vessel v;
  v.tag = tag;
  v.kind = Tube{bore_m, length_m, 1, 0};
  return v;
}

}  // namespace vatwright::test
