// Windows of margins whose zeros are known: expected ends are those zeros.
#include <cmath>

#include "support/catch.hpp"
#include "vatwright/rating/rating.hpp"

using namespace vatwright;

namespace {
using Margins = std::vector<std::pair<std::string, std::optional<double>>>;

Windows windows_of(const std::function<Margins(double)>& margins, double lo = 1e-6, double hi = 1e6) {
  return find_windows(
      [&](double v) {
        Trial t;
        t.margins = margins(v);
        return t;
      },
      lo, hi);
}
}  // namespace

TEST_CASE("one margin that falls: a ceiling, no floor", "[windows]") {
  const auto w = windows_of([](double v) { return Margins{{"target", 3.0 - v}}; });
  REQUIRE(w.intervals.size() == 1);
  CHECK_FALSE(w.intervals[0].lo);
  CHECK(*w.intervals[0].hi == Approx(3.0).epsilon(1e-9));
  CHECK(*w.intervals[0].hi <= 3.0 * (1 + 1e-15));  // the inside end
  CHECK(w.ceiling_m3_s == w.intervals[0].hi);
  CHECK_FALSE(w.floor_m3_s);
  CHECK(*w.ends.ceiling == "target");
  CHECK_FALSE(w.ends.floor);
  CHECK(w.trials < 150);  // 97 samples, about 15 for the end
}

TEST_CASE("a floor and a ceiling of different names", "[windows]") {
  const auto w = windows_of([](double v) {
    return Margins{{"target", (5.0 - v) / 5}, {"temperature rating", (v - 0.02) / 400}, {"feed line", (40 - v) / 40}};
  });
  REQUIRE(w.intervals.size() == 1);
  CHECK(*w.floor_m3_s == Approx(0.02).epsilon(1e-9));
  CHECK(*w.ceiling_m3_s == Approx(5.0).epsilon(1e-9));
  CHECK(*w.ends.floor == "temperature rating");
  CHECK(*w.ends.ceiling == "target");
}

TEST_CASE("several intervals rise, and the ends belong to the uppermost", "[windows]") {
  const auto w = windows_of([](double v) {
    const double x = std::log10(v);  // inside between 10^-3 .. 10^-1 and 10^1 .. 10^2
    return Margins{{"target", -(x + 3) * (x + 1) * (x - 1) * (x - 2) / 100}};
  });
  REQUIRE(w.intervals.size() == 2);
  CHECK(*w.intervals[0].lo == Approx(1e-3).epsilon(1e-9));
  CHECK(*w.intervals[0].hi == Approx(1e-1).epsilon(1e-9));
  CHECK(*w.floor_m3_s == Approx(10).epsilon(1e-9));
  CHECK(*w.ceiling_m3_s == Approx(100).epsilon(1e-9));
}

TEST_CASE("a window far narrower than the samples is found", "[windows]") {
  for (const double centre : {0.37, 1.0, 5.11, 777.0}) {
    const auto w = windows_of([&](double v) {
      const double x = std::log(v / centre);
      return Margins{{"target", 1e-6 - x * x}};  // half-width 1e-3 in ln v
    });
    INFO(centre);
    REQUIRE(w.intervals.size() == 1);
    CHECK(*w.floor_m3_s == Approx(centre * std::exp(-1e-3)).epsilon(1e-9));
    CHECK(*w.ceiling_m3_s == Approx(centre * std::exp(1e-3)).epsilon(1e-9));
  }
}

TEST_CASE("two limits that leave a slit between them", "[windows]") {
  const auto w = windows_of([](double v) { return Margins{{"heating", v / 2 - 1}, {"heat removal", 1 - v / 2.001}}; });
  REQUIRE(w.intervals.size() == 1);
  CHECK(*w.floor_m3_s == Approx(2.0).epsilon(1e-9));
  CHECK(*w.ceiling_m3_s == Approx(2.001).epsilon(1e-9));
  CHECK(*w.ends.floor == "heating");
  CHECK(*w.ends.ceiling == "heat removal");
}

TEST_CASE("a gap far narrower than the samples is found", "[windows]") {
  const auto w = windows_of([](double v) {
    const double x = std::log(v / 3.3);
    return Margins{{"target", x * x - 1e-6}};
  });
  REQUIRE(w.intervals.size() == 2);
  CHECK(*w.intervals[0].hi == Approx(3.3 * std::exp(-1e-3)).epsilon(1e-9));
  CHECK(*w.intervals[1].lo == Approx(3.3 * std::exp(1e-3)).epsilon(1e-9));
}

TEST_CASE("a margin that rests on zero hides no gap and moves no end", "[windows]") {
  const double least = std::exp(1.01), most = std::exp(1.05);  // zeros of the target, far nearer than two samples
  const auto w = windows_of([&](double v) {
    const double x = std::log(v);
    return Margins{{"target", (7 - x) / 7}, {"fill", 0.0}, {"heat removal", (x - 1.01) * (x - 1.05)}};
  });
  REQUIRE(w.intervals.size() == 2);
  CHECK(*w.intervals[0].hi == Approx(least).epsilon(1e-9));
  CHECK(*w.intervals[1].lo == Approx(most).epsilon(1e-9));
  CHECK(*w.ceiling_m3_s == Approx(std::exp(7.0)).epsilon(1e-9));
}

TEST_CASE("a margin that leaves zero as a square ends where it leaves", "[windows]") {
  // order 1/2 in a tube: 1 - X = (1 - v1/v)^2 above the rate v1 at which all is used up (closed form)
  const auto w = windows_of([](double v) {
    const double left = v > 2 ? 1 - 2 / v : 0;
    return Margins{{"target", -left * left}};
  });
  REQUIRE(w.ceiling_m3_s);
  CHECK(*w.ceiling_m3_s == Approx(2).epsilon(2e-7));
  CHECK(*w.ends.ceiling == "target");
}

TEST_CASE("a jump is an end, and the end given out is inside", "[windows]") {
  const auto w = windows_of([](double v) { return Margins{{"target", v < 0.7 ? 0.05 : -0.4}}; });
  REQUIRE(w.intervals.size() == 1);
  CHECK(*w.ceiling_m3_s == Approx(0.7).epsilon(1e-9));
  CHECK(*w.ceiling_m3_s < 0.7);
  const auto x = windows_of([](double v) { return Margins{{"target", v < 0.7 ? -0.05 : 0.4}}; });
  CHECK(*x.floor_m3_s >= 0.7);
}

TEST_CASE("all inside: no ends; all outside: no window", "[windows]") {
  const auto all = windows_of([](double) { return Margins{{"target", 0.2}}; });
  REQUIRE(all.intervals.size() == 1);
  CHECK_FALSE((all.intervals[0].lo || all.intervals[0].hi || all.ceiling_m3_s || all.ends.ceiling));
  const auto none = windows_of([](double) { return Margins{{"target", 0.2}, {"wetted material", -1.0}}; });
  CHECK(none.intervals.empty());
  CHECK_FALSE((none.ceiling_m3_s || none.floor_m3_s || none.ends.ceiling || none.ends.floor));
  CHECK(none.why.empty());
}

TEST_CASE("a margin that can not be told does not narrow; one that rests on zero holds", "[windows]") {
  const auto w = windows_of([](double v) {
    return Margins{{"target", 3.0 - v}, {"pressure drop", std::nullopt}, {"product temperature", -3e-16}};
  });
  REQUIRE(w.intervals.size() == 1);
  CHECK(*w.ceiling_m3_s == Approx(3.0).epsilon(1e-6));
  CHECK(*w.ends.ceiling == "target");
}

TEST_CASE("two ends at one rate: the target is named, then the order of the limits", "[windows]") {
  const auto w = windows_of([](double v) {
    return Margins{
        {"target", 1 - v * (1 - 5e-7)}, {"heat removal", 2 - 2 * v}, {"feed line", (1 - v * (1 + 1e-7)) * 10}};
  });
  CHECK(*w.ceiling_m3_s == Approx(1.0).epsilon(2e-7));
  CHECK(*w.ends.ceiling == "target");
  const auto x = windows_of([](double v) {
    return Margins{
        {"target", 1 - v * (1 - 5e-6)}, {"heat removal", 2 - 2 * v}, {"feed line", (1 - v * (1 + 1e-7)) * 10}};
  });
  CHECK(*x.ends.ceiling == "heat removal");
}

TEST_CASE("trials that fail bound the window, by a limit's name or with the reason", "[windows]") {
  const auto failing = [](const std::string& by, const std::string& why, bool unsolved) {
    return find_windows(
        [=](double v) {
          Trial t;
          t.fails = v > 2;
          if (t.fails) t.fails_by = by, t.fails_why = why, t.unsolved = unsolved;
          if (!t.fails) t.margins = {{"target", 0.3}};
          return t;
        },
        1e-3, 1e3);
  };
  const auto passes = failing("pressure drop", "", false);
  CHECK(*passes.ceiling_m3_s == Approx(2.0).epsilon(1e-9));
  CHECK(*passes.ends.ceiling == "pressure drop");
  CHECK(passes.why.empty());
  const auto untold = failing("", "conversion beyond the rate table", false);
  CHECK(*untold.ceiling_m3_s == Approx(2.0).epsilon(1e-9));
  CHECK_FALSE(untold.ends.ceiling);
  CHECK(untold.why.find("beyond the rate table") != std::string::npos);
  CHECK_FALSE(untold.unsolved);
  CHECK(failing("", "no root", true).unsolved);
}

TEST_CASE("the range searched: 1e-6 to 1e8 times the volume in one hour", "[windows]") {
  const auto [lo, hi] = search_range(3.6);
  CHECK(lo == Approx(1e-9).epsilon(1e-14));
  CHECK(hi == Approx(1e5).epsilon(1e-14));
}

TEST_CASE("a window that opens at a jump between two samples is found, and the jump is told", "[windows]") {
  // below 2.003 the state is cold (-0.5); there it ignites, and falls to miss the target at 2.05: far narrower than
  // samples
  const auto w = windows_of([](double v) { return Margins{{"target", v < 2.003 ? -0.5 : 2.05 - v}}; });
  REQUIRE(w.intervals.size() == 1);
  CHECK(*w.floor_m3_s == Approx(2.003).epsilon(1e-9));
  CHECK(*w.ceiling_m3_s == Approx(2.05).epsilon(1e-9));
  REQUIRE(w.jumps_m3_s.size() == 1);
  CHECK(w.jumps_m3_s[0] == Approx(2.003).epsilon(1e-9));
  REQUIRE(caution_window_at_fold(w));
  CHECK(caution_window_at_fold(w)->id == "near-fold");
  CHECK_FALSE(caution_window_at_fold(windows_of([](double v) { return Margins{{"target", 3.0 - v}}; })));
}
