#pragma once
// Small plants at random, and the same as problems that rank takes.
#include <cmath>
#include <random>
#include <string>

#include "hookup/site.hpp"
#include "small_plant.hpp"

namespace vatwright::test {

struct SmallSite {
  SmallPlant plant;
  double feed_m3_s = 1;
  int most = 3;
};

inline Problem problem_of(const SmallPlant& plant, double feed_m3_s, double target) {
  std::vector<Vessel> vessels;
  for (const SmallVessel& v : plant.vessels) {
    const std::string tag = (v.is_tank ? "T-" : "P-") + std::to_string(vessels.size() + 1);
    vessels.push_back(v.is_tank ? tank(tag, v.volume_m3) : tube(tag, v.volume_m3));
    vessels.back().feed_line_m3_s = v.feed_line_m3_s;
  }
  const Shape shape = plant.shape;
  std::vector<SpeciesFigure> orders = {{0, shape == Shape::half ? 0.5 : shape == Shape::second ? 2 : 1}};
  if (shape == Shape::autocatalytic) orders.push_back({1, 1});
  Reaction r = reaction({{0, -1}, {1, 1}}, 1, orders);
  auto& law = std::get<RateLaw>(r.forward);
  if (shape == Shape::hindered) {
    law.adsorption = {{0, hindrance}};
    law.adsorption_power = 2;
  }
  constexpr double density_kg_m3 = 1000, cp_J_kg_K = 2000;
  if (shape == Shape::adiabatic) {
    RateConstant& k = std::get<PowerLaw>(law.law).k;
    k.at_K = feed_K;
    k.moves = RateConstant::Moves::arrhenius;
    k.activation_J_mol = activation_K * gas_constant;
    r.heat = HeatOfReaction{-rise_K * density_kg_m3 * cp_J_kg_K, feed_K, {}};  // of 1 mol/m3
  }
  Problem problem =
      problem_of(std::move(vessels), {1, shape == Shape::autocatalytic ? seed_conversion : 0}, {r}, feed_m3_s, target);
  if (shape == Shape::adiabatic) {
    problem.duty.thermal = Thermal::adiabatic;
    problem.duty.chemistry.feed.density_kg_m3 = density_kg_m3;
    problem.duty.chemistry.feed.heat_capacity_J_kg_K = cp_J_kg_K;
  }
  return problem;
}

/// n vessels of 1 to 10 m3, now and then two equal ones, half of all sites with feed lines; the feed rate is such that
/// `most` of them take part of what can react.
inline SmallSite random_site(std::mt19937& random, Shape shape, int n, int most) {
  const auto uniform = [&](double a, double b) { return a + (b - a) * (static_cast<double>(random()) / 4294967296.0); };
  SmallSite site{{shape, {}}, 1, most};
  double volume = 0;
  for (int i = 0; i < n; ++i) {
    SmallVessel v{random() % 2 == 0, std::pow(10, uniform(0, 1)), std::nullopt};
    if (i > 0 && random() % 6 == 0) v = site.plant.vessels[static_cast<std::size_t>(i - 1)];
    site.plant.vessels.push_back(v);
    volume += v.volume_m3;
  }
  const double slowness = shape == Shape::hindered        ? 10
                          : shape == Shape::autocatalytic ? 3
                          : shape == Shape::adiabatic     ? 0.4
                                                          : 1;
  site.feed_m3_s = volume / n * most / (slowness * uniform(0.6, 3));
  if (random() % 2 == 0)
    for (SmallVessel& v : site.plant.vessels)
      if (random() % 2 == 0) v.feed_line_m3_s = site.feed_m3_s * uniform(0.2, 1.3);
  return site;
}

}  // namespace vatwright::test
