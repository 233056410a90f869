#include <cmath>

#include "support/catch.hpp"
#include "vatwright/hookup/share_space.hpp"
#include "vatwright/hookup/tune.hpp"

#include "site.hpp"

using namespace vatwright;
using namespace vatwright::test;

TEST_CASE("one share: the higher of two peaks, also at an end", "[tune]") {
  const auto two = [](std::span<const double> x) -> std::optional<double> {
    return std::exp(-200 * std::pow(x[0] - 0.23, 2)) + 1.1 * std::exp(-300 * std::pow(x[0] - 0.81, 2));
  };
  const auto best = tune_free(two, {0.3});
  REQUIRE(best);
  CHECK(best->x[0] == Approx(0.81).margin(1e-6));
  const auto falls = [](std::span<const double> x) -> std::optional<double> { return -x[0]; };
  CHECK(tune_free(falls, {0.5})->x[0] == 0);
  const auto none = [](std::span<const double>) -> std::optional<double> { return std::nullopt; };
  CHECK_FALSE(tune_free(none, {0.5}));
}

TEST_CASE("several shares: a bent ridge is climbed to its top", "[tune]") {
  const auto bent = [](std::span<const double> x) -> std::optional<double> {
    const double u = x[0] - 0.4, v = x[1] - 0.6 - u * u;
    return 1 - u * u - 20 * v * v;
  };
  const auto best = tune_free(bent, {0.9, 0.1});
  REQUIRE(best);
  CHECK(best->score.objective == Approx(1).margin(1e-9));
  const auto three = [](std::span<const double> x) -> std::optional<double> {
    return -std::pow(x[0] - 0.2, 2) - std::pow(x[1] - 1, 2) - std::pow(x[2] - 0.5 * x[0], 2);
  };
  CHECK(tune_free(three, {0.5, 0.5, 0.5})->score.objective == Approx(0).margin(1e-9));
}

TEST_CASE("limits: the best of what holds lies on its border, and a short stretch is found", "[tune]") {
  const auto capped = [](std::span<const double> x) { return Score{0.3 - x[0], x[0], true}; };
  const auto border = tune_within(capped, {0.5}, {});
  REQUIRE(border);
  CHECK(border->x[0] == Approx(0.3).margin(1e-12));
  CHECK(border->score.margin >= 0);
  // Two caps that leave 1e-7 between them: 0.4321 +- 5e-8.
  const auto narrow = [](std::span<const double> x) {
    return Score{std::min(x[0] - 0.43209995, 0.43210005 - x[0]), -x[0], true};
  };
  const auto found = tune_within(narrow, {0.9}, {});
  REQUIRE(found);
  CHECK(found->score.margin >= 0);
  CHECK(found->x[0] == Approx(0.43209995).margin(1e-12));
  const auto never = [](std::span<const double> x) { return Score{-1 - std::abs(x[0] - 0.7), 0, true}; };
  CHECK(tune_within(never, {0.5}, {})->x[0] == Approx(0.7).margin(1e-6));
}

TEST_CASE("coordinates give shares that add to one, the fixed ones kept", "[tune]") {
  Site site;
  for (const char* tag : {"A", "B", "C", "D", "E"}) site.vessels.push_back(tank(tag, 1));
  const Hookup h = parsed("[40% A beside B beside C] then [D beside E]", site);
  const ShareSpace space(h, {1, 2, 4, 3, 1});
  REQUIRE(space.dimensions() == 2);
  const auto s = space.shares(space.in_proportion());
  CHECK(s[0] == 0.4);
  CHECK(s[0] + s[1] + s[2] == Approx(1).margin(1e-15));
  CHECK(s[1] == Approx(0.2).margin(1e-4));  // 2 of 6 of what is left, but for the least share
  CHECK(s[3] == Approx(0.75).margin(1e-4));
  for (const double end : {0.0, 1.0}) {
    for (const double share : space.shares(std::vector<double>{end, end})) CHECK(share >= 0.6 * least_share);
  }
  CHECK(space.at_edge(space.shares(std::vector<double>{0, 0.5}), 0.02));
  CHECK_FALSE(space.at_edge(s, 0.02));
}
