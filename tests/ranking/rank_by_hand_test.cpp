// Every hookup of three first-order vessels, written out and optimised here by itself: what each leaves of A at a feed
// rate is 1/(1 + V/v) for a tank and exp(-V/v) for a tube (closed forms), whatever its inlet concentration, so a split
// that is best at its joint is best at the end.
#include <algorithm>
#include <cmath>
#include <functional>

#include "hookup/site.hpp"
#include "support/catch.hpp"
#include "vatwright/ranking/rank.hpp"

using namespace vatwright;
using namespace vatwright::test;

namespace {

using Left = std::function<double(double feed_m3_s)>;  // share of A that is left

Left tank_leaves(double V) {
  return [V](double v) { return v > 0 ? 1 / (1 + V / v) : 0; };
}
Left tube_leaves(double V) {
  return [V](double v) { return v > 0 ? std::exp(-V / v) : 0; };
}
Left then(Left a, Left b) {
  return [a, b](double v) { return a(v) * b(v); };
}
/// The least of f in 0 .. 1: a grid, then golden sections around its lowest place.
double least(const std::function<double(double)>& f) {
  constexpr int n = 24;
  int at = 0;
  for (int i = 1; i <= n; ++i)
    if (f(i / double{n}) < f(at / double{n})) at = i;
  double a = std::max(0, at - 1) / double{n}, b = std::min(n, at + 1) / double{n};
  const double golden = (std::sqrt(5.0) - 1) / 2;
  double x = b - golden * (b - a), y = a + golden * (b - a), fx = f(x), fy = f(y);
  while (b - a > 1e-6) {  // the value is then known to about 1e-12
    if (fx < fy) {
      b = y, y = x, fy = fx, x = b - golden * (b - a), fx = f(x);
    } else {
      a = x, x = y, fx = fy, y = a + golden * (b - a), fy = f(y);
    }
  }
  return std::min({fx, fy, f(0), f(1)});
}
Left beside(Left a, Left b) {
  return [a, b](double v) { return least([&](double w) { return w * a(w * v) + (1 - w) * b((1 - w) * v); }); };
}

/// 3 of one vessel, 9 of two, 19 of three.
std::vector<Left> all_of(const std::vector<Left>& g) {
  std::vector<Left> all = g;
  for (std::size_t i = 0; i < 3; ++i) {
    for (std::size_t j = 0; j < 3; ++j) {
      if (i == j) continue;
      const std::size_t k = 3 - i - j;
      all.push_back(then(g[i], g[j]));
      all.push_back(then(then(g[i], g[j]), g[k]));
      all.push_back(beside(then(g[i], g[j]), g[k]));
      if (i > j) continue;  // a pair beside each other is the same either way round
      all.push_back(beside(g[i], g[j]));
      all.push_back(then(beside(g[i], g[j]), g[k]));
      all.push_back(then(g[k], beside(g[i], g[j])));
    }
  }
  all.push_back(beside(beside(g[0], g[1]), g[2]));
  return all;
}

/// Feed rate at which 1 - X is left; what is left grows with the feed rate.
double ceiling(const Left& left, double X) {
  double lo = 1e-4, hi = 1e3;
  while (hi / lo > 1 + 1e-10) (left(std::sqrt(lo * hi)) < 1 - X ? lo : hi) = std::sqrt(lo * hi);
  return lo;
}

/// Values of every labelled hookup that was rated, falling.
std::vector<double> told(const Problem& problem, By by) {
  RankOptions options;
  options.by = by;
  options.top = 100;
  std::vector<double> values;
  for (const Ranked& line : rank(problem, {0, 1, 2}, options).top)
    values.insert(values.end(), 1 + line.same_as.size(), line.value.value_or(-1));
  std::sort(values.rbegin(), values.rend());
  return values;
}

}  // namespace

TEST_CASE("ranking three first-order vessels by hand", "[rank]") {
  struct Case {
    std::vector<Vessel> vessels;
    std::vector<Left> leaves;
  };
  const std::vector<Case> cases = {
      {{tank("A", 0.7), tank("B", 1.6), tube("C", 0.9)}, {tank_leaves(0.7), tank_leaves(1.6), tube_leaves(0.9)}},
      {{tank("A", 1.2), tube("B", 0.4), tube("C", 0.75)}, {tank_leaves(1.2), tube_leaves(0.4), tube_leaves(0.75)}},
      {{tank("A", 1), tank("B", 1), tank("C", 2.5)}, {tank_leaves(1), tank_leaves(1), tank_leaves(2.5)}},
  };
  for (const Case& c : cases) {
    const Problem problem = power_law(c.vessels, 1, 0.7);
    const std::vector<Left> all = all_of(c.leaves);
    REQUIRE(all.size() == 3 + 9 + 19);
    std::vector<double> X, v;
    for (const Left& left : all) {
      X.push_back(1 - left(1));
      v.push_back(ceiling(left, 0.7));
    }
    std::sort(X.rbegin(), X.rend());
    std::sort(v.rbegin(), v.rend());
    const std::vector<double> X_told = told(problem, By::conversion), v_told = told(problem, By::ceiling);
    REQUIRE(X_told.size() == all.size());
    REQUIRE(v_told.size() == all.size());
    for (std::size_t i = 0; i < all.size(); ++i) {
      INFO("place " << i + 1);
      CHECK(X_told[i] == Approx(X[i]).margin(1e-7).epsilon(0));
      CHECK(v_told[i] == Approx(v[i]).epsilon(1e-7));
    }
  }
}

TEST_CASE("a ranking that is stopped tells what it has, as partly", "[rank]") {
  const Problem problem = power_law({tank("K-1", 1), tank("K-2", 2), tube("P-1", 0.5)}, 1, 0.4);
  RankOptions options;
  options.visit = true;
  options.threads = 1;
  int asked = 0;
  options.stopped = [&asked] { return ++asked > 5; };
  const Ranking ranking = rank(problem, {0, 1, 2}, options);
  CHECK(ranking.complete == "partly");
  CHECK(ranking.rated == 5);
  CHECK(ranking.why_partly.find("stopped after 5 of") == 0);
  CHECK(ranking.top.size() == 5);
}
