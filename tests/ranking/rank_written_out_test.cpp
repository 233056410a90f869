// Random small sites, ranked, against every hookup written out by itself (small_plant.hpp, written_out.hpp): values to
// 1e-7, and nothing better left out.
#include <algorithm>
#include <cmath>
#include <functional>
#include <tuple>

#include "small_site.hpp"
#include "support/catch.hpp"
#include "vatwright/ranking/rank.hpp"
#include "written_out.hpp"

using namespace vatwright;
using namespace vatwright::test;

namespace {

constexpr double same = 1e-9, agrees = 1e-7;
constexpr double ninth_digit = 1e-8;  // the order counts nine digits, what differs by less stands by its text

Ranking ranked(const Problem& problem, int most, By by) {
  std::vector<int> offered;
  for (std::size_t i = 0; i < problem.site.vessels.size(); ++i) offered.push_back(static_cast<int>(i));
  RankOptions options;
  options.most = most;
  options.by = by;
  options.exact = by != By::fit;
  return rank(problem, offered, options);
}

bool breaks_limit(const HookupRating& rating) {
  for (const Rating& vessel : rating.vessels)
    for (const Limit& limit : vessel.limits)
      if (limit.state == Limit::State::broken) return true;
  return false;
}

std::vector<double> distinct(std::vector<double> values) {
  std::sort(values.begin(), values.end(), std::greater<>());
  std::vector<double> kept;
  for (const double v : values)
    if (kept.empty() || kept.back() - v > same * kept.back()) kept.push_back(v);
  return kept;
}

std::string as_text(const std::vector<double>& values, std::size_t most) {
  std::string text;
  for (std::size_t i = 0; i < std::min(most, values.size()); ++i)
    text += Catch::Detail::stringify(values[i] * 1e12) + "e-12 ";
  return text;
}

/// What is shown, without what breaks a limit; each has its own value and falls, and what it says of its shares is so.
std::vector<double> shown(const Ranking& ranking, const Problem& problem, const SmallSite& site,
                          const std::function<std::optional<double>(const Hookup&)>& value_of) {
  CHECK((ranking.complete == "proved" || ranking.complete == "visited"));
  CHECK(ranking.rated <= ranking.hookups);
  std::vector<double> values;
  for (const Ranked& r : ranking.top) {
    INFO(r.rating.text);
    const Hookup hookup = with_free_shares(parsed(r.rating.text, problem.site));
    REQUIRE(breaks_limit(r.rating) == !keeps_feed_lines(site.plant, hookup, site.feed_m3_s));
    if (breaks_limit(r.rating)) break;
    REQUIRE(r.value);
    CHECK(*r.value == Approx(value_of(hookup).value()).epsilon(agrees).margin(0));
    CHECK(conversion_at(site.plant, hookup, r.rating.shares, site.feed_m3_s) ==
          Approx(r.rating.whole.conversion.value()).epsilon(agrees).margin(0));
    if (!values.empty()) CHECK(*r.value <= values.back() * (1 + ninth_digit));
    values.push_back(*r.value);
  }
  return values;
}

/// as_many: rank shows ten classes, or all there are of those that break no limit.
void agree(const Ranking& ranking, const std::vector<double>& shown, std::vector<double> all) {
  const auto found = distinct(shown);
  all = distinct(std::move(all));
  INFO("shown " << as_text(found, 10) << "\nby hand " << as_text(all, 12));
  if (ranking.top.size() < 10 || shown.size() < ranking.top.size()) REQUIRE(found.size() == all.size());
  REQUIRE(found.size() <= all.size());
  for (std::size_t i = 0; i < found.size(); ++i) CHECK(found[i] == Approx(all[i]).epsilon(agrees).margin(0));
}

void check_conversions(const SmallSite& site) {
  const Problem problem = problem_of(site.plant, site.feed_m3_s, 0.5);
  const auto value_of = [&](const Hookup& h) { return best_conversion(site.plant, h, site.feed_m3_s); };
  std::vector<double> all;
  for (const Hookup& h : all_hookups(static_cast<int>(site.plant.vessels.size()), site.most))
    if (const auto X = value_of(h)) all.push_back(*X);
  const Ranking ranking = ranked(problem, site.most, By::conversion);
  agree(ranking, shown(ranking, problem, site, value_of), std::move(all));
}

/// A target that `share` of all hookups miss at the feed rate.
double target_missed_by(const SmallSite& site, const std::vector<Hookup>& hookups, double share) {
  std::vector<double> X;
  for (const Hookup& h : hookups)
    if (const auto x = best_conversion(site.plant, h, site.feed_m3_s)) X.push_back(*x);
  if (X.empty()) return 0.5;
  std::sort(X.begin(), X.end());
  return std::min(0.98, X[static_cast<std::size_t>(share * static_cast<double>(X.size() - 1))] * (1 - 1e-4));
}

void check_ceilings(const SmallSite& site, double share) {
  auto hookups = all_hookups(static_cast<int>(site.plant.vessels.size()), site.most);
  const double X = target_missed_by(site, hookups, share), feed = site.feed_m3_s;
  const Problem problem = problem_of(site.plant, feed, X);
  const auto value_of = [&](const Hookup& h) { return ceiling(site.plant, h, X, feed); };
  const Ranking ranking = ranked(problem, site.most, By::ceiling);
  const auto found = shown(ranking, problem, site, value_of);
  // only what is as good as the last shown needs its ceiling; fewer than ten classes: all do
  const double cut = found.size() == 10 ? found.back() * (1 - agrees) : 0;
  std::vector<double> all;
  for (const Hookup& h : hookups)
    if (keeps_feed_lines(site.plant, h, feed) && (cut == 0 || best_conversion(site.plant, h, cut).value_or(-1) >= X))
      all.push_back(value_of(h).value());
  agree(ranking, found, std::move(all));
}

/// What the place by fit depends on (best first): verdict, vessels, ceiling in groups of 0.1 %, free shares, ceiling.
struct FitPlace {
  bool fits = false;
  int vessels = 0, free_shares = 0;
  double ceiling = 0;
};

/// In order; of those that have the same verdict, vessels and ceiling only the first.
std::vector<FitPlace> in_order_of_fit(std::vector<FitPlace> all) {
  std::sort(all.begin(), all.end(), [](const FitPlace& a, const FitPlace& b) {
    return std::tuple(!a.fits, a.vessels, -a.ceiling) < std::tuple(!b.fits, b.vessels, -b.ceiling);
  });
  const auto equals = [](const FitPlace& a, const FitPlace& b) { return a.fits == b.fits && a.vessels == b.vessels; };
  for (std::size_t from = 0, to = 0; from < all.size(); from = to) {
    while (to < all.size() && equals(all[from], all[to]) && all[to].ceiling >= all[from].ceiling * (1 - 1e-3)) ++to;
    std::stable_sort(all.begin() + static_cast<std::ptrdiff_t>(from), all.begin() + static_cast<std::ptrdiff_t>(to),
                     [](const FitPlace& a, const FitPlace& b) { return a.free_shares < b.free_shares; });
  }
  std::vector<FitPlace> kept;
  for (const FitPlace& one : all)
    if (std::none_of(kept.begin(), kept.end(), [&](const FitPlace& k) {
          return equals(k, one) && std::abs(k.ceiling - one.ceiling) <= same * one.ceiling;
        }))
      kept.push_back(one);
  return kept;
}

void check_fit(const SmallSite& site, double share) {
  const auto hookups = all_hookups(static_cast<int>(site.plant.vessels.size()), site.most);
  const double X = target_missed_by(site, hookups, share), feed = site.feed_m3_s;
  const Problem problem = problem_of(site.plant, feed, X);
  const auto value_of = [&](const Hookup& h) { return ceiling(site.plant, h, X, feed); };
  std::vector<FitPlace> all, shown;
  for (const Hookup& h : hookups)
    if (const auto reached = best_conversion(site.plant, h, feed))
      all.push_back({*reached >= X, static_cast<int>(vessels_of(h).size()), free_shares_of(h), value_of(h).value()});
  const Ranking ranking = ranked(problem, site.most, By::fit);
  CHECK((ranking.complete == "proved" || ranking.complete == "visited"));
  for (const Ranked& r : ranking.top) {
    INFO(r.rating.text);
    const Hookup hookup = with_free_shares(parsed(r.rating.text, problem.site));
    REQUIRE(breaks_limit(r.rating) == !keeps_feed_lines(site.plant, hookup, feed));
    if (breaks_limit(r.rating)) break;
    CHECK(r.value.value() == Approx(value_of(hookup).value()).epsilon(agrees).margin(0));
    CHECK(r.rating.vessel_count == static_cast<int>(vessels_of(hookup).size()));
    CHECK(r.rating.free_shares == free_shares_of(hookup));
    shown.push_back({r.rating.whole.verdict == Verdict::fits, r.rating.vessel_count, r.rating.free_shares, *r.value});
  }
  const bool cut = ranking.top.size() == 10 && shown.size() == 10;
  const auto expected = in_order_of_fit(all);
  std::vector<FitPlace> found;  // as shown, one of each
  for (const FitPlace& one : shown)
    if (std::none_of(found.begin(), found.end(), [&](const FitPlace& k) {
          return k.fits == one.fits && k.vessels == one.vessels &&
                 std::abs(k.ceiling - one.ceiling) <= same * one.ceiling;
        }))
      found.push_back(one);
  if (!cut) REQUIRE(found.size() == expected.size());
  REQUIRE(found.size() <= expected.size());
  for (std::size_t i = 0; i < found.size(); ++i) {
    INFO("place " << i);
    CHECK(found[i].fits == expected[i].fits);
    CHECK(found[i].vessels == expected[i].vessels);
    CHECK(found[i].free_shares == expected[i].free_shares);
    CHECK(found[i].ceiling == Approx(expected[i].ceiling).epsilon(agrees).margin(0));
  }
}

/// Three in a hookup where the rate falls; elsewhere, where a proof costs more, in every `seldom`-th site.
SmallSite mixed_site(std::mt19937& random, int i, int seldom) {
  const auto shape = static_cast<Shape>(i % shapes);
  const int round = i / shapes;
  if (rate_falls(shape)) return random_site(random, shape, 4 + round % 2, 3);
  const bool three = round % (shape == Shape::hindered ? 3 * seldom : seldom) == 0;
  return random_site(random, shape, three ? 4 : 5, three ? 3 : 2);
}

}  // namespace

TEST_CASE("as many hookups are written out as there are", "[written-out]") {
  // OEIS A048172: 1, 3, 19, 195, 2791 of 1 to 5 vessels
  CHECK(all_hookups(4, 4).size() == 4 * 1 + 6 * 3 + 4 * 19 + 195);
  CHECK(all_hookups(5, 5).size() == 5 * 1 + 10 * 3 + 10 * 19 + 5 * 195 + 2791);
}

TEST_CASE("closed forms hold what defines them", "[written-out]") {
  for (int s = 0; s < shapes; ++s)
    for (const double x : {0.0, 0.1, 0.6})
      for (const double tau : {0.01, 0.3, 1.0, 4.0, 15.0, 16.5}) {
        const auto shape = static_cast<Shape>(s);
        INFO("shape " << s << ", x " << x << ", tau " << tau);
        double X = x;  // the classical method of order four in many steps, ended where A is gone
        constexpr int steps = 40'000;
        for (int i = 0; i < steps; ++i) {
          const double h = tau / steps;
          const auto r = [&](double at) { return rate(shape, std::min(1.0, at)); };
          const double a = r(X), b = r(X + h / 2 * a), c = r(X + h / 2 * b), d = r(X + h * c);
          X = std::min(1.0, X + h / 6 * (a + 2 * b + 2 * c + d));
        }
        CHECK(tube_outlet(shape, x, tau) == Approx(X).epsilon(shape == Shape::half ? 1e-7 : 1e-10));
        const double out = tank_outlet(shape, x, tau);
        CHECK(std::abs(out - x - tau * rate(shape, out)) < 1e-13 * (1 + tau));
        for (int i = 0; i < 20'000; ++i) {  // none lower
          const double lower = x + (out - x) * (i + 0.5) / 20'001;
          if (lower < out - 1e-9) REQUIRE(lower - x < tau * rate(shape, lower));
        }
      }
}

TEST_CASE("the best conversions of random sites are those of all hookups written out", "[rank]") {
  std::mt19937 random(4171);
  for (int i = 0; i < 240; ++i) {
    INFO("site " << i);
    check_conversions(mixed_site(random, i, 4));
  }
}

TEST_CASE("the highest ceilings of random sites are those of all hookups written out", "[rank]") {
  std::mt19937 random(4172);
  for (int i = 0; i < 120; ++i) {
    INFO("site " << i);
    check_ceilings(mixed_site(random, i, 6), i % 4 == 0 ? 0.2 : 0.7);
  }
}

TEST_CASE("five vessels, three in a hookup, whatever the rate", "[.long]") {
  std::mt19937 random(4175);
  for (int i = 0; i < 120; ++i) {
    const SmallSite site = random_site(random, static_cast<Shape>(i % shapes), 5, 3);
    INFO("site " << i);
    check_conversions(site);
    check_ceilings(site, 0.7);
  }
}

TEST_CASE("the order by fit of random sites is that of all hookups written out", "[rank]") {
  std::mt19937 random(4174);
  for (int i = 0; i < 60; ++i) {
    const auto shape = static_cast<Shape>(i % shapes);
    const SmallSite site = random_site(random, shape, 4, rate_falls(shape) ? 3 : 2);
    INFO("site " << i);
    check_fit(site, i % 4 * 0.3);
  }
}

TEST_CASE("nine vessels, four in a hookup", "[.long]") {
  std::mt19937 random(4173);
  for (int i = 0; i < 2 * shapes; ++i) {
    const auto shape = static_cast<Shape>(i % shapes);
    const bool scans_end = rate_falls(shape) || shape == Shape::autocatalytic;  // else three: scans in scans in scans
    INFO("site " << i);
    check_conversions(random_site(random, shape, 9, scans_end ? 4 : 3));
  }
}
