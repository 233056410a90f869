#include <cmath>
#include <numbers>

#include "rating/problem.hpp"
#include "support/catch.hpp"

using namespace vatwright;
using namespace vatwright::test;

TEST_CASE("ceiling of a tank, first order: v = V k (1 - X)/X", "[rating]") {
  // the balance of one tank solved for the flow (Levenspiel, Chemical Reaction Engineering, 3rd ed. 1999, ch. 5)
  const Problem p = first_order_problem(2e-4, 0.9, 1e-5);
  const Vessel v = tank(6.3);
  const Rating r = rate(p, v);
  CHECK(r.verdict == Verdict::fits);
  CHECK(r.stands_in_the_way.empty());
  CHECK(*r.conversion == Approx(1 - 1 / (1 + 2e-4 * 6.3 / 1e-5)).epsilon(1e-9));
  REQUIRE(r.windows);
  REQUIRE(r.windows->intervals.size() == 1);
  CHECK(*r.windows->ceiling_m3_s == Approx(6.3 * 2e-4 * 0.1 / 0.9).epsilon(1e-7));
  CHECK_FALSE(r.windows->floor_m3_s);
  CHECK(*r.windows->ends.ceiling == "target");
  CHECK(r.windows->trials < 200);
  CHECK_FALSE((r.cooling_W || r.preheat_W || r.medium));  // no reaction has a heat

  Problem again = p;
  again.duty.target.feed_m3_s = *r.windows->ceiling_m3_s;
  CHECK(rate(again, v, {.windows = false}).verdict == Verdict::fits);
  again.duty.target.feed_m3_s *= 1 + 1e-6;
  const Rating beyond = rate(again, v, {.windows = false});
  CHECK(beyond.verdict == Verdict::does_not_fit);
  REQUIRE(beyond.stands_in_the_way.size() == 1);
  CHECK(beyond.stands_in_the_way[0].find("conversion of A") == 0);
}

TEST_CASE("ceiling of a tube, first order: v = -V k/ln(1 - X)", "[rating]") {
  // the balance of a tube solved for the flow (Levenspiel, as above)
  const double V = std::numbers::pi / 4 * 0.0525 * 0.0525 * 96;
  const Problem p = first_order_problem(2e-3, 0.95, 1e-3);
  const Rating r = rate(p, tube(0.0525, 96));
  CHECK(*r.windows->ceiling_m3_s == Approx(-V * 2e-3 / std::log(0.05)).epsilon(1e-7));
  CHECK(r.verdict == Verdict::does_not_fit);
  REQUIRE(r.stands_in_the_way.size() == 1);
  CHECK(r.stands_in_the_way[0].find(", wanted 95 %") != std::string::npos);
}

TEST_CASE("the feed line is the ceiling where the target would allow more", "[rating]") {
  const Problem p = first_order_problem(2e-4, 0.5, 1e-4);
  Vessel v = tank(6.3);
  v.feed_line_m3_s = 3e-4;
  const Rating r = rate(p, v);
  CHECK(*r.windows->ceiling_m3_s == Approx(3e-4).epsilon(1e-9));
  CHECK(*r.windows->ends.ceiling == "feed line");
}

TEST_CASE("van de Vusse in a tank: one yield at two feed rates, the window between them", "[rating]") {
  // k1 = 5/6, k2 = 5/3 1/min, k3 = 1/6 L/mol/min, 10 mol/L: B. W. Bequette, Process Control, 2003, van de Vusse module
  // (from memory: C_B = 1.117 at v/V = 0.5714 1/min, greatest C_B 1.266 at 1.292 1/min); the second rate, 2.8744 1/min,
  // from the same balance, C_B = k1 C_A/(v/V + k2) with v/V (10 - C_A) = k1 C_A + k3 C_A^2.
  Problem p;
  p.duty.chemistry = liquid_of({"A", "B", "C", "D"}, {10000, 0, 0, 0},
                               {power_law("A -> B", {{0, -1}, {1, 1}}, 5.0 / 6 / 60, {{0, 1}}),
                                power_law("B -> C", {{1, -1}, {2, 1}}, 5.0 / 3 / 60, {{1, 1}}),
                                power_law("2 A -> D", {{0, -2}, {3, 1}}, 1.0 / 6 / 60 / 1000, {{0, 2}}, 2)});
  p.duty.conversion_of = "A";
  p.duty.hold_K = 333.15;
  p.duty.target.feed_m3_s = 1.292 / 60;
  const double C_A = 3, C_B = 5.0 / 6 * 3 / (4.0 / 7 + 5.0 / 3);  // v/V = 4/7: (10 - 3) 4/7 = 2.5 + 1.5
  CHECK(C_B == Approx(1.117).margin(5e-4));
  CHECK(4.0 / 7 * (10 - C_A) == Approx(5.0 / 6 * C_A + C_A * C_A / 6));
  p.duty.target.demands = {Demand{Demand::On::yield, 1, C_B / 10, true}};
  const Vessel v = tank(1.0);
  const Rating r = rate(p, v);
  CHECK(r.verdict == Verdict::fits);
  REQUIRE(r.yields.size() == 3);
  CHECK(*r.yields[0].second == Approx(0.1265986).epsilon(1e-5));  // the peak is flat: 1.292 is near enough
  REQUIRE(r.windows);
  REQUIRE(r.windows->intervals.size() == 1);
  CHECK(*r.windows->floor_m3_s * 60 == Approx(4.0 / 7).epsilon(1e-6));
  CHECK(*r.windows->ceiling_m3_s * 60 == Approx(2.8744).epsilon(2e-5));
  CHECK(*r.windows->ends.floor == "target");

  SECTION("a demand just under the peak leaves a narrow window, one above it none") {
    p.duty.target.demands[0].bound = 0.12659;
    const auto narrow = rate(p, v).windows;
    REQUIRE(narrow->intervals.size() == 1);
    CHECK(*narrow->floor_m3_s * 60 < 1.292);
    CHECK(*narrow->ceiling_m3_s * 60 > 1.292);
    p.duty.target.demands[0].bound = 0.1267;
    CHECK(rate(p, v).windows->intervals.empty());
  }
}

TEST_CASE("a held tank gives off what it must: by hand", "[rating]") {
  // 1e-4 m3/s, X = 0.9: 1000 * 0.9 * 60 kJ = 54 MJ/m3 released; feed from 25 to 60 degC takes 35 * 4 MJ/m3 = 140 MJ/m3:
  // heated, (140 - 54) MJ/m3 * 1e-4 m3/s = 8.6 kW
  Problem p = first_order_problem(9e-4 / 1.0, 0.5, 1e-4);
  auto reaction = power_law("A -> B", {{0, -1}, {1, 1}}, 9e-4, {{0, 1}});
  reaction.heat = HeatOfReaction{-60e3, 298.15, {}};
  p.duty.chemistry = liquid_of({"A", "B"}, {1000, 0}, {reaction});
  p.duty.chemistry.feed.temperature_K = 298.15;
  const Rating r = rate(p, tank(1.0), {.windows = false});
  CHECK(*r.conversion == Approx(0.9).epsilon(1e-9));
  CHECK(*r.cooling_W == Approx(-8600.0).epsilon(1e-6));
  CHECK(r.verdict == Verdict::does_not_fit);
  REQUIRE(r.stands_in_the_way.size() == 1);
  CHECK(r.stands_in_the_way[0] == "heating: 8.6 kW needed, there is no jacket");
}

TEST_CASE("what the vessel can not be asked is cannot-tell, but a broken limit still speaks", "[rating]") {
  Problem p = first_order_problem(2e-4, 0.9, 1e-5);
  auto law = std::get<RateLaw>(p.duty.chemistry.kinetics.reaction(0).forward);
  auto reaction = p.duty.chemistry.kinetics.reaction(0);
  law.per = Per::bed;
  reaction.forward = law;
  p.duty.chemistry.kinetics = Kinetics({reaction}, 2, 0, 1000);
  const Rating r = rate(p, tank(6.3));
  CHECK(r.verdict == Verdict::cannot_tell);
  CHECK_FALSE((r.conversion || r.outlet || r.windows || r.residual));
  CHECK_FALSE(r.unsolved);
  CHECK(r.stands_in_the_way.size() == 1);
  p.duty.limits.wetted = {"glass"};
  Vessel v = tank(6.3);
  v.wetted = {"316L"};
  const Rating s = rate(p, v);
  CHECK(s.verdict == Verdict::does_not_fit);
  CHECK(s.stands_in_the_way.size() == 2);
}

TEST_CASE("a utility that the vessel has not got does not fit", "[rating]") {
  Problem p = first_order_problem(2e-4, 0.9, 1e-5);
  p.duty.operation.utility = "brine";
  const Rating r = rate(p, tank(6.3));
  CHECK(r.verdict == Verdict::does_not_fit);
  CHECK(r.stands_in_the_way == std::vector<std::string>{"utility: brine is asked for, there is no jacket"});
  CHECK(r.windows->intervals.empty());
}

TEST_CASE("outcomes without an answer", "[rating]") {
  const Problem p = first_order_problem(2e-4, 0.9, 1e-5);
  const Vessel v = tube(0.05, 10);
  const Operation operation = operation_of(p.duty, v);
  const VesselPlace place{p, v, operation, 1e-5};
  const Judged used_up = judge(place, NoAnswer{NoAnswer::Kind::does_not_pass, "the pressure is used up after 3 m"});
  const Finding finding = find_verdict({{{}, &used_up}}, {}, {});
  CHECK(finding.verdict == Verdict::does_not_fit);
  CHECK(finding.stands_in_the_way == std::vector<std::string>{"pressure drop: the pressure is used up after 3 m"});
  CHECK(trial_of({{"P-1", &used_up}}, {}, {}).fails_by == "P-1: pressure drop");

  const Judged lost = judge(place, NoAnswer{NoAnswer::Kind::unsolved, "no sign change found"});
  CHECK(find_verdict({{"P-1", &lost}}, {}, {}).verdict == Verdict::cannot_tell);
  CHECK(find_verdict({{"P-1", &lost}}, {}, {}).unsolved);
  CHECK(find_verdict({{"P-1", &lost}}, {}, {}).stands_in_the_way[0] == "P-1: no sign change found");
}

TEST_CASE("a cycle has no figures", "[rating]") {
  const Problem p = first_order_problem(2e-4, 0.9, 1e-5);
  const Vessel v = tank(6.3);
  const Operation operation = operation_of(p.duty, v);
  const VesselPlace place{p, v, operation, 1e-5};
  VesselOutcome o;
  o.cycle = true;
  o.outlet.xi_mol_m3 = {0};
  const Judged judged = judge(place, o);
  CHECK_FALSE(judged.figures);
  CHECK(find_verdict({{{}, &judged}}, {}, {}).verdict == Verdict::does_not_fit);
  Rating rating;
  tell_vessel(rating, place, judged, &o);
  CHECK_FALSE((rating.conversion || rating.outlet || rating.hottest_K));
  CHECK(rating.steady_states);
}

TEST_CASE("target items", "[rating]") {
  Problem p = first_order_problem(2e-4, 0.9, 1e-5);
  p.duty.target.demands = {{Demand::On::selectivity, 1, 0.9, true}, {Demand::On::concentration, 0, 100, false}};
  Stream out = whole_feed(p.duty);
  auto items = check_target(p.duty, out);
  REQUIRE(items.size() == 3);
  CHECK_FALSE(items[1].value);  // no selectivity at no conversion: missed by all of it
  CHECK(items[1].margin == -1);
  CHECK(items[2].margin == Approx(-9.0));
  out.xi_mol_m3 = {900};
  items = check_target(p.duty, out);
  CHECK(items[0].met);
  CHECK(*items[1].value == Approx(1.0));
  CHECK(items[2].met);  // 1000 - 900 = 100, just met
}

TEST_CASE("how a vessel is run: its own word before that for all", "[rating]") {
  Problem p = first_order_problem(2e-4, 0.9, 1e-5);
  Vessel v = tank(6.3);
  std::get<StirredTank>(v.kind).fill = {0.3, 0.85};
  CHECK(operation_of(p.duty, v).fill == 0.85);
  p.duty.operation.fill = 0.5;
  p.duty.operation_of["K-1"].fill = 0.6;
  p.duty.operation_of["K-1"].temperature_K = 350;
  CHECK(operation_of(p.duty, v).fill == 0.6);
  CHECK(operation_of(p.duty, v).hold_K == 350);
  CHECK(operation_of(p.duty, tank(1, "K-2")).fill == 0.5);
  p.duty.chemistry.feed.phase = Phase::gas;
  CHECK(operation_of(p.duty, v).fill == 0.85);  // all of the jacket
}
