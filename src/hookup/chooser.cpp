#include "vatwright/hookup/chooser.hpp"

#include <algorithm>

#include "vatwright/hookup/tune.hpp"

namespace vatwright {
namespace {

constexpr double hair = 1e-13;  // of a scaled margin

bool all_met(const std::vector<TargetItem>& items) {
  return std::all_of(items.begin(), items.end(), [](const TargetItem& i) { return i.met; });
}

bool breaks_flow_limit(const JudgedHookup& judged) {
  return std::any_of(judged.vessels.begin(), judged.vessels.end(), [](const Judged& j) {
    return std::any_of(j.limits.begin(), j.limits.end(), [](const Limit& l) {
      return (l.name == "feed line" || l.name == "pressure drop") && l.state == Limit::State::broken;
    });
  });
}

}  // namespace

Chooser::Chooser(const Problem& problem, const Hookup& hookup, const Objective& objective, KnownShares known_shares)
    : problem_(problem),
      network_(problem, hookup),
      space_(hookup, network_.volumes()),
      objective_(objective),
      known_shares_(std::move(known_shares)) {}

std::optional<double> Chooser::value_at(double feed_m3_s, const std::vector<double>& shares) {
  const auto outlet = network_.outlet(feed_m3_s, shares);
  const auto* stream = answer(outlet);
  return stream ? value_of(objective_, problem_.duty, *stream) : std::nullopt;
}

std::optional<Chooser::Free> Chooser::choose_free(double feed_m3_s, Purpose purpose) {
  std::optional<std::vector<double>> shares;
  if (space_.dimensions() == 0) shares = space_.shares({});
  if (!shares && known_shares_) shares = known_shares_(feed_m3_s, purpose);
  if (shares) {
    const auto value = value_at(feed_m3_s, *shares);
    return value ? std::optional(Free{*std::move(shares), *value}) : std::nullopt;
  }
  const auto f = [&](std::span<const double> x) { return value_at(feed_m3_s, space_.shares(x)); };
  const auto tuned = tune_free(f, space_.in_proportion());
  return tuned ? std::optional(Free{space_.shares(tuned->x), tuned->score.objective}) : std::nullopt;
}

bool Chooser::never_fits(double feed_m3_s) {
  const auto shares = space_.shares(space_.dimensions() == 0 ? std::vector<double>{} : space_.in_proportion());
  return breaks_limit_of_files(judge_hookup(problem_, network_, feed_m3_s, shares, Detail::full));
}

JudgedHookup Chooser::choose(double feed_m3_s, Purpose purpose, Detail detail) {
  const auto judged_at = [&](std::span<const double> x) {
    return judge_hookup(problem_, network_, feed_m3_s, space_.shares(x), detail);
  };
  if (space_.dimensions() == 0) {
    JudgedHookup only = judged_at({});
    only.shares_certain = true;
    return only;
  }
  const auto free = choose_free(feed_m3_s, purpose);
  JudgedHookup best =
      judge_hookup(problem_, network_, feed_m3_s, free ? free->shares : space_.shares(space_.in_proportion()), detail);
  best.shares_certain = free && known_shares_;
  if (free && !breaks_limit(best)) return best;
  if (breaks_limit_of_files(best)) return best;               // no share helps
  if (known_shares_ && breaks_flow_limit(best)) return best;  // then all shares do
  best.shares_certain = false;                                // others may keep every limit
  const bool missed_anyhow = free && is_all_of_target(objective_, problem_.duty) && !all_met(best.targets);
  if (purpose == Purpose::window && missed_anyhow) return best;

  const auto score = [&](std::span<const double> x) {
    const JudgedHookup here = judge_hookup(problem_, network_, feed_m3_s, space_.shares(x), Detail::full);
    const auto margin = least_margin(here);
    const auto* outlet = answer(here.passes.outlet);
    const auto objective = outlet ? value_of(objective_, problem_.duty, *outlet) : std::nullopt;
    if (!margin || !objective) return Score{-1, 0, false};
    // shares at the edge of a limit stay a hair inside, so that a window does not take the edge for its own end; a
    // margin that rests on zero (the fill asked is the most) rests there
    return Score{*margin == 0 ? 0 : *margin - hair, *objective, true};
  };
  std::vector<std::vector<double>> seeds;
  if (free) seeds.push_back(space_.coordinates(free->shares));
  const auto within = tune_within(score, space_.in_proportion(), seeds);
  if (!within) return best;
  if (within->score.margin < 0 && purpose == Purpose::reach) return best;
  return judged_at(within->x);
}

}  // namespace vatwright
