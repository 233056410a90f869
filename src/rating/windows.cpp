#include <algorithm>
#include <cmath>
#include <limits>
#include <utility>

#include "vatwright/numeric/root.hpp"
#include "vatwright/quantity/show.hpp"
#include "vatwright/rating/rating.hpp"

namespace vatwright {

namespace {
constexpr double per_decade = 8;            // samples: margins of real vessels turn over a factor of ten or so
constexpr double end_width = 1e-10;         // an end is known to this, relative
constexpr double one_rate = 1e-6;           // two ends this near count as one
constexpr double turned_negative = -1e-11;  // a margin that has left zero, not rounding
constexpr double worth_a_look = 0.1;        // squeezed margin: less than this between two samples is no jump
constexpr double is_a_jump = 1e-3;          // squeezed margin, left over at the width of an end
constexpr double rests_on_zero = -1e-14;    // a margin of zero but for rounding
constexpr double look_between = 4;          // how much further than the neighbours differ a turning point may reach

/// One trial, as the search sees it: x = ln(feed rate), m the smallest margin squeezed into (-1, 1), a failed trial -1.
struct Sample {
  double x = 0, feed_m3_s = 0, m = -1;
  bool inside = false;
  std::vector<std::optional<double>> margins = {};  ///< each by itself, in the order of the trial; none where it failed
};

double squeeze(double margin) { return margin / (1 + std::abs(margin)); }

double smallest_margin(const Trial& trial) {
  double least = std::numeric_limits<double>::infinity();
  for (const auto& [name, margin] : trial.margins) {
    if (margin && !(*margin >= least)) least = *margin;
  }
  return least;
}

/// Margins below zero at this trial, else the smallest: the name of an end.
std::optional<std::string> first_negative(const Trial& trial) {
  for (const auto& [name, margin] : trial.margins) {
    if (margin && *margin < turned_negative) return name;
  }
  return std::nullopt;
}

class Search {
 public:
  Search(const std::function<Trial(double)>& trial, double lo_m3_s, double hi_m3_s)
      : trial_(trial), lo_m3_s_(lo_m3_s), hi_m3_s_(hi_m3_s) {}

  Windows run() {
    sample_grid();
    look_for_jumps();
    look_between_samples();
    collect();
    return std::move(windows_);
  }

 private:
  const std::function<Trial(double)>& trial_;
  double lo_m3_s_, hi_m3_s_;
  std::vector<Sample> samples_;  // rising
  Windows windows_;

  Trial try_at(double feed_m3_s) {
    ++windows_.trials;
    Trial trial = trial_(feed_m3_s);
    const bool first_unsolved = trial.unsolved && !windows_.unsolved;  // goes before what only lacks data
    if (trial.fails && !trial.fails_why.empty() && (windows_.why.empty() || first_unsolved)) {
      windows_.why = "at " + show(feed_m3_s, Shown::feed) + ": " + trial.fails_why;
    }
    windows_.unsolved = windows_.unsolved || trial.unsolved;
    return trial;
  }

  Sample sample(double x, double feed_m3_s) {
    const Trial trial = try_at(feed_m3_s);
    if (trial.fails) return {x, feed_m3_s, -1, false};
    const double least = smallest_margin(trial);
    const double m = std::isinf(least) && least > 0 ? 1 : squeeze(least);
    Sample s{x, feed_m3_s, m, least >= -holds_within};
    for (const auto& [name, margin] : trial.margins) s.margins.push_back(margin);
    return s;
  }
  Sample sample(double x) { return sample(x, std::exp(x)); }

  void sample_grid() {
    const double a = std::log(lo_m3_s_), b = std::log(hi_m3_s_);
    const int n = std::max(2, static_cast<int>(std::ceil((b - a) / std::log(10.0) * per_decade)));
    samples_.reserve(static_cast<std::size_t>(n) + 8);
    samples_.push_back(sample(a, lo_m3_s_));
    for (int i = 1; i < n; ++i) samples_.push_back(sample(a + (b - a) * i / n));
    samples_.push_back(sample(b, hi_m3_s_));
  }

  /// How far apart two samples on one side lie: outside by the smallest margin, inside by the one that differs most
  /// (one that rests near zero, such as the most working fill, would hide the others).
  static double apart(const Sample& a, const Sample& b) {
    double most = std::abs(a.m - b.m);
    if (!a.inside || a.margins.size() != b.margins.size()) return most;
    for (std::size_t k = 0; k < a.margins.size(); ++k)
      if (a.margins[k] && b.margins[k])
        most = std::max(most, std::abs(squeeze(*a.margins[k]) - squeeze(*b.margins[k])));
    return most;
  }

  /// Where the margins jump between two samples on one side, both sides of the jump are samples too: a window may open
  /// or close right behind it.
  void look_for_jumps() {
    std::vector<Sample> found;
    for (std::size_t i = 1; i < samples_.size(); ++i) {
      Sample a = samples_[i - 1], b = samples_[i];
      if (a.inside != b.inside || apart(a, b) < worth_a_look) continue;
      while (b.x - a.x > end_width && apart(a, b) >= worth_a_look) {
        const double middle = a.x + (b.x - a.x) / 2;
        if (middle == a.x || middle == b.x) break;
        const Sample c = sample(middle);
        if (c.inside != a.inside) {
          found.push_back(c);
          break;
        }
        (apart(c, a) > apart(b, c) ? b : a) = c;
      }
      if (apart(a, b) < worth_a_look) continue;
      found.push_back(a);
      found.push_back(b);
    }
    put_in(found);
  }

  void put_in(const std::vector<Sample>& found) {
    samples_.insert(samples_.end(), found.begin(), found.end());
    std::sort(samples_.begin(), samples_.end(), [](const Sample& a, const Sample& b) { return a.x < b.x; });
  }

  /// Where three samples lie on one side and the middle one is nearest to the other, the turning point may lie beyond
  /// it. Outside, all margins must be met at once: the smallest is followed. Inside, one that is broken ends it: each
  /// is followed by itself, as one that rests near zero (the most working fill) would hide the others.
  void look_between_samples() {
    std::vector<Sample> found;
    for (std::size_t i = 1; i + 1 < samples_.size(); ++i) {
      const Sample &l = samples_[i - 1], &c = samples_[i], &r = samples_[i + 1];
      if (l.inside != c.inside || r.inside != c.inside) continue;
      if (!c.inside) {
        look_beyond(found, l, c, r, [](const Sample& s) { return s.m; });
        continue;
      }
      for (std::size_t k = 0; k < c.margins.size(); ++k) {
        look_beyond(found, l, c, r,
                    [k](const Sample& s) { return k < s.margins.size() ? squeeze(s.margins[k].value_or(1)) : s.m; });
      }
    }
    put_in(found);
  }

  template <typename MarginOf>
  void look_beyond(std::vector<Sample>& found, const Sample& l, const Sample& c, const Sample& r, MarginOf margin_of) {
    const double sign = c.inside ? -1 : 1;  // outside: the greatest is looked for; inside: the least
    const double at = margin_of(c), left = sign * (at - margin_of(l)), right = sign * (at - margin_of(r));
    if (left < 0 || right < 0 || std::max(left, right) <= -turned_negative) return;
    if (std::abs(at) > look_between * std::max(left, right)) return;
    std::optional<Sample> best;
    const auto height = [&](double x) {
      const Sample s = sample(x);
      if (s.inside != c.inside && (!best || sign * s.m > sign * best->m)) best = s;
      return sign * margin_of(s);
    };
    find_peak(height, l.x, r.x, 1e-7);
    if (best) found.push_back(*best);
  }

  struct End {
    Sample in, out;
  };
  /// The end between a sample inside and one outside: a crossing of zero, or a jump. A margin that rests on zero (a
  /// hold temperature that equals the rating, a conversion of 1) is followed to where it leaves zero, one that is a
  /// little below to the edge of what still holds.
  End refine(Sample in, Sample out) {
    const double shift = in.m > 0 ? 0 : in.m >= rests_on_zero ? -rests_on_zero : 2 * holds_within;
    const auto narrow = [&](double x) {
      const Sample s = sample(x);
      if ((s.x - in.x) * (s.x - out.x) < 0) (s.inside && s.m + shift >= 0 ? in : out) = s;
      return s.m + shift;
    };
    const auto f = [&](double x) { return x == in.x ? in.m + shift : x == out.x ? out.m + shift : narrow(x); };
    const auto root =
        find_root(f, std::min(in.x, out.x), std::max(in.x, out.x), {.rel_tol = 0, .abs_tol = end_width / 4});
    if (const double* x = answer(root)) {  // it may have come from one side only: close in from both
      narrow(*x - end_width / 4);
      narrow(*x + end_width / 4);
    }
    for (double width = std::abs(out.x - in.x); width > end_width; width = std::abs(out.x - in.x)) {
      const double middle = in.x + (out.x - in.x) / 2;
      if (middle == in.x || middle == out.x) break;
      narrow(middle);
    }
    if (std::abs(in.m - out.m) > is_a_jump && out.m > -1) windows_.jumps_m3_s.push_back(in.feed_m3_s);
    return {in, out};
  }

  /// The end between two neighbours. A sample that happens to sit on the zero itself, with room behind it, is an end,
  /// not a margin that rests there.
  End end_at(std::size_t in, std::size_t out) {
    const std::size_t behind = in > out ? in + 1 : in - 1;  // wraps below 0, so both ends fail the next line
    const bool on_zero = samples_[in].m <= 0 && behind < samples_.size() && samples_[behind].m > 0;
    return on_zero ? refine(samples_[behind], samples_[in]) : refine(samples_[in], samples_[out]);
  }

  std::optional<std::string> name_of(const End& end) {
    const double further = end.out.feed_m3_s * (end.out.x > end.in.x ? 1 + one_rate : 1 - one_rate);
    const Trial probe = try_at(further);
    if (!probe.fails) {
      if (auto name = first_negative(probe)) return name;
    }
    const Trial at = try_at(end.out.feed_m3_s);
    if (!at.fails) {
      if (auto name = first_negative(at)) return name;
      return least_name(at);
    }
    if (!at.fails_by.empty()) return at.fails_by;
    return std::nullopt;
  }

  static std::optional<std::string> least_name(const Trial& trial) {
    const double least = smallest_margin(trial);
    for (const auto& [name, margin] : trial.margins) {
      if (margin && *margin == least) return name;
    }
    return std::nullopt;
  }

  void collect() {
    std::optional<End> lower, upper;
    for (std::size_t i = 0; i < samples_.size(); ++i) {
      const bool before = i > 0 && samples_[i - 1].inside;
      if (samples_[i].inside && !before) {
        windows_.intervals.emplace_back();
        lower.reset(), upper.reset();
        if (i > 0) lower = end_at(i, i - 1);
        if (lower) windows_.intervals.back().lo = lower->in.feed_m3_s;
      }
      if (!samples_[i].inside && before) {
        upper = end_at(i - 1, i);
        windows_.intervals.back().hi = upper->in.feed_m3_s;
      }
    }
    if (windows_.intervals.empty()) return;
    windows_.floor_m3_s = windows_.intervals.back().lo;
    windows_.ceiling_m3_s = windows_.intervals.back().hi;
    if (lower) windows_.ends.floor = name_of(*lower);
    if (upper) windows_.ends.ceiling = name_of(*upper);
  }
};
}  // namespace

std::pair<double, double> search_range(double fluid_volume_m3) {
  return {1e-6 * fluid_volume_m3 / 3600, 1e8 * fluid_volume_m3 / 3600};
}
Assumed assumed_search() {
  return {"windows", "1e-6 to 1e8 fluid volumes per hour",
          "the range of feed rates searched; an end that reaches it is left open"};
}

Windows find_windows(const std::function<Trial(double feed_m3_s)>& trial, double lo_m3_s, double hi_m3_s) {
  return Search(trial, lo_m3_s, hi_m3_s).run();
}

}  // namespace vatwright
