// All steady states of a tank, their stability, and which one the start reaches.
#include <cmath>

#include "plant.hpp"
#include "support/catch.hpp"

using namespace vatwright;

namespace {

/// r = k C/(1 + K C)^2 with k = 1/s, so that tau is k tau.
Plant hindered(double K, double c) {
  Plant plant({c, 0});
  RateLaw& law = law_of(plant.react({{0, -1}, {1, 1}}, 1, {{0, 1}}));
  law.adsorption = {{0, K}};
  law.adsorption_power = 2;
  return plant;
}

/// First order, k = 0.001 exp(-8000 (1/T - 1/298)) 1/min, 2 kmol/m3, rise 150 K, feed at 298 K.
Plant lit() {
  Plant plant({2000, 0});
  Reaction& r = plant.react({{0, -1}, {1, 1}}, 0.001 / 60, {{0, 1}});
  constant_of(r).at_K = 298;
  constant_of(r).moves = RateConstant::Moves::arrhenius;
  constant_of(r).activation_J_mol = 8000 * gas_constant;
  r.heat = HeatOfReaction{.dH_J_mol = -3e5, .at_K = 298, .dCp = {}};
  plant.feed.temperature_K = 298;
  plant.feed.density_kg_m3 = 1000;
  plant.feed.heat_capacity_J_kg_K = 4000;
  plant.adiabatic();
  return plant;
}

}  // namespace

// Rate maximum k C/(1 + K C)^2; states and folds from the cubic (criterion K C0 > 8: Matsuura and Kato, Chem. Eng. Sci.
// 22 (1967) 171, from memory).
TEST_CASE("a hindered reaction has three states between its folds", "[vessel][tank]") {
  Rated tank(hindered(1, 20), tank_of(1));
  CHECK(tank.at(1 / 60.0).states.size() == 1);
  CHECK(tank.at(1 / 125.0).states.size() == 1);
  const auto three = tank.at(1 / 90.0);
  REQUIRE(three.states.size() == 3);
  const double u[] = {14.600873, 2.931933, 0.467194};
  for (std::size_t i = 0; i < 3; ++i) {
    CHECK(three.states[i].conversion == Approx(1 - u[i] / 20).epsilon(1e-6));
    CHECK(three.states[i].stable == (i != 1));
    CHECK(three.states[i].reached == (i == 0));
  }
  CHECK(tank.at(1 / (75.7621 * 0.99999)).states.size() == 1);
  CHECK(tank.at(1 / (75.7621 * 1.00001)).states.size() == 3);
  CHECK(tank.at(1 / (122.2379 * 0.99999)).states.size() == 3);
  CHECK(tank.at(1 / (122.2379 * 1.00001)).states.size() == 1);
  // at k tau = 76 the state of the rate maximum is one of three: u = 1, (17 -+ sqrt 209)/2
  const auto maximum = tank.at(1 / 76.0);
  REQUIRE(maximum.states.size() == 3);
  CHECK(maximum.states[2].conversion == Approx(0.95).epsilon(1e-9));
  CHECK(maximum.states[1].conversion == Approx(1 - (17 - std::sqrt(209.0)) / 40).epsilon(1e-9));
  CHECK(maximum.states[0].conversion == Approx(1 - (17 + std::sqrt(209.0)) / 40).epsilon(1e-9));
}

TEST_CASE("states of a hindered tank are the roots of its cubic, never one missed", "[vessel][tank]") {
  const double KC0 = GENERATE(7.9, 8.1, 9.0, 20.0, 300.0, 1e4);
  Rated tank(hindered(1, KC0), tank_of(1));
  for (int i = 0; i <= 400; ++i) {
    const double k_tau = std::pow(10.0, -1 + 0.0225 * i);
    // u (1 + k tau/(1+u)^2) = u0 changes its slope where the states number 1 or 3: count by sign changes on a fine grid
    int count = 0;
    double before = -1;
    for (int s = 0; s <= 20000; ++s) {
      const double u = KC0 * std::pow(10.0, -10.0 + 10.0 * s / 20000);
      const double g = u * (1 + k_tau / ((1 + u) * (1 + u))) - KC0;
      if (g >= 0 && before < 0) ++count;
      if (g < 0 && before >= 0) ++count;
      before = g;
    }
    INFO("K C0 " << KC0 << ", k tau " << k_tau);
    const auto outcome = tank.at(1 / k_tau);
    if (static_cast<int>(outcome.states.size()) != count) CHECK(static_cast<int>(outcome.states.size()) == count);
    for (const SteadyState& state : outcome.states) {
      const double u = KC0 * (1 - state.conversion);
      const double X = k_tau * u / ((1 + u) * (1 + u)) / KC0;
      if (state.conversion < 0.999) CHECK(X == Approx(state.conversion).epsilon(1e-9));
    }
  }
}

TEST_CASE("a fill of product starts a hindered tank at its high state", "[vessel][tank]") {
  Plant plant = hindered(1, 20);
  plant.start.filled_with = Start::Filled::product;
  CHECK(Rated(plant, tank_of(1)).conversion(1 / 90.0) == Approx(1 - 0.467194 / 20).epsilon(1e-6));
  plant.start.filled_with = Start::Filled::solvent;
  CHECK(Rated(plant, tank_of(1)).conversion(1 / 90.0) == Approx(1 - 0.467194 / 20).epsilon(1e-6));
}

// J. B. Rawlings, J. G. Ekerdt, Chemical Reactor Analysis and Design Fundamentals, 2012, ch. 6, from memory: ignition
// at 30.9 min, extinction at 1.79 min.
TEST_CASE("an adiabatic tank lights and goes out at the published space times", "[vessel][tank]") {
  Rated tank(lit(), tank_of(1));
  const auto at_minutes = [&](double tau) { return tank.at(1 / (60 * tau)); };
  CHECK(at_minutes(1).states.size() == 1);
  CHECK(at_minutes(40).states.size() == 1);
  CHECK(at_minutes(1.78750 * 0.9999).states.size() == 1);
  CHECK(at_minutes(1.78750 * 1.0001).states.size() == 3);
  CHECK(at_minutes(30.9006 * 0.9999).states.size() == 3);
  CHECK(at_minutes(30.9006 * 1.0001).states.size() == 1);
  const auto ten = at_minutes(10);
  REQUIRE(ten.states.size() == 3);
  const double T[] = {299.731, 349.525, 445.998}, X[] = {0.01154, 0.34350, 0.98665};
  for (std::size_t i = 0; i < 3; ++i) {
    CHECK(ten.states[i].temperature_K == Approx(T[i]).margin(2e-3));
    CHECK(ten.states[i].conversion == Approx(X[i]).margin(1e-5));
    CHECK(ten.states[i].stable == (i != 1));
  }
  CHECK(ten.states[0].reached == true);
  CHECK(ten.residual < 1e-9);
}

TEST_CASE("a hot start lights an adiabatic tank, and its peak is kept", "[vessel][tank]") {
  Plant plant = lit();
  plant.start.temperature_K = 360;
  const auto outcome = Rated(plant, tank_of(1)).at(1 / 600.0);
  REQUIRE(outcome.states.size() == 3);
  CHECK(outcome.states[2].reached == true);
  REQUIRE(outcome.start_peak_K);
  CHECK(*outcome.start_peak_K > 460);  // a fill at 360 K holds 150 K more in its reactant
  CHECK(*outcome.start_peak_K < 511);
}

TEST_CASE("an agitator warms an adiabatic tank", "[vessel][tank]") {
  Plant plant = lit();
  constant_of(plant.reactions[0]).k = 0;
  Vessel vessel = tank_of(1);
  std::get<StirredTank>(vessel.kind).agitator_W = 4000;
  const auto outcome = Rated(plant, vessel).at(1e-4);  // 4000 W over 1e-4 m3/s and 4e6 J/m3/K
  CHECK(outcome.outlet.temperature_K == Approx(308).epsilon(1e-12));
}
