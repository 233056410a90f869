// What ranking costs: the search of the best ten hookups of duties on a line, by conversion and by ceiling, for rates
// that fall, that pass a peak, and that adsorption hinders; with and without feed lines; and one thread against two.
// Plants as in a study of the search: volumes 1 to 10 m3 at random, half of them tanks; the feed rate at which the
// largest k vessels as one tube reach 90 %. Printed: seconds (the median of three), hookups rated, maps of a vessel,
// bounds looked up, of how many hookups.
#include <algorithm>
#include <cstdio>
#include <random>

#include "clock.hpp"
#include "hookup/site.hpp"
#include "ranking/best_on_line.hpp"
#include "vatwright/ranking/enumerate.hpp"
#include "vatwright/ranking/rank.hpp"

using namespace vatwright;
using namespace vatwright::test;

namespace {

enum class Rate { second, half, first, autocatalytic, hindered };
constexpr const char* name_of(Rate rate) {
  constexpr const char* names[] = {"second order", "half order", "first order", "autocatalytic", "hindered"};
  return names[static_cast<int>(rate)];
}

Problem plant(Rate rate, int n, int most, bool feed_lines, unsigned seed) {
  std::mt19937 random(seed);
  const auto uniform = [&](double a, double b) { return a + (b - a) * (static_cast<double>(random()) / 4294967296.0); };
  std::vector<Vessel> vessels;
  std::vector<double> volumes;
  for (int i = 0; i < n; ++i) {
    volumes.push_back(std::pow(10, uniform(0, 1)));
    const std::string tag = std::to_string(i + 1);
    vessels.push_back(i % 2 == 0 ? tank("T-" + tag, volumes.back()) : tube("P-" + tag, volumes.back()));
  }
  std::sort(volumes.rbegin(), volumes.rend());
  double largest = 0;
  for (int i = 0; i < most; ++i) largest += volumes[static_cast<std::size_t>(i)];
  std::vector<double> c = {1, 0};
  Reaction r;
  double t = 1;  // of a tube to 90 %
  switch (rate) {
    case Rate::second:
      r = reaction({{0, -1}, {1, 1}}, 1, {{0, 2}});
      t = 9;
      break;
    case Rate::half:
      r = reaction({{0, -1}, {1, 1}}, 1, {{0, 0.5}});
      t = 2 * (1 - std::sqrt(0.1));
      break;
    case Rate::first:
      r = reaction({{0, -1}, {1, 1}}, 1, {{0, 1}});
      t = std::log(10);
      break;
    case Rate::autocatalytic:
      r = reaction({{0, -1}, {1, 1}}, 1, {{0, 1}, {1, 1}});
      c[1] = 0.02;
      t = std::log(10 * (0.92 / 0.02)) / 1.02;
      break;
    case Rate::hindered: {
      r = reaction({{0, -1}, {1, 1}}, 1, {{0, 1}});
      auto& law = std::get<RateLaw>(r.forward);
      law.adsorption = {{0, 6.0}};
      law.adsorption_power = 2;
      t = std::log(10) + 2 * 6 * 0.9 + 36 * (1 - 0.01) / 2;
      break;
    }
  }
  const double feed = largest / t;
  if (feed_lines)
    for (Vessel& v : vessels) v.feed_line_m3_s = feed * uniform(0.2, 1.2);
  return problem_of(std::move(vessels), c, {r}, feed, 0.9);
}

struct Searched {
  double seconds = 0;
  BestFound found;
};
Searched search(const Problem& problem, int most, bool by_ceiling, int threads) {
  Searched out;
  std::vector<int> offered;
  for (std::size_t i = 0; i < problem.site.vessels.size(); ++i) offered.push_back(static_cast<int>(i));
  const auto once = [&] {
    const Twins classes(problem, offered);
    std::vector<int> firsts;
    for (const auto& c : classes.classes()) firsts.push_back(c.front());
    std::string why;
    const auto line = Line::find(problem, firsts, why);
    const Bound bound(*line);
    const Twins twins(problem, offered, line->falls());
    const OnLines vessels = on_lines(*line, twins, problem.site.vessels.size());
    std::vector<std::size_t> all;
    for (std::size_t c = 0; c < firsts.size(); ++c) all.push_back(c);
    const BestOnLine best(*line, bound, twins, all, vessels, problem.duty.target.feed_m3_s,
                          by_ceiling ? std::optional(line->place(0.9)) : std::nullopt, threads);
    BestAsked asked;
    asked.most = most;
    out.found = best.find(asked);
  };
  out.seconds = bench::time_in_turn({{"", once}}, 3, 0.002)[0];
  return out;
}

void show(Rate rate, int n, int most, bool feed_lines, bool by_ceiling) {
  const Problem problem = plant(rate, n, most, feed_lines, 17);
  const Searched s = search(problem, most, by_ceiling, 2);
  std::printf(
      "%-14s N %2d k %d %-10s %-10s %9.5f s  rated %7lld  maps %9ld  bounds %9ld  of %lld, best %.6f tenth %.6f\n",
      name_of(rate), n, most, by_ceiling ? "ceiling" : "conversion", feed_lines ? "feed lines" : "", s.seconds,
      s.found.cost.rated, s.found.cost.maps, s.found.cost.bounds, count_hookups_up_to(n, most).value_or(-1),
      s.found.all.front().value, s.found.all[std::min<std::size_t>(9, s.found.all.size() - 1)].value);
}

/// One thread and two in turn, the median of the ratios.
void show_threads(Rate rate, int n, int most, bool by_ceiling) {
  const Problem problem = plant(rate, n, most, false, 17);
  std::vector<double> ratios;
  double one = 0;
  for (int pair = 0; pair < 5; ++pair) {
    one = search(problem, most, by_ceiling, 1).seconds;
    ratios.push_back(one / search(problem, most, by_ceiling, 2).seconds);
  }
  std::sort(ratios.begin(), ratios.end());
  std::printf("%-14s N %2d k %d %-10s one thread %.3f s, two are %.2f times as fast\n", name_of(rate), n, most,
              by_ceiling ? "ceiling" : "conversion", one, ratios[2]);
}

}  // namespace

int main() {
  for (const bool by_ceiling : {false, true})
    for (const Rate rate : {Rate::second, Rate::half, Rate::first, Rate::autocatalytic, Rate::hindered})
      show(rate, 40, 4, false, by_ceiling);
  for (const Rate rate : {Rate::second, Rate::half}) show(rate, 40, 4, true, false);
  for (const Rate rate : {Rate::second, Rate::half, Rate::first}) show(rate, 60, 5, false, false);
  show_threads(Rate::hindered, 40, 4, false);
  show_threads(Rate::hindered, 40, 4, true);
  return 0;
}
