// Heat of held vessels. Expected figures are worked out by hand from the balance of a mixed jacket,
//   Q = (T - supply)/(1/(U A) + 1/(m cp)),
// with T = 70 degC, tower water at 26 degC, 30 m3/h of 996 kg/m3 and 4.18 kJ/kg/K (34 694 W/K), U A = 380 * 14.2 = 5396
// W/K:
//   44/(1.853225e-4 + 2.882343e-5) = 205 467 W.
#include "limits/scene.hpp"
#include "support/catch.hpp"

using namespace vatwright;
using namespace vatwright::test;

TEST_CASE("heat removal of a tank against what the medium takes", "[limits][heat]") {
  Scene s;
  s.with_jacket().needs(84.2e3);
  const auto limit = s.limit("heat removal");
  CHECK(holds(limit));
  CHECK(limit->unit == "W");
  CHECK(*limit->value == 84.2e3);
  CHECK(*limit->bound == Approx(205467.4).epsilon(1e-6));
  CHECK(*limit->margin == Approx((205467.4 - 84.2e3) / 205467.4).epsilon(1e-5));
  SECTION("half the fill wets half the area") {  // U A = 2698: 44/(1/2698 + 1/34694)
    s.operation.fill = 0.425;
    CHECK(*s.limit("heat removal")->bound == Approx(44 / (1 / 2698.0 + 1 / 34694.0)).epsilon(1e-6));
  }
  SECTION("fouling in series: 1/U = 1/380 + 0.0002") {
    s.vessel.jacket->fouling_m2_K_W = 2e-4;
    const double UA = 14.2 / (1 / 380.0 + 2e-4);
    CHECK(*s.limit("heat removal")->bound == Approx(44 / (1 / UA + 1 / 34694.0)).epsilon(1e-6));
  }
  SECTION("without a flow limit: U A (T - supply)") {
    s.utilities[0].flow_m3_s.reset();
    CHECK(*s.limit("heat removal")->bound == Approx(5396 * 44.0));
  }
  SECTION("too much: the sentence says what, who and at which flow") {
    s.needs(250e3);
    CHECK(broken(s.limit("heat removal")));
    CHECK(s.limit("heat removal")->why == "heat removal: 250 kW needed, tower-water takes 205.5 kW at 30 m3/h");
  }
}

TEST_CASE("the direction that is not needed has value 0 and holds", "[limits][heat]") {
  Scene s;
  s.with_jacket().needs(84.2e3);
  CHECK(holds(s.limit("heating")));
  CHECK(*s.limit("heating")->value == 0);
  s.needs(-30e3);
  CHECK(holds(s.limit("heat removal")));
  CHECK(*s.limit("heat removal")->value == 0);
  CHECK(*s.limit("heating")->value == 30e3);
  CHECK(*s.limit("heating")->bound == Approx(5396.0 * (152 - 70)));  // condensing: at its supply temperature
}

TEST_CASE("hold takes the medium with the most room for the direction needed", "[limits][heat]") {
  Scene s;
  s.with_jacket();
  CHECK(s.needs(10e3).medium()->name == "tower-water");
  CHECK(s.needs(-10e3).medium()->name == "low-steam");
  Utility brine = tower_water();
  brine.name = "brine";
  brine.supply_K = 263.15;
  s.utilities.push_back(brine);
  s.vessel.jacket->utilities.emplace_back("brine");
  CHECK(s.needs(10e3).medium()->name == "brine");
  s.operation.utility = "tower-water";
  CHECK(s.medium()->name == "tower-water");
  s.operation.utility = "hot-oil";
  CHECK(s.medium() == nullptr);
  CHECK(lacking_utility(s.vessel, s.operation) == "hot-oil is asked for, the jacket has not got it");
  CHECK(broken(s.limit("heat removal")));
  s.operation.utility.reset();
  s.operation.thermal = Thermal::jacketed;
  CHECK(s.medium()->name == "tower-water");  // the first listed
  s.operation.thermal = Thermal::adiabatic;
  CHECK(s.medium() == nullptr);
  CHECK_FALSE(s.limit("heat removal"));
}

TEST_CASE("a held vessel without a jacket has no capacity, but a need below 1 W is none", "[limits][heat]") {
  Scene s;
  s.needs(84.2e3);
  CHECK(broken(s.limit("heat removal")));
  CHECK(*s.limit("heat removal")->bound == 0);
  CHECK(*s.limit("heat removal")->margin == -84.2e3);  // scale 1 where the bound is 0
  CHECK(s.limit("heat removal")->why == "heat removal: 84.2 kW needed, there is no jacket");
  CHECK(holds(s.needs(0.9).limit("heat removal")));
  CHECK(broken(s.needs(1.1).limit("heat removal")));
  CHECK(holds(s.needs(-0.9).limit("heating")));
}

TEST_CASE("heat not asked, and heat not known", "[limits][heat]") {
  Scene s;
  s.with_jacket();
  CHECK(untold(s.limit("heat removal")));  // no figure in the outcome
  s.chemistry = liquid(std::nullopt);
  CHECK_FALSE(s.limit("heat removal"));
  CHECK_FALSE(s.limit("heating"));
  s.chemistry = liquid();
  s.chemistry.feed.heat_capacity_J_kg_K.reset();
  CHECK(untold(s.limit("heat removal")));
  CHECK(untold(s.limit("heating")));
  CHECK_FALSE(s.limit("heating")->search_margin);
}

TEST_CASE("a medium that can not serve says why", "[limits][heat]") {
  Scene s;
  s.with_jacket().needs(10e3);
  s.vessel.jacket->utilities = {"low-steam"};
  CHECK(*s.limit("heat removal")->bound == 0);
  CHECK(s.limit("heat removal")->why ==
        "heat removal: 10 kW needed, low-steam at 152 degC can not cool a vessel at 70 degC");
}

TEST_CASE("a held tube must cope at its worst place, medium at supply", "[limits][heat]") {
  Scene s;
  s.as_tube();
  s.outcome.heat = HeatNeed{.cooling_W = 40e3, .most_flux_W_m2 = 26e3};
  const auto limit = s.limit("heat removal");
  CHECK(holds(limit));
  CHECK(limit->unit == "W/m2");
  CHECK(*limit->value == 26e3);
  CHECK(*limit->bound == Approx(650 * 44.0));
  s.outcome.heat->most_flux_W_m2 = 30e3;
  CHECK(broken(s.limit("heat removal")));
  CHECK_FALSE(s.limit("heating")->search_margin);  // nowhere needed: it bounds no window
}

TEST_CASE("least draw of a tank carries just the heat", "[limits][draw]") {
  Scene s;
  s.with_jacket().needs(84.2e3);
  const auto draw = least_draw(s.vessel, s.operation, s.utilities[0], s.outcome);
  REQUIRE(draw);
  CHECK(44 / (1 / 5396.0 + 1 / (*draw * 996 * 4180)) == Approx(84.2e3).epsilon(1e-12));
  CHECK_FALSE(
      least_draw(s.vessel, s.operation, s.utilities[0], s.needs(5396 * 44.0).outcome));  // would take an endless flow
  CHECK(*least_draw(s.vessel, s.operation, s.utilities[0], s.needs(0).outcome) == 0);
  CHECK(*least_draw(s.vessel, s.operation, s.utilities[1], s.needs(-1e4).outcome) == 0);  // condensing
}

TEST_CASE("least draw of a tube: warmed up, the medium still copes at the worst place", "[limits][draw]") {
  Scene s;
  s.as_tube();
  s.outcome.heat = HeatNeed{.cooling_W = 12e3, .most_flux_W_m2 = 5000};
  const auto draw = least_draw(s.vessel, s.operation, s.utilities[0], s.outcome);
  REQUIRE(draw);
  // by hand: 44 - 5000/650 = 36.3077 K to warm up, 12 000/36.3077 = 330.508 W/K, over 996 * 4180
  CHECK(*draw == Approx(7.93868e-5).epsilon(1e-5));
  s.outcome.heat->most_flux_W_m2 = 650 * 44.0;
  CHECK_FALSE(least_draw(s.vessel, s.operation, s.utilities[0], s.outcome));
}

TEST_CASE("utility total", "[limits][draw]") {
  Scene s;
  s.with_jacket().needs(84.2e3);
  const double draw = *least_draw(s.vessel, s.operation, s.utilities[0], s.outcome);
  SECTION("asked only where a total is given") { CHECK_FALSE(s.limit("utility total")); }
  SECTION("against the total") {
    s.utilities[0].total_m3_s = 2 * draw;
    CHECK(*s.limit("utility total")->margin == Approx(0.5));
    s.utilities[0].total_m3_s = draw / 2;
    CHECK(broken(s.limit("utility total")));
    s.needs(400e3);
    CHECK(broken(s.limit("utility total")));  // no flow does
    CHECK_FALSE(s.limit("utility total")->value);
  }
  SECTION("of a tube also against the flow that one vessel can draw") {
    Scene tube;
    tube.as_tube();
    tube.outcome.heat = HeatNeed{.cooling_W = 12e3, .most_flux_W_m2 = 5000};
    CHECK(*tube.limit("utility total")->bound == Approx(30.0 / 3600));
    tube.utilities[0].total_m3_s = 20.0 / 3600;
    CHECK(*tube.limit("utility total")->bound == Approx(20.0 / 3600));
    tube.stands = Stands::in_hookup;
    CHECK(*tube.limit("utility total")->bound == Approx(30.0 / 3600));
  }
  SECTION("in a hookup the draws are summed, and the tightest medium is shown") {
    Utility water = tower_water(), brine = tower_water();
    water.total_m3_s = 1e-2;
    brine.name = "brine";
    brine.total_m3_s = 1e-3;
    CHECK_FALSE(check_utility_totals({}));
    const auto one = check_utility_totals({{&water, 4e-3}, {&brine, 2e-4}, {&water, 3e-3}});
    REQUIRE(one);
    CHECK(*one->value == Approx(7e-3));
    CHECK(*one->margin == Approx(0.3));
    CHECK(broken(check_utility_totals({{&water, 4e-3}, {&brine, 2e-3}})));
    CHECK(untold(check_utility_totals({{&water, std::nullopt, false}})));
    CHECK(broken(check_utility_totals({{&water, std::nullopt, true}, {&water, 1e-3}})));
  }
}

TEST_CASE("the margin for the search runs smoothly through the turn from cooling to heating", "[limits][heat]") {
  Scene s;
  s.with_jacket();
  s.vessel.jacket->utilities = {"tower-water"};
  const auto search = [&](double Q) { return *s.needs(Q).limit("heating")->search_margin; };
  CHECK(search(1e3) == Approx(1e3));
  CHECK(search(1.0) == Approx(1.0));
  CHECK(search(-1.0) == Approx(-1.0));
  CHECK(holds(s.needs(0).limit("heating")));
  CHECK(broken(s.needs(-1).limit("heating")));
}
