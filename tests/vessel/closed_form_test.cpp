// One reaction against closed forms.
#include <cmath>

#include "plant.hpp"
#include "support/catch.hpp"

using namespace vatwright;

namespace {

Plant power_law(double order, double k, double c = 1) {
  Plant plant({c, 0});
  plant.react({{0, -1}, {1, 1}}, k, {{0, order}});
  return plant;
}

/// dX/dt = k C0^(n-1) (1-X)^n.
double tube_conversion(double n, double da) {
  if (n == 1) return -std::expm1(-da);
  const double left = 1 - (1 - n) * da;
  return left <= 0 ? 1 : 1 - std::pow(left, 1 / (1 - n));
}

}  // namespace

TEST_CASE("a tube with a power law follows its closed form", "[vessel][tube]") {
  const double order = GENERATE(0.0, 0.3, 0.5, 0.9, 1.0, 1.5, 2.0, 3.0);
  const double c = GENERATE(0.01, 1.0, 4000.0);
  const double k = 0.01 * std::pow(c, 1 - order);
  Rated tube(power_law(order, k, c), tube_of(2));
  for (double da : {1e-9, 1e-4, 0.03, 0.5, 0.99, 1.5, 1.9, 2.5, 8.0, 30.0, 1e3, 1e7}) {
    INFO("order " << order << ", k C0^(n-1) tau " << da);
    const auto outcome = tube.at(2 * 0.01 / da);
    const double exact = tube_conversion(order, da);
    CHECK(outcome.conversion == Approx(exact).epsilon(1e-10).margin(1e-13));
    CHECK(outcome.residual < 1e-9);
    CHECK(outcome.conversion <= 1);
  }
}

TEST_CASE("a tank with a power law follows its closed form", "[vessel][tank]") {
  const double order = GENERATE(0.0, 0.3, 0.5, 1.0, 1.5, 2.0, 3.0);
  const double k = 0.01;
  Rated tank(power_law(order, k), tank_of(2));
  for (double X : {1e-9, 1e-4, 0.1, 0.5, 0.9, 0.999, 1 - 1e-9}) {
    INFO("order " << order << ", X " << X);
    const double tau = X / (k * std::pow(1 - X, order));
    const auto outcome = tank.at(2 / tau);
    CHECK(outcome.conversion == Approx(X).epsilon(1e-10));
    CHECK(outcome.residual < 1e-12);
    REQUIRE(outcome.states.size() == 1);
    CHECK(outcome.states[0].stable == true);
    CHECK(outcome.states_complete);
  }
}

TEST_CASE("a zero order tank is empty of its reactant once the space time is enough", "[vessel][tank]") {
  Rated tank(power_law(0, 0.01), tank_of(1));
  CHECK(tank.conversion(1 / 99.0) == Approx(0.99).epsilon(1e-13));
  CHECK(tank.conversion(1 / 101.0) == 1);
  CHECK(tank.at(1 / 1e7).states.size() == 1);
}

TEST_CASE("the ceiling read off the track is the feed rate of that conversion", "[vessel]") {
  const double order = GENERATE(0.5, 1.0, 2.0);
  const double X = GENERATE(1e-3, 0.5, 0.9, 0.9999);
  Rated tube(power_law(order, 0.02), tube_of(3));
  const auto feed = tube.run().feed_at_conversion(X);
  REQUIRE(feed);
  CHECK(tube.conversion(*feed) == Approx(X).epsilon(1e-10));
  const double da = order == 1 ? -std::log1p(-X) : (1 - std::pow(1 - X, 1 - order)) / (1 - order);
  CHECK(*feed == Approx(3 * 0.02 / da).epsilon(1e-10));
  Rated tank(power_law(order, 0.02), tank_of(3));
  const auto tank_feed = tank.run().feed_at_conversion(X);
  REQUIRE(tank_feed);
  CHECK(*tank_feed == Approx(3 * 0.02 * std::pow(1 - X, order) / X).epsilon(1e-10));
}

TEST_CASE("a reversible reaction comes to equilibrium and not beyond", "[vessel]") {
  Plant plant({1, 0});
  plant.react({{0, -1}, {1, 1}}, 0.345 / 60, {{0, 1}}).equilibrium =
      Equilibrium{.K = 0.345 / 0.226, .at_K = {}, .heat = {}};
  Rated tube(plant, tube_of(1));
  Rated tank(plant, tank_of(1));
  const double kf = 0.345 / 60, k = (0.345 + 0.226) / 60, X_end = 0.345 / (0.345 + 0.226);
  for (double t : {1e-3, 1.0, 42.0, 420.0, 3000.0, 1e5, 1e9}) {
    INFO("space time " << t);
    CHECK(tube.conversion(1 / t) == Approx(-X_end * std::expm1(-k * t)).epsilon(1e-11));
    CHECK(tank.conversion(1 / t) == Approx(kf * t / (1 + k * t)).epsilon(1e-11));
  }
  // J. Q. Bond, CEN587 course notebooks, notebook 18, problem 3: 0.199 after 0.7 min
  CHECK(tube.conversion(1 / 42.0) == Approx(0.199072).epsilon(1e-5));
}

TEST_CASE("it runs backwards from a feed beyond equilibrium", "[vessel]") {
  Plant plant({1, 3});
  plant.react({{0, -1}, {1, 1}}, 0.01, {{0, 1}}).equilibrium = Equilibrium{.K = 1, .at_K = {}, .heat = {}};
  for (double t : {1.0, 50.0, 1e4}) {
    CHECK(Rated(plant, tube_of(1)).conversion(1 / t) == Approx(std::expm1(-0.02 * t)).epsilon(1e-11));
    CHECK(Rated(plant, tank_of(1)).conversion(1 / t) == Approx(-0.02 * t / (1 + 0.02 * t)).epsilon(1e-11));
  }
}

TEST_CASE("reactants in exact proportion run down together", "[vessel]") {
  Plant plant({2, 3, 0});
  plant.react({{0, -2}, {1, -3}, {2, 1}}, 0.05, {{0, 1}, {1, 1}});  // C_B = 1.5 C_A: dC_A/dt = -2 k 1.5 C_A^2
  for (double t : {0.1, 30.0, 1e6, 1e11}) {
    INFO("space time " << t);
    const double da = 3 * 0.05 * 2 * t;
    CHECK(Rated(plant, tube_of(1)).conversion(1 / t) == Approx(da / (1 + da)).epsilon(1e-10));
    const double tank = (1 + 2 * da - std::sqrt(1 + 4 * da)) / (2 * da);
    CHECK(Rated(plant, tank_of(1)).conversion(1 / t) == Approx(tank).epsilon(1e-7));
  }
}

TEST_CASE("autocatalytic: a seed starts it, without one nothing happens", "[vessel]") {
  const double seed = GENERATE(0.01, 1e-6, 1e-12);
  Plant plant({1 - seed, seed});
  plant.react({{0, -1}, {1, 1}}, 1, {{0, 1}, {1, 1}});
  Rated tube(plant, tube_of(1));
  for (double t : {0.5, 5.0, 20.0, 30.0, 60.0}) {  // logistic
    INFO("seed " << seed << ", time " << t);
    const double R = seed / (seed + (1 - seed) * std::exp(-t));
    CHECK(tube.conversion(1 / t) == Approx((R - seed) / (1 - seed)).epsilon(1e-9));
  }
  plant.feed.c_mol_m3 = {1, 0};
  CHECK(Rated(plant, tube_of(1)).conversion(1e-3) == 0);
  const auto tank = Rated(plant, tank_of(1)).at(0.1);  // C_A = 1/(k tau) is the other state
  CHECK(tank.conversion == 0);
  REQUIRE(tank.states.size() == 2);
  CHECK(tank.states[0].stable == false);
  CHECK(tank.states[1].stable == true);
  CHECK(tank.states[1].conversion == Approx(0.9).epsilon(1e-12));
  CHECK(Rated(plant, tank_of(1)).at(2).states.size() == 1);
}

TEST_CASE("absurd feed rates give plain answers", "[vessel]") {
  const double order = GENERATE(0.0, 0.5, 1.0, 2.0);
  for (double hours : {1e-6, 1e-3, 1.0, 1e3, 1e8}) {
    const double feed = hours / 3600;
    for (const Vessel& vessel : {tank_of(1), tube_of(1), bed_of(1)}) {
      const auto outcome = Rated(power_law(order, 1e-3), vessel).at(feed);
      CHECK(outcome.conversion >= 0);
      CHECK(outcome.conversion <= 1);
      CHECK(std::isfinite(outcome.residual));
    }
  }
}
