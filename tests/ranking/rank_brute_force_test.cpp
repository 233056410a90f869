// Random small sites, ranked, against every hookup written out (brute_force.hpp): values to 1e-7.
#include <algorithm>
#include <cmath>
#include <random>

#include "brute_force.hpp"
#include "hookup/site.hpp"
#include "support/catch.hpp"
#include "vatwright/ranking/rank.hpp"

using namespace vatwright;
using namespace vatwright::test;

namespace {

Problem problem_of(const Plant& plant, double feed, double X) {
  std::vector<Vessel> vessels;
  for (const PlantVessel& v : plant.vessels) {
    const std::string tag = (v.is_tank ? "T-" : "P-") + std::to_string(vessels.size() + 1);
    vessels.push_back(v.is_tank ? tank(tag, v.volume) : tube(tag, v.volume));
    if (v.feed_line < 1e300) vessels.back().feed_line_m3_s = v.feed_line;
  }
  const bool autocatalytic = plant.shape == Shape::autocatalytic;
  const double order = plant.shape == Shape::half ? 0.5 : plant.shape == Shape::second ? 2 : 1;
  std::vector<SpeciesFigure> orders = {{0, order}};
  if (autocatalytic) orders.push_back({1, 1});
  Reaction r = reaction({{0, -1}, {1, 1}}, 1, orders);
  if (plant.shape == Shape::hindered) {
    auto& law = std::get<RateLaw>(r.forward);
    law.adsorption = {{0, hindrance}};
    law.adsorption_power = 2;
  }
  return vatwright::test::problem_of(std::move(vessels), {1, autocatalytic ? seed_of_product : 0}, {r}, feed, X);
}

struct RandomSite {
  Plant plant;
  double feed = 1;
  int most = 3;
};

RandomSite random_site(std::mt19937& random, int least_n, int most_n, int most) {
  const auto uniform = [&](double a, double b) { return a + (b - a) * (static_cast<double>(random()) / 4294967296.0); };
  RandomSite site;
  site.plant.shape = static_cast<Shape>(random() % 5);
  site.most = most;
  const int n = least_n + static_cast<int>(random() % static_cast<unsigned>(most_n - least_n + 1));
  double volume = 0;
  for (int i = 0; i < n; ++i) {
    PlantVessel v{random() % 2 == 0, std::exp(uniform(0, 2.3)), 1e300};
    if (i > 0 && random() % 5 == 0) v = site.plant.vessels[0];  // an equal one
    site.plant.vessels.push_back(v);
    volume += v.volume;
  }
  const double slow = site.plant.shape == Shape::hindered ? 8 : 1;
  site.feed = volume / n * most / (slow * uniform(0.7, 3));
  if (random() % 2 == 0)
    for (PlantVessel& v : site.plant.vessels)
      if (random() % 2 == 0) v.feed_line = site.feed * uniform(0.2, 1.5);
  return site;
}

Ranking ranked(const Problem& problem, int most, By by) {
  std::vector<int> offered;
  for (std::size_t i = 0; i < problem.site.vessels.size(); ++i) offered.push_back(static_cast<int>(i));
  RankOptions options;
  options.most = most;
  options.by = by;
  options.exact = true;
  options.threads = 1;
  return rank(problem, offered, options);
}

/// Falling, those that differ by less than 1e-9 once.
std::vector<double> distinct(std::vector<double> values) {
  std::sort(values.begin(), values.end(), std::greater<>());
  values.erase(std::unique(values.begin(), values.end(), [](double a, double b) { return a - b <= 1e-8 * a; }),
               values.end());
  return values;
}

bool breaks_limit(const HookupRating& rating) {
  return std::any_of(rating.vessels.begin(), rating.vessels.end(), [](const Rating& vessel) {
    return std::any_of(vessel.limits.begin(), vessel.limits.end(),
                       [](const Limit& limit) { return limit.state == Limit::State::broken; });
  });
}

/// What is shown stands in the places that the brute force gives it, class by class.
void agree(const Ranking& ranking, std::vector<double> brute) {
  CHECK((ranking.complete == "proved" || ranking.complete == "visited"));
  std::vector<double> shown;
  for (const Ranked& r : ranking.top) {
    if (breaks_limit(r.rating)) break;  // they come last
    REQUIRE(r.value);
    shown.push_back(*r.value);
  }
  shown = distinct(shown);
  brute = distinct(std::move(brute));
  REQUIRE(shown.size() <= brute.size());
  for (std::size_t i = 0; i < shown.size(); ++i) CHECK(shown[i] == Approx(brute[i]).epsilon(1e-7));
}

void check_conversions(const RandomSite& site) {
  const Ranking ranking = ranked(problem_of(site.plant, site.feed, 0.5), site.most, By::conversion);
  std::vector<double> all;
  for (const Hookup& h : every_hookup(static_cast<int>(site.plant.vessels.size()), site.most))
    if (const double X = brute_conversion(site.plant, h, 0, site.feed); X > 0) all.push_back(X);
  agree(ranking, std::move(all));
}

void check_ceilings(const RandomSite& site) {
  // a target that some reach at the feed rate and some do not
  std::vector<Hookup> hookups;
  std::vector<double> reached;
  for (Hookup& h : every_hookup(static_cast<int>(site.plant.vessels.size()), site.most))
    if (const double X = brute_conversion(site.plant, h, 0, site.feed); X > 0) {
      hookups.push_back(std::move(h));
      reached.push_back(X);
    }
  if (reached.size() < 12) return;
  std::vector<double> sorted = reached;
  std::sort(sorted.begin(), sorted.end());
  const double X = std::min(0.98, sorted[sorted.size() * 2 / 3]);
  std::vector<double> all;
  for (const Hookup& h : hookups) all.push_back(brute_ceiling(site.plant, h, X, site.feed));
  agree(ranked(problem_of(site.plant, site.feed, X), site.most, By::ceiling), std::move(all));
}

}  // namespace

TEST_CASE("the brute force itself writes out as many hookups as there are", "[brute]") {
  // OEIS A048172: 1, 3, 19, 195 of 1 to 4 vessels
  CHECK(every_hookup(4, 4).size() == 4 * 1 + 6 * 3 + 4 * 19 + 195);
}

TEST_CASE("the best conversions of random sites are those of the brute force", "[rank]") {
  std::mt19937 random(20261201);
  for (int i = 0; i < 200; ++i) {
    RandomSite site = random_site(random, 3, 4, 2 + i % 2);
    if (i % 10 > 0 && site.plant.shape >= Shape::autocatalytic) site.most = 2;
    INFO("site " << i << ", shape " << static_cast<int>(site.plant.shape));
    check_conversions(site);
  }
}

TEST_CASE("the highest ceilings of random sites are those of the brute force", "[rank]") {
  std::mt19937 random(20261202);
  for (int i = 0; i < 100; ++i) {
    RandomSite site = random_site(random, 4, 5, i % 8 == 0 ? 3 : 2);
    if (site.most == 3) site.plant.shape = i % 16 == 0 ? Shape::half : Shape::second;
    INFO("site " << i << ", shape " << static_cast<int>(site.plant.shape));
    check_ceilings(site);
  }
}
