// Start-up peak, temperature if cooling fails, runaway sensitivity, glass temperature step: figures set by hand,
// margins worked out beside each check.
#include "scene.hpp"
#include "support/catch.hpp"

using namespace vatwright;
using namespace vatwright::test;

namespace {
constexpr double C = 273.15;
}

TEST_CASE("the start-up peak counts where the temperature moves, against the lower of product and vessel", "[limits]") {
  Scene s;
  s.outcome.start_peak_K = 130 + C;
  s.product.hottest_K = 120 + C;
  CHECK_FALSE(s.limit("start-up peak"));  // held: nothing moves
  s.operation.thermal = Thermal::adiabatic;
  CHECK(broken(s.limit("start-up peak")));
  CHECK(*s.limit("start-up peak")->margin == Approx(-10));
  s.vessel.temperature_K = {250, 110 + C};
  CHECK(*s.limit("start-up peak")->bound == Approx(110 + C));
  s.product.hottest_K.reset();
  s.vessel.temperature_K.reset();
  CHECK_FALSE(s.limit("start-up peak"));  // nothing to hold it against
  s.vessel.temperature_K = {250, 140 + C};
  CHECK(holds(s.limit("start-up peak")));
  s.outcome.start_peak_K.reset();
  CHECK(untold(s.limit("start-up peak")));
}

TEST_CASE("what comes if cooling fails is held against decomposition and rating", "[limits]") {
  Scene s;
  s.with_jacket();
  s.outcome.uncooled_K = 150 + C;
  CHECK_FALSE(s.limit("temperature if cooling fails"));
  s.product.decomposition_K = 165 + C;
  CHECK(holds(s.limit("temperature if cooling fails")));
  CHECK(*s.limit("temperature if cooling fails")->margin == Approx(15));
  s.vessel.temperature_K = {250, 140 + C};
  const auto limit = s.limit("temperature if cooling fails");
  CHECK(broken(limit));
  CHECK(*limit->margin == Approx(-10));
  CHECK(limit->why.find("the vessel is rated for 140 degC") != std::string::npos);
  s.operation.thermal = Thermal::adiabatic;
  CHECK_FALSE(s.limit("temperature if cooling fails"));  // there is no cooling to fail
  s.operation.thermal = Thermal::hold;
  s.chemistry = liquid(std::nullopt);
  CHECK_FALSE(s.limit("temperature if cooling fails"));  // heat is not asked
}

TEST_CASE("a tube may not stand on more of its U than it has", "[limits]") {
  Scene s;
  s.as_tube();
  CHECK_FALSE(s.limit("runaway sensitivity"));
  s.outcome.runaway_share = 0.8;
  CHECK(holds(s.limit("runaway sensitivity")));
  CHECK(*s.limit("runaway sensitivity")->margin == Approx(0.2));
  s.outcome.runaway_share = 1.02;
  CHECK(broken(s.limit("runaway sensitivity")));
}

TEST_CASE("a glass lining bears 110 K of chill and 120 K of heat at once", "[limits]") {
  Scene s;
  s.with_jacket();
  s.operation.utility = "low-steam";  // 152 degC against 70 degC: 82 K of heat
  s.outcome.enters_K = 20 + C;        // 50 K of chill
  CHECK_FALSE(s.limit("glass temperature step"));
  s.vessel.wetted = {"316L", "Glass"};
  auto limit = s.limit("glass temperature step");
  CHECK(holds(limit));
  CHECK(*limit->value == Approx(82));
  CHECK(*limit->bound == Approx(120));
  CHECK(*limit->margin == Approx(38));
  CHECK(limit->of_difference);
  s.outcome.enters_K = -45 + C;  // 115 K of chill
  limit = s.limit("glass temperature step");
  CHECK(broken(limit));
  CHECK(*limit->value == Approx(115));
  CHECK(*limit->bound == Approx(110));
}

TEST_CASE("a cycle is judged by files and start alone", "[limits]") {
  Scene s;
  s.operation.thermal = Thermal::jacketed;
  s.with_jacket();
  s.product.hottest_K = 120 + C;
  s.product.decomposition_K = 165 + C;
  s.outcome = {};
  s.outcome.cycle = true;
  s.outcome.start_peak_K = 130 + C;
  s.outcome.uncooled_K = 150 + C;
  std::vector<std::string> names;
  for (const Limit& each : check_limits(s.input())) names.emplace_back(each.name);
  CHECK(names ==
        std::vector<std::string>{"fill", "steady state stable", "start-up peak", "temperature if cooling fails"});
  CHECK(broken(s.limit("steady state stable")));
  CHECK(broken(s.limit("start-up peak")));
  CHECK(holds(s.limit("temperature if cooling fails")));
}

TEST_CASE("several solutions of a tube, or a start on a state that is not stable, are no stable state", "[limits]") {
  Scene tube;
  tube.as_tube();
  CHECK_FALSE(tube.limit("steady state stable"));
  tube.outcome.states.resize(3);
  CHECK(untold(tube.limit("steady state stable")));
  Scene tank;
  tank.outcome.states = {{{0}, 0.5, 350, false, true}};
  CHECK(broken(tank.limit("steady state stable")));
}
