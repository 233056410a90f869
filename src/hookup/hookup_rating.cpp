#include "vatwright/hookup/hookup_rating.hpp"

#include <algorithm>

#include "vatwright/hookup/chooser.hpp"
#include "vatwright/hookup/told.hpp"

namespace vatwright {
namespace {

Objective objective_for(const Duty& duty, const HookupOptions& options) {
  if (options.serve == Serve::conversion) return {};
  return objective_of(duty);
}

/// Trials of the window, shares chosen anew at each.
Windows windows_of(Chooser& chooser, bool& any_answer) {
  const auto trial = [&](double feed_m3_s) {
    const JudgedHookup judged = chooser.choose(feed_m3_s, Purpose::window);
    any_answer = any_answer || answer(judged.passes.outlet) != nullptr;
    return trial_of(chooser.problem(), chooser.network(), judged);
  };
  const auto [lo, hi] = search_range(chooser.network());
  return find_windows(trial, lo, hi);
}

}  // namespace

HookupRating rate_hookup(const Problem& problem, const Hookup& hookup, const HookupOptions& options) {
  Chooser chooser(problem, hookup, objective_for(problem.duty, options), options.known_shares);
  JudgedHookup judged = chooser.choose(problem.duty.target.feed_m3_s, Purpose::reach);
  if (options.profiles) {
    judged = judge_hookup(problem, chooser.network(), judged.feed_m3_s, judged.shares, Detail::profile);
  }
  HookupRating rating = tell_hookup(chooser, judged);
  if (!options.windows) return rating;
  bool any_answer = false;
  Windows windows = windows_of(chooser, any_answer);
  tell_windows(rating.whole, std::move(windows), any_answer);
  return rating;
}

}  // namespace vatwright
