#include "ceiling.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <utility>

#include "vatwright/numeric/root.hpp"

namespace vatwright {
namespace {

constexpr double step_down = 1.3335214321633240;  // 10^(1/8)
constexpr double first_factor = 1.3;
constexpr double span = 100;  // of rates looked at in one go, from the top

class CeilingSearch {
 public:
  CeilingSearch(Chooser& chooser, double from) : chooser_(chooser), range_(search_range(chooser.network())) {
    from_ = std::clamp(from, range_.first, range_.second);
    target_ = target();
  }

  bool falls() const {
    const Duty& duty = chooser_.problem().duty;
    const Kinetics& k = duty.chemistry.kinetics;
    if (k.reactions() != 1 || duty.thermal == Thermal::jacketed) return false;
    const bool reversible = k.reaction(0).equilibrium || k.reaction(0).reverse;
    if (reversible && !duty.operation_of.empty()) return false;  // a vessel at its own temperature may run backwards
    return is_all_of_target(chooser_.objective(), duty) && chooser_.objective().of == Objective::Of::conversion;
  }

  Ceiling by_turns(std::vector<double> shares) {
    double q = from_;
    for (int turn = 0; turn < 12; ++turn) {
      const auto end = crossing(q, shares);
      if (!end) return whole_window();
      const bool still = turn > 0 && std::abs(*end - q) <= 1e-11 * q;
      q = *end;
      if (q <= range_.first && levelled_off(shares)) return {};
      if (still || q >= range_.second) break;
      if (chooser_.space().dimensions() == 0) break;
      const auto best = chooser_.choose_free(q);
      if (!best) return whole_window();
      if (best->value < target_ - 1e-9) break;  // not better than the shares that just meet it
      shares = best->shares;
    }
    if (q <= range_.first && !inside(range_.first)) return {};
    return below(q);
  }

  /// Whether a window ends at `from`: shares are known at every rate, and just above it the target is missed or a feed
  /// line is full.
  bool ends_there() { return inside(from_) && !inside(from_ * (1 + 1e-6)); }

  /// The uppermost window, looked for downwards from the most that the feed lines pass.
  Ceiling whole_window() {
    const double cap = flow_cap(chooser_.problem(), chooser_.network().hookup()), top = std::min(range_.second, cap);
    for (double hi = top; hi > range_.first;) {
      const double lo = std::max(range_.first, hi / span);
      Ceiling found = told(windows_between(lo, hi));
      if (found.feed_m3_s) return found;
      if (found.open && hi < range_.second) return {false, hi, found.unsolved};
      if (found.open) return found;
      hi = lo;
    }
    return {false, std::nullopt, unsolved_};
  }
  /// false: conversion falls with the rate, and no shares meet the target at q.
  bool may_meet(double q) {
    if (!falls()) return true;
    const auto best = chooser_.choose_free(q);
    return !best || best->value >= target_ - 1e-9;
  }

 private:
  double target() const { return chooser_.problem().duty.target.conversion.value_or(0); }

  Trial trial(double q) {
    return trial_of(chooser_.problem(), chooser_.network(), chooser_.choose(q, Purpose::window));
  }
  bool inside(double q) {
    const Trial t = trial(q);
    unsolved_ = unsolved_ || t.unsolved;
    return !t.fails && std::all_of(t.margins.begin(), t.margins.end(),
                                   [](const auto& m) { return !m.second || *m.second >= -holds_within; });
  }
  Windows windows_between(double lo, double hi) {
    return find_windows([&](double q) { return trial(q); }, lo, hi);
  }
  Ceiling told(const Windows& w) {
    Ceiling c;
    unsolved_ = unsolved_ || w.unsolved;
    c.unsolved = unsolved_;
    c.feed_m3_s = w.ceiling_m3_s;
    c.open = !w.intervals.empty() && !w.ceiling_m3_s;
    return c;
  }

  // Still short of the target at almost no feed, and ten times that makes no difference: no shares do better there.
  bool levelled_off(const std::vector<double>& shares) {
    const auto least = chooser_.value_at(range_.first, shares), more = chooser_.value_at(10 * range_.first, shares);
    return least && more && *least < target_ - 1e-9 && std::abs(*least - *more) < 1e-9;
  }

  // The feed rate at which these shares just meet the target; an end of the search where they do at all or none.
  std::optional<double> crossing(double q, const std::vector<double>& shares) {
    bool failed = false;
    const auto over = [&](double x) {
      const auto v = chooser_.value_at(std::exp(x), shares);
      failed = failed || !v;
      return v.value_or(0) - target_ + 0.5 * holds_within * target_;
    };
    double a = std::log(q), fa = over(a), step = std::log(first_factor);
    const double end = std::log(fa >= 0 ? range_.second : range_.first);
    for (double b = a; !failed; step *= 2) {
      b = fa >= 0 ? std::min(end, a + step) : std::max(end, a - step);
      const double fb = over(b);
      if (failed) break;
      if ((fa >= 0) != (fb >= 0)) return refined(over, std::min(a, b), std::max(a, b));
      if (b == end) return std::exp(end);
      a = b, fa = fb;
    }
    return std::nullopt;
  }
  template <class Over>
  std::optional<double> refined(const Over& over, double a, double b) {
    const auto root = find_root(over, a, b, {.rel_tol = 0, .abs_tol = 1e-12});
    return answer(root) ? std::optional(std::exp(*answer(root))) : std::nullopt;
  }

  // The uppermost rate inside, at or below q: at q itself where no limit is in the way.
  Ceiling below(double q) {
    if (inside(q)) return q >= range_.second ? Ceiling{true, std::nullopt, unsolved_} : Ceiling{false, q, unsolved_};
    double above = q;
    while (above > range_.first) {
      double next = std::max(range_.first, above / step_down);
      if (above > from_ && next < from_) next = from_;  // the duty's own rate is looked at
      if (inside(next)) {
        Ceiling found = told(windows_between(next, above));
        if (std::exchange(found.open, false)) found.feed_m3_s = above;  // it ends just there
        return found;
      }
      above = next;
    }
    return {false, std::nullopt, unsolved_};
  }

  Chooser& chooser_;
  std::pair<double, double> range_;
  double from_ = 0, target_ = 0;
  bool unsolved_ = false;
};

}  // namespace

double flow_cap(const Problem& problem, const Hookup& hookup) {
  return most_flow(hookup, [&](int vessel) {
    return problem.site.vessels[static_cast<std::size_t>(vessel)].feed_line_m3_s.value_or(
        std::numeric_limits<double>::infinity());
  });
}

bool may_reach(Chooser& chooser, double feed_m3_s) {
  if (flow_cap(chooser.problem(), chooser.network().hookup()) < feed_m3_s * (1 - 1e-9)) return false;
  return CeilingSearch(chooser, feed_m3_s).may_meet(feed_m3_s);
}

Ceiling find_ceiling(Chooser& chooser, double from_m3_s, std::vector<double> start, Near near) {
  if (chooser.never_fits(from_m3_s)) return {false, std::nullopt, false, true};
  CeilingSearch search(chooser, from_m3_s);
  if (near == Near::known && search.ends_there()) return {false, from_m3_s, false, true};
  Ceiling found = search.falls() ? search.by_turns(std::move(start)) : search.whole_window();
  found.certain = chooser.space().dimensions() == 0;
  return found;
}

}  // namespace vatwright
