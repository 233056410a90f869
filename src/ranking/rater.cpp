#include "rater.hpp"

#include <algorithm>
#include <cmath>

#include "split_costs.hpp"

namespace vatwright {
namespace {

// The order and the window found the same ceiling on two ways: the one that ordered is told.
void agree(Rating& whole, double ceiling) {
  if (!whole.windows || !whole.windows->ceiling_m3_s || whole.windows->intervals.empty()) return;
  if (std::abs(*whole.windows->ceiling_m3_s - ceiling) > 1e-6 * ceiling) return;
  whole.windows->ceiling_m3_s = ceiling;
  whole.windows->intervals.back().hi = ceiling;
}

}  // namespace

bool all_free(const Hookup& h) {
  return std::all_of(h.shares.begin(), h.shares.end(), [](const auto& s) { return !s; }) &&
         std::all_of(h.parts.begin(), h.parts.end(), all_free);
}

Rater::Rater(const Problem& problem, const RankOptions& options, const Twins& twins, Known known)
    : problem_(problem),
      options_(options),
      twins_(twins),
      known_(std::move(known)),
      objective_(options.by == By::conversion ? Objective{} : objective_of(problem.duty)) {}

KnownShares Rater::shares_of(const Hookup& hookup) const {
  return known_.shares_of && all_free(hookup) ? known_.shares_of(hookup) : KnownShares{};
}

Entry Rater::rate(Hookup hookup) const {
  Entry e;
  e.hookup = std::move(hookup);
  Chooser chooser(problem_, e.hookup, objective_, shares_of(e.hookup));
  const JudgedHookup judged = chooser.choose(problem_.duty.target.feed_m3_s, Purpose::reach);
  const Finding finding = find_verdict(problem_, chooser.network(), judged);
  e.verdict = finding.verdict;
  e.unsolved = finding.unsolved;
  e.breaks_limit = vatwright::breaks_limit(judged);
  e.vessel_count = static_cast<int>(chooser.network().vessels().size());
  e.free_shares = free_shares_of(e.hookup);
  e.shares = judged.shares;
  e.split_certain = judged.shares_certain;
  e.stands_in_the_way = finding.stands_in_the_way;
  e.text = to_text(e.hookup, problem_.site, judged.shares);
  if (const Stream* outlet = answer(judged.passes.outlet))
    e.reach = value_of(options_.by == By::yield ? objective_ : Objective{}, problem_.duty, *outlet);
  return e;
}

void Rater::find_ceiling(Entry& e) const {
  std::optional<double> near_m3_s;
  if (known_.ceiling_of && all_free(e.hookup)) near_m3_s = known_.ceiling_of(e.hookup);
  Chooser chooser(problem_, e.hookup, objective_, shares_of(e.hookup));
  e.ceiling = vatwright::find_ceiling(chooser, near_m3_s.value_or(problem_.duty.target.feed_m3_s), e.shares,
                                      near_m3_s ? Near::known : Near::guessed);
  e.unsolved = e.unsolved || e.ceiling->unsolved;
}

bool Rater::may_reach(const Entry& e, double feed_m3_s) const {
  Chooser chooser(problem_, e.hookup, objective_, shares_of(e.hookup));
  return vatwright::may_reach(chooser, feed_m3_s);
}

Ranked Rater::tell(const Entry& e, bool is_listed) const {
  const Serve serve = options_.by == By::conversion ? Serve::conversion : Serve::target;
  Ranked ranked;
  ranked.rating = rate_hookup(
      problem_, e.hookup, {.windows = true, .profiles = false, .serve = serve, .known_shares = shares_of(e.hookup)});
  ranked.value = value_of(e, options_.by);
  if (ranked.value && needs_ceilings()) agree(ranked.rating.whole, *ranked.value);
  if (is_listed) ranked.same_as = twins_.same_as(e.hookup, ranked.rating.shares);
  const Objective serves = options_.by == By::yield ? objective_ : Objective{};
  ranked.splits = split_costs(problem_, e.hookup, serves, ranked.rating.shares);
  return ranked;
}

}  // namespace vatwright
