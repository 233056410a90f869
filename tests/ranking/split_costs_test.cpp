// What a split costs that is not the best, against closed forms and a published case.
#include <cmath>

#include "hookup/site.hpp"
#include "support/catch.hpp"
#include "vatwright/ranking/rank.hpp"

using namespace vatwright;
using namespace vatwright::test;

namespace {

Ranking best_of(const Problem& problem, By by = By::conversion) {
  RankOptions options;
  options.most = 2;
  options.by = by;
  options.exact = true;
  return rank(problem, {0, 1}, options);
}
const Ranked& beside(const Ranking& ranking) {
  for (const Ranked& r : ranking.top)
    if (!r.splits.empty()) return r;
  throw std::runtime_error("no joint among the places");
}

}  // namespace

TEST_CASE("two equal tubes off the even split lose what a closed form says", "[split-costs]") {
  // first order, k V/v = ln 10 in both together: X = 0.9 evenly; at a share w both ends at exp(-(V/2)/(w v)). Feed
  // lines keep the joint apart from the tubes in series.
  const double V = std::log(10.0) / 2;
  Problem problem = power_law({tube("P-1", V), tube("P-2", V)}, 1);
  for (Vessel& v : problem.site.vessels) v.feed_line_m3_s = 0.9;
  const Ranking ranking = best_of(problem);
  const SplitCost& split = beside(ranking).splits.at(0);
  const double off = 1 - 0.55 * std::exp(-V / 0.55) - 0.45 * std::exp(-V / 0.45);
  CHECK(split.branches == std::vector<std::string>{"P-1", "P-2"});
  CHECK(split.best[0] == Approx(0.5).margin(1e-5));
  CHECK(split.by_volume[0] == 0.5);
  CHECK(*split.by_volume_costs == Approx(0).margin(1e-10));
  CHECK(*split.off_costs == Approx(0.9 - off).epsilon(1e-4));
}

TEST_CASE("a tank beside a tube is best split neither by volume nor evenly", "[split-costs]") {
  // tank 4 m3 beside tube 2 m3 at second order, own closed forms: C of the tank (sqrt(1 + 4 t) - 1)/(2 t), of the tube
  // 1/(1 + t); the best share by scanning 200001 places
  const Problem problem = power_law({tank("K-1", 4), tube("P-1", 2)}, 2);
  const auto left = [](double w) {
    const double t = 4 / w, s = 2 / (1 - w);
    return w * (std::sqrt(1 + 4 * t) - 1) / (2 * t) + (1 - w) / (1 + s);
  };
  double best = 0.5;
  for (int i = 1; i < 200001; ++i)
    if (const double w = i / 200001.0; left(w) < left(best)) best = w;
  const Ranking ranking = best_of(problem);
  const SplitCost& split = beside(ranking).splits.at(0);
  CHECK(split.best[0] == Approx(best).margin(1e-4));
  CHECK(*split.by_volume_costs == Approx(left(4.0 / 6) - left(best)).epsilon(1e-6));
  CHECK(*split.off_costs == Approx(std::max(left(best + 0.05), left(best - 0.05)) - left(best)).epsilon(1e-3));
}

TEST_CASE("what would be first but for a limit is told with what stands in its way", "[kept-out]") {
  Problem problem = power_law({tube("P-1", 1), tube("P-2", 3)}, 1);
  problem.site.vessels[1].feed_line_m3_s = 0.5;  // half of the feed: it can stand in no train
  const Ranking ranking = best_of(problem);
  REQUIRE(ranking.kept_out.size() >= 1);
  CHECK(*ranking.kept_out[0].value == Approx(1 - std::exp(-4.0)).epsilon(1e-9));  // both in series, first order
  CHECK(ranking.kept_out[0].value > ranking.top[0].value);
  REQUIRE_FALSE(ranking.kept_out[0].stands_in_the_way.empty());
  CHECK(ranking.kept_out[0].stands_in_the_way[0].find("P-2: feed line") == 0);
}
