#include "vatwright/ranking/rank.hpp"

#include <algorithm>
#include <cmath>
#include <functional>
#include <mutex>

#include "vatwright/hookup/chooser.hpp"
#include "order.hpp"
#include "space.hpp"
#include "vatwright/hookup/told.hpp"
#include "vatwright/error/expects.hpp"
#include "vatwright/ranking/enumerate.hpp"
#include "vatwright/numeric/pool.hpp"

namespace vatwright {
namespace {

Objective objective_for(const Duty& duty, By by) { return by == By::conversion ? Objective{} : objective_of(duty); }

/// Counts what is done, and tells it by one thread at a time.
class Progress {
 public:
  Progress(const RankOptions& options, std::size_t total)
      : told_(options.progress), total_(static_cast<long long>(total)) {}
  void one_more() {
    if (!told_) return;
    const std::lock_guard lock(mutex_);
    ++done_;
    told_(done_, total_);
  }

 private:
  const std::function<void(long long, long long)>& told_;
  std::mutex mutex_;
  long long done_ = 0, total_ = 0;
};

class Ranker {
 public:
  Ranker(const Problem& problem, const std::vector<int>& offered, const RankOptions& options)
      : problem_(problem),
        options_(options),
        offered_(offered),
        twins_(problem, offered),
        objective_(objective_for(problem.duty, options.by)) {}

  Ranking run() {
    Space space = list_space(twins_, offered_, options_.most, options_.most_rated);
    listed_ = space.hookups.size();
    for (Hookup& h : space.hookups) {
      entries_.emplace_back();
      entries_.back().hookup = std::move(h);
    }
    add_today();
    rate_all();
    find_ceilings();
    order_ = in_order(entries_, options_);
    return tell(space);
  }

 private:
  bool needs_ceilings() const { return options_.by == By::fit || options_.by == By::ceiling; }

  // Today's hookup is one of the list where its shares are free and its vessels are offered and few enough; else it
  // stands besides.
  void add_today() {
    if (!options_.today) return;
    const Hookup& today = *options_.today;
    const auto vessels = vessels_of(today);
    const bool offered = std::all_of(vessels.begin(), vessels.end(), [&](int v) { return twins_.class_of(v) >= 0; });
    const bool free = share_count(today) == 0 || all_free(today);
    if (offered && free) {
      const std::string key = twins_.key(today);
      for (std::size_t i = 0; i < entries_.size() && !today_; ++i) {
        if (entries_[i].hookup.parts.size() == today.parts.size() && twins_.key(entries_[i].hookup) == key) today_ = i;
      }
    }
    if (today_) return;
    today_ = entries_.size();
    entries_.emplace_back();
    entries_.back().hookup = today;
  }
  static bool all_free(const Hookup& h) {
    return std::all_of(h.shares.begin(), h.shares.end(), [](const auto& s) { return !s; }) &&
           std::all_of(h.parts.begin(), h.parts.end(), all_free);
  }

  void rate_all() {
    Progress progress(options_, entries_.size());
    for_each_index(entries_.size(), options_.threads, [&](std::size_t i) {
      rate_one(entries_[i]);
      progress.one_more();
    });
  }

  void rate_one(Entry& e) const {
    Chooser chooser(problem_, e.hookup, objective_);
    const JudgedHookup judged = chooser.choose(problem_.duty.target.feed_m3_s, Purpose::reach);
    const Finding finding = find_verdict(problem_, chooser.network(), judged);
    e.verdict = finding.verdict;
    e.unsolved = finding.unsolved;
    e.breaks_limit = vatwright::breaks_limit(judged);
    e.vessel_count = static_cast<int>(chooser.network().vessels().size());
    e.free_shares = free_shares_of(e.hookup);
    e.shares = judged.shares;
    e.text = to_text(e.hookup, problem_.site, judged.shares);
    if (const Stream* outlet = answer(judged.passes.outlet)) {
      e.reach = value_of(options_.by == By::yield ? objective_ : Objective{}, problem_.duty, *outlet);
    }
  }

  void find_one(Chooser& chooser, Entry& e) const {
    e.ceiling = find_ceiling(chooser, problem_.duty.target.feed_m3_s, e.shares);
    e.unsolved = e.unsolved || e.ceiling->unsolved;
  }

  // Ceilings are found for those whose rank before the figure lets them be shown at all: down to `top`, the
  // best of every number of vessels, and today's. Of one rank only what can come among its first places is searched:
  // the ceilings of those that convert most give a threshold, and what surely stays below it is left without a figure,
  // behind them.
  void find_ceilings() {
    if (!needs_ceilings()) return;
    std::vector<std::pair<std::pair<int, int>, std::size_t>> by_rank;  // rank and number of vessels
    for (std::size_t i = 0; i < entries_.size(); ++i)
      by_rank.push_back({{rank_before_figure(entries_[i], options_), entries_[i].vessel_count}, i});
    std::stable_sort(by_rank.begin(), by_rank.end(), [](const auto& a, const auto& b) { return a.first < b.first; });
    const auto needed = ranks_needed();
    for (std::size_t begin = 0, end = 0; begin < by_rank.size(); begin = end) {
      const auto lot = by_rank[begin].first;
      std::vector<std::size_t> members;
      while (end < by_rank.size() && by_rank[end].first == lot) members.push_back(by_rank[end++].second);
      if (!std::binary_search(needed.begin(), needed.end(), lot.first)) continue;
      const bool has_today = today_ && rank_before_figure(entries_[*today_], options_) == lot.first;
      const auto top = static_cast<std::size_t>(std::max(0, options_.top));
      const std::size_t open = options_.by == By::ceiling ? top : top - std::min(top, begin);
      const std::size_t places = std::min(std::max<std::size_t>(1, open), members.size());
      find_ceilings_of(std::move(members), has_today ? end - begin : places);
    }
  }

  // The first `places` of these by ceiling are right, ties within a group of 0.1 % included. They are taken in lots,
  // what feed lines let through most first, and what surely stays below the best so far is left.
  void find_ceilings_of(std::vector<std::size_t> members, std::size_t places) {
    constexpr std::size_t lot = 48;
    const auto promise = [&](std::size_t i) {
      return std::pair(-flow_cap(problem_, entries_[i].hookup), -entries_[i].reach.value_or(-1));
    };
    std::stable_sort(members.begin(), members.end(), [&](auto a, auto b) { return promise(a) < promise(b); });
    std::vector<double> found;
    for (std::size_t begin = 0; begin < members.size(); begin += lot) {
      const std::size_t n = std::min(lot, members.size() - begin);
      const double threshold = found.size() < places ? 0 : found[places - 1] * (1 - 3e-3);
      std::vector<char> may(n, 1);
      if (threshold > 0)
        for_each_index(n, options_.threads, [&](std::size_t k) {
          Chooser chooser(problem_, entries_[members[begin + k]].hookup, objective_);
          may[k] = may_reach(chooser, threshold);
        });
      std::vector<std::size_t> wanted;
      for (std::size_t k = 0; k < n; ++k)
        if (may[k]) wanted.push_back(members[begin + k]);
      find_all(wanted);
      for (const std::size_t i : wanted) found.push_back(figure_of(entries_[i], options_.by));
      std::sort(found.begin(), found.end(), std::greater<>());
    }
  }

  void find_all(const std::vector<std::size_t>& wanted) {
    for_each_index(wanted.size(), options_.threads, [&](std::size_t k) {
      Entry& e = entries_[wanted[k]];
      Chooser chooser(problem_, e.hookup, objective_);
      find_one(chooser, e);
    });
  }

  std::vector<int> ranks_needed() const {
    std::vector<int> ranks;
    for (const Entry& e : entries_) ranks.push_back(rank_before_figure(e, options_));
    std::vector<int> sorted = ranks, needed;
    std::sort(sorted.begin(), sorted.end());
    const std::size_t top = std::min(sorted.size(), static_cast<std::size_t>(std::max(0, options_.top)));
    needed.assign(sorted.begin(), sorted.begin() + static_cast<std::ptrdiff_t>(top));
    for (int n = 1; n <= options_.most; ++n) {
      int best = -1;
      for (std::size_t i = 0; i < listed_; ++i) {
        if (entries_[i].vessel_count == n && (best < 0 || ranks[i] < best)) best = ranks[i];
      }
      if (best >= 0) needed.push_back(best);
    }
    if (today_) needed.push_back(ranks[*today_]);
    std::sort(needed.begin(), needed.end());
    needed.erase(std::unique(needed.begin(), needed.end()), needed.end());
    return needed;
  }

  bool is_listed(std::size_t i) const { return i < listed_; }

  Ranking tell(const Space& space) {
    Ranking out;
    out.offered = static_cast<int>(offered_.size());
    out.most = options_.most;
    out.hookups = count_hookups_up_to(out.offered, options_.most).value_or(-1);
    for (std::size_t i = 0; i < entries_.size(); ++i) {
      out.unsolved = out.unsolved || entries_[i].unsolved;
      if (is_listed(i) && !entries_[i].unsolved) ++out.rated;
    }
    tell_completeness(out, space);
    tell_top(out);
    tell_stair(out);
    return out;
  }

  void tell_completeness(Ranking& out, const Space& space) const {
    const auto unsolved = std::count_if(entries_.begin(), entries_.begin() + static_cast<std::ptrdiff_t>(listed_),
                                        [](const Entry& e) { return e.unsolved; });
    out.complete = space.whole && unsolved == 0 ? "visited" : "partly";
    if (unsolved > 0) out.why_partly = std::to_string(unsolved) + " of them could not be solved";
    if (space.whole) return;
    if (!out.why_partly.empty()) out.why_partly += "; ";
    out.why_partly += "hookups of more than " + std::to_string(space.sizes) + " vessels are too many to rate them all";
  }

  void tell_top(Ranking& out) {
    std::vector<std::size_t> shown;
    for (const std::size_t i : order_) {
      if (is_listed(i) && shown.size() < static_cast<std::size_t>(std::max(0, options_.top))) shown.push_back(i);
    }
    const std::size_t places = shown.size();
    if (today_ && std::find(shown.begin(), shown.end(), *today_) == shown.end()) shown.push_back(*today_);
    std::vector<Ranked> told(shown.size());
    for_each_index(shown.size(), options_.threads, [&](std::size_t k) { told[k] = tell_one(shown[k]); });
    for (std::size_t k = 0; k < shown.size(); ++k) {
      out.unsolved = out.unsolved || told[k].rating.whole.unsolved;
      if (today_ == shown[k]) out.today = told[k];
    }
    told.resize(places);
    out.top = std::move(told);
    if (!today_) return;
    long long place = 1;
    for (const std::size_t i : order_) {
      if (i == *today_) break;
      ++place;
    }
    out.today_place = place;
  }

  Ranked tell_one(std::size_t i) const {
    const Entry& e = entries_[i];
    const Serve serve = options_.by == By::conversion ? Serve::conversion : Serve::target;
    Ranked ranked;
    ranked.rating = rate_hookup(problem_, e.hookup, {.windows = true, .profiles = false, .serve = serve});
    ranked.value = value_of(e, options_.by);
    if (ranked.value && needs_ceilings()) agree(ranked.rating.whole, *ranked.value);
    if (is_listed(i)) ranked.same_as = twins_.same_as(e.hookup, ranked.rating.shares);
    return ranked;
  }

  // The order and the window found the same ceiling on two ways: the one that ordered is told.
  static void agree(Rating& whole, double ceiling) {
    if (!whole.windows || !whole.windows->ceiling_m3_s || whole.windows->intervals.empty()) return;
    if (std::abs(*whole.windows->ceiling_m3_s - ceiling) > 1e-6 * ceiling) return;
    whole.windows->ceiling_m3_s = ceiling;
    whole.windows->intervals.back().hi = ceiling;
  }

  void tell_stair(Ranking& out) const {
    for (int n = 1; n <= std::min(options_.most, out.offered); ++n) {
      Stair step{n, std::nullopt, std::nullopt};
      for (const std::size_t i : order_) {
        if (!is_listed(i) || entries_[i].vessel_count != n) continue;
        step.best = entries_[i].text;
        step.value = value_of(entries_[i], options_.by);
        break;
      }
      out.stair.push_back(std::move(step));
    }
  }

  const Problem& problem_;
  const RankOptions& options_;
  const std::vector<int>& offered_;
  Twins twins_;
  Objective objective_;
  std::vector<Entry> entries_;
  std::size_t listed_ = 0;  // of the space; behind them today's, where it is none of them
  std::optional<std::size_t> today_;
  std::vector<std::size_t> order_;
};

}  // namespace

Ranking rank(const Problem& problem, const std::vector<int>& offered, const RankOptions& options) {
  VATWRIGHT_EXPECTS(options.by != By::yield || yield_asked(problem.duty));
  return Ranker(problem, offered, options).run();
}

}  // namespace vatwright
