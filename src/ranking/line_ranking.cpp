#include "line_ranking.hpp"

#include <algorithm>
#include <cmath>
#include <functional>
#include <map>
#include <utility>

#include "best_on_line.hpp"
#include "space.hpp"
#include "vatwright/numeric/pool.hpp"

namespace vatwright {
namespace {

constexpr double agrees_within = 1e-7;    // full models and line, relative
constexpr std::size_t most_tried = 4096;  // hookups rated in full before all must be visited

/// Finds and rates what may stand in the places asked.
class Places {
 public:
  Places(const OnOneLine& on, const Rater& rater) : on_(on), rater_(rater), options_(rater.options()) {
    by_ceiling_ = by_ceiling(options_.by);
    rate_alone();
    best_.emplace(on.line(), on.bound(), on.twins(), classes_, on.vessels(), duty_feed(),
                  by_ceiling_ ? on.z_target() : std::nullopt, options_.threads);
  }

  std::optional<RankedSet> run() {
    const auto top = static_cast<std::size_t>(std::max(0, options_.top));
    if (by_ceiling_ && on_.never_reached()) {
      rate_simplest(top);
    } else if (!classes_.empty()) {
      if (options_.by == By::fit)
        find_by_fit(top);
      else
        short_of_places_ = find(1, options_.most, top, [](const Entry& e) { return !e.breaks_limit; }) < top;
      for (int n = 1; n <= options_.most && !gave_up_; ++n) find_first_of(n);
    }
    if (short_of_places_ || gave_up_ || failed_) return std::nullopt;
    RankedSet set;
    add_today(set);
    if (gave_up_ || failed_) return std::nullopt;
    for (const Entry& e : entries_) set.unsolved = set.unsolved || e.unsolved;
    set.rated = static_cast<long long>(entries_.size());
    set.complete = "proved";
    set.within = on_.within(options_.by, entries_, cost_.gap);
    if (split_within_limits_) {
      set.complete = "partly";
      set.why_partly = "where a limit moves the best split, that split is the best found";
      set.within.reset();
    }
    set.entries = std::move(entries_);
    return set;
  }

 private:
  using Accepted = std::function<bool(const Entry&)>;
  double duty_feed() const { return rater_.problem().duty.target.feed_m3_s; }
  // What can not be calculated stands before what does not fit, and is not on the line.
  bool all_on_line() const { return on_.classes().size() == on_.twins().classes().size(); }
  double figure(const Entry& e) const { return figure_of(e, options_.by); }

  // Every class by itself: what breaks a limit whatever flows is left out of the search.
  void rate_alone() {
    for (const std::size_t c : on_.classes()) {
      Hookup alone{Hookup::Join::vessel, on_.twins().classes()[c].front(), {}, {}};
      Chooser chooser(rater_.problem(), alone, Objective{});
      if (chooser.never_fits(duty_feed())) continue;
      classes_.push_back(c);
      const Entry e = rater_.rate(std::move(alone));
      cannot_tell_ = cannot_tell_ || e.verdict == Verdict::cannot_tell;
    }
  }

  // Nothing reaches the target at any rate: no figure orders, so fewer vessels come first. One and two vessels fill the
  // places of any site that has some; else, or where verdicts or texts alone order across sizes, all are visited.
  void rate_simplest(std::size_t top) {
    std::vector<int> offered;
    for (const auto& c : on_.twins().classes()) offered.insert(offered.end(), c.begin(), c.end());
    std::sort(offered.begin(), offered.end());
    std::vector<Placed> placed;
    for (Hookup& h : list_space(on_.twins(), offered, std::min(2, options_.most), options_.most_rated).hookups)
      placed.push_back({{std::move(h)}});
    std::vector<const Placed*> all;
    for (const Placed& p : placed) all.push_back(&p);
    rated(all);
    const auto kept = std::ranges::count_if(entries_, [](const Entry& e) { return !e.breaks_limit; });
    short_of_places_ = options_.exact || cannot_tell_ || !all_on_line() || std::cmp_less(kept, top);
  }

  // Rates those not rated yet; the entries of all of them, in their order.
  std::vector<std::size_t> rated(const std::vector<const Placed*>& placed) {
    std::vector<std::size_t> at, open;
    std::vector<const Placed*> of_open;
    for (const Placed* p : placed) {
      const auto [known, is_new] = known_.try_emplace(on_.twins().key(p->at.hookup), entries_.size());
      at.push_back(known->second);
      if (!is_new) continue;
      open.push_back(entries_.size());
      of_open.push_back(p);
      entries_.emplace_back();
      values_.push_back(p->value);
    }
    for_each_index(open.size(), options_.threads, [&](std::size_t k) {
      Entry& e = entries_[open[k]];
      e = rater_.rate(of_open[k]->at.hookup);
      if (by_ceiling_ && on_.never_reached())
        e.ceiling.emplace();
      else if (by_ceiling_ && !e.breaks_limit)
        rater_.find_ceiling(e);
    });
    for (const std::size_t i : open) check(entries_[i], values_[i]);
    return at;
  }

  // The full models must say what the line says, less where a limit is in the way.
  void check(const Entry& e, double on_line) {
    if (e.unsolved) failed_ = true;
    if (by_ceiling_ ? e.breaks_limit || on_.never_reached() : !e.reach) return;
    const double full = by_ceiling_ ? figure(e) : *e.reach;
    const double same = on_.figure_at(options_.by, on_line);
    const double missed =
        by_ceiling_ ? BestOnLine::ceiling_missed * same : on_.figure_at(options_.by, BestOnLine::missed);
    if (full > same * (1 + agrees_within) + missed) failed_ = true;
    if (full < same * (1 - agrees_within) && e.free_shares > 0) split_within_limits_ = true;
  }

  /// Makes sure that the first `places` of the accepted among hookups of fewest .. most vessels are rated; how many
  /// there are, at most `places`.
  std::size_t find(int fewest, int most, std::size_t places, const Accepted& accepted, double floor = 0) {
    if (places == 0 || gave_up_) return 0;
    for (std::size_t asked = places;; asked *= 2) {
      const BestFound found = best_->find({fewest, std::min(most, options_.most), asked, false, floor});
      add(found.cost);
      std::vector<double> good = figures(found, accepted);
      const double complete = on_.figure_at(options_.by, found.complete_above);
      const bool whole = found.all.size() < asked;
      if (!whole && (good.size() < places || good[places - 1] < complete * (1 - 1e-9))) {
        if (asked <= most_tried) continue;
        gave_up_ = true;
        return good.size();
      }
      if (!options_.exact) fill_last_group(fewest, most, places, good, whole ? 0 : complete, accepted);
      return std::min(places, good.size());
    }
  }

  std::vector<double> figures(const BestFound& found, const Accepted& accepted) {
    std::vector<const Placed*> placed;
    for (const Placed& p : found.all) placed.push_back(&p);
    std::vector<double> good;
    for (const std::size_t i : rated(placed))
      if (accepted(entries_[i])) good.push_back(figure(entries_[i]));
    std::sort(good.begin(), good.end(), std::greater<>());
    return good;
  }
  // The group that holds the last place is ordered by fewer vessels and shares first: all of it counts.
  void fill_last_group(int fewest, int most, std::size_t places, const std::vector<double>& good, double complete,
                       const Accepted& accepted) {
    std::size_t before = 0, after = 0;
    double end = 0;
    while (before < good.size()) {
      end = good[before] * (1 - as_good_as);
      after = static_cast<std::size_t>(
          std::partition_point(good.begin(), good.end(), [&](double v) { return v >= end; }) - good.begin());
      if (after >= places || after == good.size()) break;
      before = after;
    }
    if (good.empty() || end >= complete) return;
    const std::size_t open = places - before;
    const double best = good[before];
    for (std::size_t asked = places;; asked *= 2) {
      const BestFound found = best_->find(
          {fewest, std::min(most, options_.most), asked, true, on_.place_of(options_.by, end * (1 - 1e-8))});
      add(found.cost);
      if (shapes_filled(found, asked, open, {end, best}, accepted)) return;
      if (asked > most_tried) gave_up_ = true;
      if (gave_up_) return;
    }
  }

  // Shape by shape from the simplest on, until the places are taken.
  bool shapes_filled(const BestFound& found, std::size_t asked, std::size_t open, std::pair<double, double> group,
                     const Accepted& accepted) {
    std::map<std::pair<int, int>, std::vector<const Placed*>> by_shape;
    for (const Placed& p : found.all) by_shape[{p.at.vessels, p.at.free_shares}].push_back(&p);
    std::size_t taken = 0;
    for (const auto& [shape, placed] : by_shape) {
      std::size_t of_shape = 0;
      for (const std::size_t i : rated(placed))
        if (accepted(entries_[i]) && figure(entries_[i]) >= group.first && figure(entries_[i]) <= group.second)
          ++of_shape;
      taken += of_shape;
      if (taken >= open) return true;
      if (placed.size() >= asked) return false;  // there may be more of this shape
    }
    return true;
  }

  void find_by_fit(std::size_t top) {
    std::size_t open = top;
    for (const Verdict verdict : {Verdict::fits, Verdict::cannot_tell, Verdict::does_not_fit})
      for (int n = 1;
           n <= (options_.exact ? 1 : options_.most) && open > 0 && (all_on_line() || verdict == Verdict::fits); ++n)
        open -= find_of(verdict, n, options_.exact ? options_.most : n, open);
    short_of_places_ = open > 0;
  }
  std::size_t find_of(Verdict verdict, int fewest, int most, std::size_t places, double least = 0) {
    if (verdict == Verdict::cannot_tell && !cannot_tell_) return 0;
    const double floor = verdict == Verdict::fits ? std::max(least, duty_feed() * (1 - 1e-9)) : least;
    return find(
        fewest, most, places, [verdict](const Entry& e) { return e.verdict == verdict && !e.breaks_limit; }, floor);
  }
  void find_first_of(int n) {
    if (options_.by != By::fit) {
      find(n, n, 1, [](const Entry& e) { return !e.breaks_limit; });
      return;
    }
    for (const Verdict verdict : {Verdict::fits, Verdict::cannot_tell, Verdict::does_not_fit})
      if (find_of(verdict, n, n, 1) > 0) return;
  }

  void add_today(RankedSet& set) {
    if (!options_.today) return;
    set.today = rater_.rate(*options_.today);
    if (by_ceiling_) rater_.find_ceiling(*set.today);
    set.unsolved = set.unsolved || set.today->unsolved;
    const auto vessels = vessels_of(*options_.today);
    const bool offered = std::ranges::all_of(vessels, [&](int v) { return on_.twins().class_of(v) >= 0; });
    set.today_listed = offered && all_free(*options_.today);
    if (set.today->breaks_limit || !std::isfinite(figure(*set.today)) || !all_better_are_rated(*set.today)) return;
    std::vector<Entry> all = entries_;
    std::size_t place = all.size();
    const auto known = set.today_listed ? known_.find(on_.twins().key(*options_.today)) : known_.end();
    if (known == known_.end())
      all.push_back(*set.today);
    else
      place = known->second;
    const auto order = in_order(all, options_);
    set.today_place = 1 + (std::ranges::find(order, place) - order.begin());
  }

  // Whether all that comes before this one is rated now; not where that would be very many.
  bool all_better_are_rated(const Entry& today) {
    constexpr std::size_t many = 1000;
    const double least = figure(today) * (1 - as_good_as);
    if (options_.by != By::fit)
      return find(
                 1, options_.most, many, [](const Entry& e) { return !e.breaks_limit; },
                 on_.place_of(options_.by, least)) < many;
    for (const Verdict verdict : {Verdict::fits, Verdict::cannot_tell, Verdict::does_not_fit}) {
      const bool last = verdict == today.verdict;
      for (int n = 1; n <= (last ? today.vessel_count : options_.most); ++n)
        if (find_of(verdict, n, n, many, last && n == today.vessel_count ? least : 0) >= many) return false;
      if (last) break;
    }
    return true;
  }

  void add(const LineSearch::Cost& cost) {
    cost_.add(cost);
    failed_ = failed_ || cost.failed;
  }

  const OnOneLine& on_;
  const Rater& rater_;
  const RankOptions& options_;
  bool by_ceiling_ = false;
  std::vector<std::size_t> classes_;  // to be searched
  std::optional<BestOnLine> best_;
  std::vector<Entry> entries_;
  std::vector<double> values_;  // on the line
  std::map<std::string, std::size_t> known_;
  LineSearch::Cost cost_;
  bool cannot_tell_ = false, failed_ = false, gave_up_ = false, short_of_places_ = false, split_within_limits_ = false;
};

}  // namespace

std::optional<RankedSet> rank_on_line(const OnOneLine& on, const Rater& rater) { return Places(on, rater).run(); }

}  // namespace vatwright
