#pragma once
// Small sites and duties for the tests of this room: first vessels, one liquid, reactions per fluid, all held.
#include <cmath>
#include <numbers>
#include <stdexcept>
#include <string>
#include <vector>

#include "vatwright/hookup/hookup_rating.hpp"

namespace vatwright::test {

inline Vessel tank(const std::string& tag, double volume_m3) {
  Vessel v;
  v.tag = tag;
  v.kind = StirredTank{};
  std::get<StirredTank>(v.kind).volume_m3 = volume_m3;
  return v;
}
/// One pipe of 1 m2 inside, so that its length is its volume.
inline Vessel tube(const std::string& tag, double volume_m3) {
  Vessel v;
  v.tag = tag;
  v.kind = Tube{2 / std::sqrt(std::numbers::pi), volume_m3, 1, 0};
  return v;
}

/// r = k prod C_i^n_i of an equation with the given net coefficients.
inline Reaction reaction(std::vector<SpeciesFigure> nu, double k, std::vector<SpeciesFigure> orders) {
  Reaction r;
  r.name = r.equation = "reaction";
  r.nu = std::move(nu);
  RateLaw law;
  RateConstant constant;
  constant.k = k;
  law.law = PowerLaw{constant, std::move(orders)};
  law.per = Per::fluid;
  r.forward = law;
  return r;
}

/// A liquid of the species A, B, .. at concentrations c; conversion is of A.
inline Problem problem_of(std::vector<Vessel> vessels, std::vector<double> c, std::vector<Reaction> reactions, double feed_m3_s,
                          double target) {
  Problem p;
  p.site.vessels = std::move(vessels);
  Feed& feed = p.duty.chemistry.feed;
  for (std::size_t i = 0; i < c.size(); ++i) {
    feed.species.emplace_back();
    feed.species.back().name = std::string(1, static_cast<char>('A' + i));
  }
  feed.c_mol_m3 = c;
  p.duty.conversion_of = "A";
  p.duty.chemistry.kinetics = Kinetics(std::move(reactions), static_cast<int>(c.size()), 0, c[0]);
  p.duty.hold_K = 298.15;
  p.duty.start.temperature_K = 298.15;
  p.duty.target.feed_m3_s = feed_m3_s;
  p.duty.target.conversion = target;
  return p;
}
/// A -> B of order n, k C0^(n-1) = 1 per s, C0 = 1 mol/m3: volumes in m3 are Damkoehler numbers at 1 m3/s.
inline Problem power_law(std::vector<Vessel> vessels, double order, double target = 0.5) {
  return problem_of(std::move(vessels), {1, 0}, {reaction({{0, -1}, {1, 1}}, 1, {{0, order}})}, 1, target);
}

inline Hookup parsed(const std::string& text, const Site& site) {
  auto got = parse_hookup(text, site);
  if (auto* fault = std::get_if<HookupFault>(&got)) throw std::runtime_error(text + ": " + fault->found);
  return std::get<Hookup>(got);
}
inline double conversion(const Problem& problem, const std::string& text) {
  const auto rating = rate_hookup(problem, parsed(text, problem.site), {.windows = false});
  return rating.whole.conversion.value_or(-1e9);
}

}  // namespace vatwright::test
