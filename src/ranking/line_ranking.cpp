#include "line_ranking.hpp"

#include <algorithm>
#include <cmath>
#include <functional>
#include <set>

#include "best_on_line.hpp"
#include "space.hpp"
#include "vatwright/numeric/pool.hpp"
#include "vatwright/numeric/root.hpp"
#include "vatwright/vessel/pressure_drop.hpp"

namespace vatwright {
namespace {

constexpr double as_good_as = 1e-3;       // of values in one group of the order
constexpr double of_maps = 1e-8;          // what vessel maps and told splits may miss, in z
constexpr double agrees_within = 1e-7;    // full models and line, relative
constexpr std::size_t most_tried = 4096;  // hookups rated in full before all must be visited

/// What z = 1 yields of a species; absent: nothing.
std::optional<double> yield_at_end(const Objective& yield, const Duty& duty, const Line& line) {
  Stream one = whole_feed(duty);
  one.xi_mol_m3[0] += 1;
  const double X = duty.chemistry.kinetics.conversion(one.xi_mol_m3);
  const auto made = value_of(yield, duty, one);
  if (!made || !(*made > 0) || !(X > 0)) return std::nullopt;
  return *made / line.place(X);
}

/// The flow at which a liquid loses just the pressure that a tube may cost; absent: it may cost any, or none is known.
std::optional<double> flow_at_pressure_drop(const Problem& problem, int vessel) {
  const Vessel& v = problem.site.vessels[static_cast<std::size_t>(vessel)];
  const Feed& feed = problem.duty.chemistry.feed;
  if (!v.pressure_drop_Pa || feed.phase != Phase::liquid || !feed.viscosity_Pa_s || !feed.density_kg_m3)
    return std::nullopt;
  const auto over = [&](double ln_q) {
    const Flow flow{std::exp(ln_q) * *feed.density_kg_m3, *feed.density_kg_m3, *feed.viscosity_Pa_s};
    return pressure_gradient(v.kind, flow) * length_of(v.kind) - *v.pressure_drop_Pa;
  };
  const double lo = std::log(1e-12), hi = std::log(1e6);
  if (!(over(lo) < 0 && over(hi) > 0)) return std::nullopt;
  const auto root = find_root(over, lo, hi, {.rel_tol = 0, .abs_tol = 1e-12});
  return answer(root) ? std::optional(std::exp(*answer(root))) : std::nullopt;
}

constexpr double at_the_end = 1 - 1e-7;  // as far along the line as a target may lie to be a place on it

/// z from which on all that the target asks is met: 1 where it is met nowhere. Absent: it is met in some other part of
/// the line, or not a matter of z alone.
std::optional<double> place_of_target(const Duty& duty, const Line& line) {
  const Objective objective = objective_of(duty);
  if (is_all_of_target(objective, duty)) {  // one figure that is linear in z
    if (objective.of == Objective::Of::conversion) return std::min(1.0, line.place(*duty.target.conversion));
    if (objective.of != Objective::Of::yield) return std::nullopt;
    const auto yield = yield_at_end(objective, duty, line);
    return yield ? std::optional(std::min(1.0, duty.target.demands[0].bound / *yield)) : std::nullopt;
  }
  if (duty.chemistry.feed.phase == Phase::gas) return std::nullopt;  // concentrations there depend on more
  const auto met = [&](double z) {
    Stream there = whole_feed(duty);
    there.xi_mol_m3[0] = line.extent(z);
    return std::ranges::all_of(check_target(duty, there), [](const TargetItem& item) { return item.met; });
  };
  constexpr int places = 400;
  double lo = 0, hi = 1;
  bool any = false;
  for (int i = 1; i < places; ++i) {
    const double z = i == places - 1 ? at_the_end : static_cast<double>(i) / places;
    const bool here = met(z);
    if (any && !here) return std::nullopt;
    if (!here) lo = z;
    if (here && !any) hi = z;
    any = any || here;
  }
  if (!any) return 1.0;
  if (met(0)) return std::nullopt;
  for (int i = 0; i < 60; ++i) (met((lo + hi) / 2) ? hi : lo) = (lo + hi) / 2;
  return hi;
}

}  // namespace

OnOneLine::OnOneLine(Line line, Twins twins, const Problem& problem)
    : line_(std::move(line)),
      bound_(line_),
      twins_(std::move(twins)),
      vessels_(on_lines(line_, twins_, problem.site.vessels.size())),
      z_target_(place_of_target(problem.duty, line_)) {
  const Objective objective = objective_of(problem.duty);
  if (objective.of == Objective::Of::yield) yield_per_z_ = yield_at_end(objective, problem.duty, line_).value_or(0);
}

std::unique_ptr<OnOneLine> OnOneLine::find(const Problem& problem, const std::vector<int>& offered,
                                           const RankOptions& options) {
  if (offered.empty()) return nullptr;
  const Twins classes(problem, offered);
  std::vector<int> firsts;
  for (const auto& c : classes.classes()) firsts.push_back(c.front());
  std::string why;
  auto line = Line::find(problem, firsts, why);
  if (!line) return nullptr;
  for (std::size_t c = 0; c < firsts.size(); ++c)
    if (const auto cap = flow_at_pressure_drop(problem, firsts[c])) line->narrow(c, *cap);
  const bool falls = line->falls();
  std::unique_ptr<OnOneLine> made(new OnOneLine(*std::move(line), Twins(problem, offered, falls), problem));
  const bool by_ceiling = options.by == By::fit || options.by == By::ceiling;
  if (options.by == By::yield && !(made->yield_per_z_ > 0)) return nullptr;
  if (by_ceiling && !(made->z_target_ && *made->z_target_ > 0)) return nullptr;
  return made;
}

bool OnOneLine::on_the_line(const Hookup& hookup) const {
  return std::ranges::all_of(vessels_of(hookup),
                             [&](int v) { return vessels_[static_cast<std::size_t>(v)] != nullptr; });
}

KnownShares OnOneLine::shares_of(const Hookup& hookup) const {
  return on_the_line(hookup) ? shares_on(line_, vessels_, hookup) : KnownShares{};
}

std::optional<double> OnOneLine::ceiling_of(const Hookup& hookup) const {
  if (!z_target_ || *z_target_ >= at_the_end || !on_the_line(hookup)) return std::nullopt;
  Splits splits(line_, told_tolerance);
  double volume = 0;
  for (const int v : vessels_of(hookup)) volume += vessels_[static_cast<std::size_t>(v)]->volume_m3;
  // z falls as the feed rises: from the most that could be reached, down to where it is
  double q = std::min(1.01 * volume / bound_.time(*z_target_), feed_lines_pass(hookup, vessels_));
  for (int i = 0; i < 60; ++i, q /= 2)
    if (splits.best(hookup, vessels_, 0, q, 0).z >= *z_target_)
      return BestOnLine::ceiling(hookup, vessels_, *z_target_, q, feed_lines_pass(hookup, vessels_), splits);
  return std::nullopt;
}

double OnOneLine::figure_at(By by, double value) const {
  if (by == By::fit || by == By::ceiling) return value;
  return by == By::yield ? value * yield_per_z_ : line_.conversion(value);
}

double OnOneLine::place_of(By by, double figure) const {
  if (by == By::fit || by == By::ceiling) return figure;
  return by == By::yield ? figure / yield_per_z_ : line_.place(figure);
}

std::vector<KeptOut> OnOneLine::kept_out(const Rater& rater, const Entry& first) const {
  constexpr std::size_t most_told = 3;
  const RankOptions& options = rater.options();
  std::vector<std::size_t> classes;
  for (std::size_t c = 0; c < twins_.classes().size(); ++c)
    if (line_.vessels()[c]) classes.push_back(c);
  if (classes.empty() || (rater.needs_ceilings() && *z_target_ >= at_the_end)) return {};
  const Line wide = line_.without_caps();
  const Bound bound(wide);
  const OnLines vessels = on_lines(wide, twins_, vessels_.size());
  const BestOnLine best(wide, bound, twins_, classes, vessels, rater.problem().duty.target.feed_m3_s,
                        rater.needs_ceilings() ? z_target_ : std::nullopt, options.threads);
  std::vector<KeptOut> out;
  for (const Placed& p : best.find({.fewest = 1, .most = options.most, .places = most_told}).all) {
    const double value = figure_at(options.by, p.value);
    if (out.size() == most_told || value <= figure_of(first, options.by) * (1 + as_good_as)) break;
    const KnownShares shares = shares_on(wide, vessels, p.at.hookup);
    const HookupRating rating = rate_hookup(rater.problem(), p.at.hookup, {.windows = false, .known_shares = shares});
    const bool broken = std::ranges::any_of(rating.vessels, [](const Rating& v) {
      return std::ranges::any_of(v.limits, [](const Limit& l) { return l.state == Limit::State::broken; });
    });
    if (broken) out.push_back({rating.text, value, rating.whole.stands_in_the_way});
  }
  return out;
}

double OnOneLine::within(const Rater& rater, const std::vector<Entry>& entries, double gap) const {
  const double dz = gap + of_maps;
  if (!rater.needs_ceilings()) return figure_at(rater.options().by, dz);
  if (*z_target_ >= at_the_end) return 0;
  double most = 0;
  for (const Entry& e : entries) {
    if (!e.ceiling || !e.ceiling->feed_m3_s || !on_the_line(e.hookup)) continue;
    Splits splits(line_, told_tolerance);
    const double slope = splits.best(e.hookup, vessels_, 0, *e.ceiling->feed_m3_s, 0).dq;
    if (slope < 0) most = std::max(most, dz / -slope);
  }
  return most;
}

/// Finds and rates what may stand in the places asked.
class OnOneLine::Places {
 public:
  Places(const OnOneLine& on, const Rater& rater) : on_(on), rater_(rater), options_(rater.options()) {
    by_ceiling_ = rater.needs_ceilings();
    for (std::size_t c = 0; c < on.twins_.classes().size(); ++c)
      if (on.line_.vessels()[c]) all_classes_.push_back(c);
    rate_alone();
    best_.emplace(on.line_, on.bound_, on.twins_, classes_, on.vessels_, duty_feed(),
                  by_ceiling_ ? on.z_target_ : std::nullopt, options_.threads);
  }

  std::optional<RankedSet> run() {
    const auto top = static_cast<std::size_t>(std::max(0, options_.top));
    const bool all_on_line = all_classes_.size() == on_.twins_.classes().size();
    if (by_ceiling_ && *on_.z_target_ >= at_the_end) {
      if (all_on_line)
        rate_simplest(top);
      else
        short_of_places_ = true;
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
    set.within = on_.within(rater_, entries_, cost_.gap);
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
  double figure(const Entry& e) const { return figure_of(e, options_.by); }

  // Every class by itself: what breaks a limit whatever flows is left out of the search.
  void rate_alone() {
    for (const std::size_t c : all_classes_) {
      Hookup alone{Hookup::Join::vessel, on_.twins_.classes()[c].front(), {}, {}};
      Chooser chooser(rater_.problem(), alone, Objective{});
      if (chooser.never_fits(duty_feed())) continue;
      classes_.push_back(c);
      const Entry e = rater_.rate(std::move(alone));
      cannot_tell_ = cannot_tell_ || e.verdict == Verdict::cannot_tell;
    }
  }

  // Nothing reaches the target at any rate: the order is that of limits, then of fewer vessels.
  void rate_simplest(std::size_t top) {
    for (int n = 1; n <= options_.most; ++n) {
      std::vector<Placed> placed;
      for (Hookup& h : hookups_of_size(n)) placed.push_back({{std::move(h), 0, n, 0}, 0});
      std::vector<const Placed*> all;
      for (const Placed& p : placed) all.push_back(&p);
      rated(all);
      std::size_t good = 0;
      for (const Entry& e : entries_) good += e.breaks_limit ? 0 : 1;
      if (good >= top) return;
      if (n >= 2) break;  // larger ones are as many as cannot be told quickly
    }
    short_of_places_ = true;
  }
  std::vector<Hookup> hookups_of_size(int n) const {
    std::vector<int> offered;
    for (const auto& c : on_.twins_.classes()) offered.insert(offered.end(), c.begin(), c.end());
    std::sort(offered.begin(), offered.end());
    std::vector<Hookup> of_size;
    for (Hookup& h : list_space(on_.twins_, offered, n, options_.most_rated).hookups)
      if (static_cast<int>(vessels_of(h).size()) == n) of_size.push_back(std::move(h));
    return of_size;
  }

  // Rates those not rated yet; the entries of all of them, in their order.
  std::vector<std::size_t> rated(const std::vector<const Placed*>& placed) {
    std::vector<std::size_t> at, open;
    std::vector<const Placed*> of_open;
    for (const Placed* p : placed) {
      const auto [known, is_new] = known_.try_emplace(on_.twins_.key(p->at.hookup), entries_.size());
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
      const bool never = by_ceiling_ && *on_.z_target_ >= at_the_end;
      if (never)
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
    if (by_ceiling_ ? e.breaks_limit || *on_.z_target_ >= at_the_end : !e.reach) return;
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
      if (good.size() < places && !whole) {
        if (asked > most_tried) gave_up_ = true;
        if (gave_up_) return good.size();
        continue;
      }
      if (!whole && good[places - 1] < complete * (1 - 1e-9)) continue;
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
    // What can not be calculated stands before what does not fit, and is not on the line.
    const bool all_on_line = all_classes_.size() == on_.twins_.classes().size();
    std::size_t open = top;
    for (const Verdict verdict : {Verdict::fits, Verdict::cannot_tell, Verdict::does_not_fit})
      for (int n = 1;
           n <= (options_.exact ? 1 : options_.most) && open > 0 && (all_on_line || verdict == Verdict::fits); ++n)
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
    const bool offered = std::ranges::all_of(vessels, [&](int v) { return on_.twins_.class_of(v) >= 0; });
    set.today_listed = offered && all_free(*options_.today);
    if (set.today->breaks_limit || !std::isfinite(figure(*set.today)) || !all_better_are_rated(*set.today)) return;
    std::vector<Entry> all = entries_;
    std::size_t place = all.size();
    const auto known = set.today_listed ? known_.find(on_.twins_.key(*options_.today)) : known_.end();
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
  std::vector<std::size_t> all_classes_, classes_;
  std::optional<BestOnLine> best_;
  std::vector<Entry> entries_;
  std::vector<double> values_;  // on the line
  std::map<std::string, std::size_t> known_;
  LineSearch::Cost cost_;
  bool cannot_tell_ = false, failed_ = false, gave_up_ = false, short_of_places_ = false, split_within_limits_ = false;
};

std::optional<RankedSet> OnOneLine::rank(const Rater& rater) const { return Places(*this, rater).run(); }

}  // namespace vatwright
