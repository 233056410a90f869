#include "vatwright/hookup/judged_hookup.hpp"

#include <algorithm>

namespace vatwright {
namespace {

bool is_broken(const Limit& limit) { return limit.state == Limit::State::broken; }

bool any_broken(const std::vector<Limit>& limits) { return std::any_of(limits.begin(), limits.end(), is_broken); }

// What only the files decide, whatever flows: no flow rate stands in it.
bool read_from_files(const Limit& limit) {
  const auto& all = all_limits();
  const std::size_t i = place_of(limit.name);
  return i < all.size() && all[i].reads == Reads::files && limit.unit != "m3/s";
}

void take_least(double& least, const std::vector<Limit>& limits) {
  for (const Limit& limit : limits) {
    if (limit.search_margin) least = std::min(least, *limit.search_margin);
  }
}

}  // namespace

VesselPlace place_of(const Problem& problem, const Network& network, const JudgedHookup& judged, std::size_t place) {
  const VesselPass& pass = judged.passes.vessels[place];
  const auto index = static_cast<std::size_t>(network.vessels()[place]);
  return {problem,          problem.site.vessels[index], network.operation(place), pass.feed_m3_s, pass.arrives_Pa,
          Stands::in_hookup};
}

JudgedHookup judge_hookup(const Problem& problem, Network& network, double feed_m3_s, std::vector<double> shares,
                          Detail detail) {
  JudgedHookup judged;
  judged.feed_m3_s = feed_m3_s;
  judged.passes = network.at(feed_m3_s, shares, detail);
  judged.shares = std::move(shares);
  std::vector<Draw> draws;
  for (std::size_t i = 0; i < judged.passes.vessels.size(); ++i) {
    judged.vessels.push_back(judge(place_of(problem, network, judged, i), judged.passes.vessels[i].outcome));
    if (judged.vessels.back().draw) draws.push_back(*judged.vessels.back().draw);
  }
  if (auto total = check_utility_totals(draws)) judged.whole.push_back(std::move(*total));
  const bool all_answer =
      std::all_of(judged.vessels.begin(), judged.vessels.end(), [](const Judged& j) { return j.figures; });
  const auto* outlet = std::get_if<Stream>(&judged.passes.outlet);
  if (outlet && all_answer) judged.targets = check_target(problem.duty, *outlet);
  return judged;
}

std::vector<NamedJudged> named(const Problem& problem, const Network& network, const JudgedHookup& judged) {
  std::vector<NamedJudged> all;
  for (std::size_t i = 0; i < judged.vessels.size(); ++i) {
    all.push_back({problem.site.vessels[static_cast<std::size_t>(network.vessels()[i])].tag, &judged.vessels[i]});
  }
  return all;
}

Finding find_verdict(const Problem& problem, const Network& network, const JudgedHookup& judged) {
  return find_verdict(named(problem, network, judged), judged.whole, judged.targets);
}

Trial trial_of(const Problem& problem, const Network& network, const JudgedHookup& judged) {
  return trial_of(named(problem, network, judged), judged.whole, judged.targets);
}

bool breaks_limit(const JudgedHookup& judged) {
  return any_broken(judged.whole) || std::any_of(judged.vessels.begin(), judged.vessels.end(), [](const Judged& j) {
           return any_broken(j.limits) || !j.lacking.empty();
         });
}

bool breaks_limit_of_files(const JudgedHookup& judged) {
  return std::any_of(judged.vessels.begin(), judged.vessels.end(), [](const Judged& j) {
    return !j.lacking.empty() || std::any_of(j.limits.begin(), j.limits.end(),
                                             [](const Limit& l) { return is_broken(l) && read_from_files(l); });
  });
}

std::optional<double> least_margin(const JudgedHookup& judged) {
  double least = 1;
  take_least(least, judged.whole);
  for (const Judged& j : judged.vessels) {
    if (j.no_answer) return std::nullopt;
    if (!j.lacking.empty()) least = std::min(least, -1.0);
    take_least(least, j.limits);
  }
  return least;
}

}  // namespace vatwright
