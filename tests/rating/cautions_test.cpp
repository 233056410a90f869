#include <algorithm>
#include <cctype>

#include "rating/problem.hpp"
#include "support/catch.hpp"
#include "vatwright/rating/cases.hpp"

using namespace vatwright;
using namespace vatwright::test;

namespace {
const Caution* find(const std::vector<Caution>& cautions, const std::string& id) {
  const auto at = std::find_if(cautions.begin(), cautions.end(), [&](const Caution& c) { return c.id == id; });
  return at == cautions.end() ? nullptr : &*at;
}
Windows windows(std::vector<Interval> intervals) {
  Windows w;
  w.intervals = std::move(intervals);
  return w;
}
Problem with_heat(double releases_J_mol) {
  Problem p = first_order_problem(2e-4, 0.9, 1e-5);
  auto reaction = p.duty.chemistry.kinetics.reaction(0);
  reaction.heat = HeatOfReaction{-releases_J_mol, 298.15, {}};
  p.duty.chemistry.kinetics = Kinetics({reaction}, 2, 0, 1000);
  return p;
}
}  // namespace

TEST_CASE("cautions of the whole answer", "[cautions]") {
  const auto cold = cautions_of(first_order_problem(2e-4, 0.9, 1e-5));
  CHECK(find(cold, "screening"));
  CHECK(find(cold, "old-vessel"));
  CHECK(find(cold, "materials"));
  CHECK_FALSE((find(cold, "pressure-relief") || find(cold, "decomposition-not-asked") || find(cold, "adiabatic-rise")));
  Problem pressed = first_order_problem(2e-4, 0.9, 1e-5);
  pressed.duty.inlet_pressure_Pa = 3e5;
  CHECK(find(cautions_of(pressed), "pressure-relief"));
}

TEST_CASE("adiabatic rise of the feed: (-dH) c/(rho cp)", "[cautions]") {
  // 1000 mol/m3 * 60 kJ/mol / (4 MJ/m3/K) = 15 K; four times that 60 K; fifteen times 225 K
  CHECK_FALSE(find(cautions_of(with_heat(60e3)), "adiabatic-rise"));
  const auto warm = cautions_of(with_heat(240e3));
  REQUIRE(find(warm, "adiabatic-rise"));
  CHECK(find(warm, "adiabatic-rise")->text.find("60 K") != std::string::npos);
  CHECK(find(warm, "decomposition-not-asked"));
  CHECK(find(warm, "pressure-relief"));
  const auto hot = cautions_of(with_heat(900e3));
  CHECK(find(hot, "adiabatic-rise")->text.find("225 K, more than 200 K") != std::string::npos);
  CHECK_FALSE(find(cautions_of(with_heat(-60e3)), "decomposition-not-asked"));  // takes heat up
}

TEST_CASE("no text promises anything", "[cautions]") {
  for (const Caution& c : cautions_of(with_heat(900e3))) {
    std::string text = c.text;
    std::transform(text.begin(), text.end(), text.begin(),
                   [](unsigned char x) { return static_cast<char>(std::tolower(x)); });
    for (const char* word : {"safe", "approved", "guarantee"}) CHECK(text.find(word) == std::string::npos);
  }
}

TEST_CASE("beyond what was measured, told with how far", "[cautions]") {
  Problem p = first_order_problem(2e-4, 0.5, 1e-5);
  auto reaction = p.duty.chemistry.kinetics.reaction(0);
  reaction.measured = Measured{{{303.15, 323.15}}, {{0.0, 0.9}}, "lab book 4471"};
  p.duty.chemistry.kinetics = Kinetics({reaction}, 2, 0, 1000);
  const Rating r = rate(p, tank(6.3), {.windows = false});  // held at 60 degC, conversion 0.992
  const Caution* c = find(r.cautions, "beyond-measured");
  REQUIRE(c);
  CHECK(c->text.find("60 degC here, 10 K above") != std::string::npos);
  CHECK(c->text.find("lab book 4471") != std::string::npos);
  CHECK(c->text.find("conversions 0 to 0.9") != std::string::npos);
  reaction.measured = Measured{{{303.15, 343.15}}, {{0.0, 1.0}}, ""};
  p.duty.chemistry.kinetics = Kinetics({reaction}, 2, 0, 1000);
  CHECK_FALSE(find(rate(p, tank(6.3), {.windows = false}).cautions, "beyond-measured"));
}

TEST_CASE("near a jump of the reached state", "[cautions]") {
  int calls = 0;
  const auto jump_at = [&](double at) {
    return [&calls, at](double v) -> std::optional<double> { return ++calls, v < at ? 0.9 : 0.2; };
  };
  const auto near = caution_near_fold(jump_at(1.03), 1.0);
  REQUIRE(near);
  CHECK(near->id == "near-fold");
  CHECK(near->text.find("3 %") != std::string::npos);
  CHECK(caution_near_fold(jump_at(0.97), 1.0));
  CHECK_FALSE(caution_near_fold(jump_at(1.06), 1.0));
  CHECK_FALSE(caution_near_fold([](double v) -> std::optional<double> { return 1 / (1 + v * v); }, 1.0));
  calls = 0;
  CHECK_FALSE(caution_near_fold(jump_at(5), 1.0));
  CHECK(calls == 3);
}

TEST_CASE("what nobody asked is listed once", "[cautions]") {
  Problem p = first_order_problem(2e-4, 0.9, 1e-5);
  p.site.vessels = {tank(6.3), tube(0.05, 10)};
  p.not_asked = {"spread", "decomposition"};
  const auto list = not_asked(p);
  const auto count = [&](const std::string& text) { return std::count(list.begin(), list.end(), text); };
  CHECK(count("heat") == 1);
  CHECK(count("decomposition") == 1);
  CHECK(count("spread") == 1);
  CHECK(count("wetted materials of the product") == 1);
  CHECK(count("boiling") == 1);
  CHECK(count("pressure drop of P-1") == 1);
  p.duty.limits.wetted = {"glass"};
  const auto fewer = not_asked(p);
  CHECK(std::count(fewer.begin(), fewer.end(), "wetted materials of the product") == 0);
}

TEST_CASE("base and cases together", "[cases]") {
  Rating base, winter, summer;
  base.verdict = winter.verdict = Verdict::fits;
  summer.verdict = Verdict::cannot_tell;
  base.windows = windows({{{}, 2.0}, {3.0, 5.0}});
  winter.windows = windows({{1.0, 4.0}});
  const auto two = over_cases(base, {{"winter", &winter}});
  CHECK(two.verdict == Verdict::fits);
  CHECK_FALSE(two.worst_case);
  REQUIRE(two.windows_all_cases.size() == 2);
  CHECK(*two.windows_all_cases[0].lo == 1.0);
  CHECK(*two.windows_all_cases[0].hi == 2.0);
  CHECK(*two.windows_all_cases[1].lo == 3.0);
  CHECK(*two.windows_all_cases[1].hi == 4.0);
  const auto three = over_cases(base, {{"winter", &winter}, {"summer", &summer}});
  CHECK(three.verdict == Verdict::cannot_tell);
  CHECK(*three.worst_case == "summer");
  CHECK(three.windows_all_cases.empty());  // nothing is known of its window
  base.verdict = Verdict::does_not_fit;
  CHECK_FALSE(over_cases(base, {{"summer", &summer}}).worst_case);
  base.windows = windows({Interval{}});
  const auto open = over_cases(base, {}).windows_all_cases;
  REQUIRE(open.size() == 1);
  CHECK_FALSE((open[0].lo || open[0].hi));
}
