#include "visiting.hpp"

#include <algorithm>
#include <functional>
#include <mutex>

#include "space.hpp"
#include "vatwright/numeric/pool.hpp"

namespace vatwright {
namespace {

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

class Visiting {
 public:
  Visiting(const Rater& rater, const std::vector<int>& offered)
      : rater_(rater), options_(rater.options()), offered_(offered) {}

  RankedSet run() {
    Space space = list_space(rater_.twins(), offered_, options_.most, options_.most_rated);
    for (Hookup& h : space.hookups) {
      entries_.emplace_back();
      entries_.back().hookup = std::move(h);
    }
    listed_ = entries_.size();
    add_today();
    rate_all();
    if (rater_.needs_ceilings()) find_ceilings();
    return tell(space);
  }

 private:
  // Today's hookup is one of the list where its shares are free and its vessels are offered and few enough; else it
  // stands besides.
  void add_today() {
    if (!options_.today) return;
    const Hookup& today = *options_.today;
    const auto vessels = vessels_of(today);
    const bool offered =
        std::all_of(vessels.begin(), vessels.end(), [&](int v) { return rater_.twins().class_of(v) >= 0; });
    if (offered && all_free(today)) {
      const std::string key = rater_.twins().key(today);
      for (std::size_t i = 0; i < entries_.size() && !today_; ++i)
        if (rater_.twins().key(entries_[i].hookup) == key) today_ = i;
    }
    if (today_) return;
    today_ = entries_.size();
    entries_.emplace_back();
    entries_.back().hookup = today;
  }

  void rate_all() {
    Progress progress(options_, entries_.size());
    std::vector<char> rated(entries_.size(), 0);
    for_each_index(entries_.size(), options_.threads, [&](std::size_t i) {
      if (stopped()) return;
      entries_[i] = rater_.rate(std::move(entries_[i].hookup));
      rated[i] = 1;
      progress.one_more();
    });
    if (std::ranges::count(rated, 1) == std::ssize(rated)) return;
    if (today_ && !rated[*today_]) entries_[*today_] = rater_.rate(*options_.today);
    std::vector<Entry> kept;
    std::size_t listed = 0;
    for (std::size_t i = 0; i < entries_.size(); ++i) {
      const bool is_today = i == today_;
      if (!rated[i] && !is_today) continue;
      if (is_today) today_ = kept.size();
      if (i < listed_) ++listed;
      kept.push_back(std::move(entries_[i]));
    }
    stopped_at_ = static_cast<long long>(listed);
    stopped_of_ = static_cast<long long>(listed_);
    listed_ = listed;
    entries_ = std::move(kept);
  }
  [[nodiscard]] bool stopped() const { return options_.stopped && options_.stopped(); }

  // Ceilings are found for those whose rank before the figure lets them be shown at all: down to `top`, the
  // best of every number of vessels, and today's. Of one rank only what can come among its first places is searched:
  // the ceilings of those that convert most give a threshold, and what surely stays below it is left without a figure,
  // behind them.
  void find_ceilings() {
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
      return std::pair(-flow_cap(rater_.problem(), entries_[i].hookup), -entries_[i].reach.value_or(-1));
    };
    std::stable_sort(members.begin(), members.end(), [&](auto a, auto b) { return promise(a) < promise(b); });
    std::vector<double> found;
    for (std::size_t begin = 0; begin < members.size(); begin += lot) {
      const std::size_t n = std::min(lot, members.size() - begin);
      const double threshold = found.size() < places ? 0 : found[places - 1] * (1 - 3e-3);
      if (stopped()) {
        ceilings_left_ = true;
        return;
      }
      std::vector<char> may(n, 1);
      if (threshold > 0)
        for_each_index(n, options_.threads,
                       [&](std::size_t k) { may[k] = rater_.may_reach(entries_[members[begin + k]], threshold); });
      std::vector<std::size_t> wanted;
      for (std::size_t k = 0; k < n; ++k)
        if (may[k]) wanted.push_back(members[begin + k]);
      for_each_index(wanted.size(), options_.threads, [&](std::size_t k) { rater_.find_ceiling(entries_[wanted[k]]); });
      for (const std::size_t i : wanted) found.push_back(figure_of(entries_[i], options_.by));
      std::sort(found.begin(), found.end(), std::greater<>());
    }
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

  RankedSet tell(const Space& space) {
    RankedSet out;
    long long unsolved = 0;
    for (std::size_t i = 0; i < entries_.size(); ++i) {
      out.unsolved = out.unsolved || entries_[i].unsolved;
      if (i >= listed_) continue;
      ++(entries_[i].unsolved ? unsolved : out.rated);
    }
    out.complete = space.whole && unsolved == 0 ? "visited" : "partly";
    if (unsolved > 0) out.why_partly = std::to_string(unsolved) + " of them could not be solved";
    if (!space.whole) {
      if (!out.why_partly.empty()) out.why_partly += "; ";
      out.why_partly +=
          "hookups of more than " + std::to_string(space.sizes) + " vessels are too many to rate them all";
    }
    if (stopped_at_ || ceilings_left_) {
      out.complete = "partly";
      if (!out.why_partly.empty()) out.why_partly += "; ";
      out.why_partly += stopped_at_ ? "stopped after " + std::to_string(*stopped_at_) + " of " +
                                          std::to_string(stopped_of_) + " that differ in more than name"
                                    : "stopped while ceilings were looked for";
    }
    if (today_) {
      out.today = entries_[*today_];
      out.today_listed = *today_ < listed_;
      const auto order = in_order(entries_, options_);
      out.today_place = 1 + (std::find(order.begin(), order.end(), *today_) - order.begin());
    }
    entries_.resize(listed_);
    out.entries = std::move(entries_);
    return out;
  }

  const Rater& rater_;
  const RankOptions& options_;
  const std::vector<int>& offered_;
  std::vector<Entry> entries_;
  std::size_t listed_ = 0;  // of the space; behind them today's, where it is none of them
  std::optional<std::size_t> today_;
  std::optional<long long> stopped_at_;  // hookups of the list
  long long stopped_of_ = 0;
  bool ceilings_left_ = false;
};

}  // namespace

RankedSet visit_all(const Rater& rater, const std::vector<int>& offered) { return Visiting(rater, offered).run(); }

}  // namespace vatwright
