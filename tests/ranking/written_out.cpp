#include "written_out.hpp"

#include <algorithm>
#include <bit>
#include <cmath>
#include <functional>
#include <limits>
#include <numbers>

namespace vatwright::test {
namespace {

using Join = Hookup::Join;
using Set = unsigned;
constexpr double none = std::numeric_limits<double>::infinity();

Hookup joined(Join join, std::vector<Hookup> parts) {
  Hookup h{join, -1, std::move(parts), {}};
  if (join == Join::beside) h.shares.assign(h.parts.size(), std::nullopt);
  return h;
}

/// Every hookup of a set by its top: a series is a block that is none, then a block or a series; a beside is the
/// branch with the lowest vessel, that is none, and what stands beside it.
std::vector<Hookup> on(Set set) {
  std::vector<Hookup> all;
  if ((set & (set - 1)) == 0) {
    int i = 0;
    while (!(set >> i & 1u)) ++i;
    return {Hookup{Join::vessel, i, {}, {}}};
  }
  for (const Join join : {Join::then, Join::beside})
    for (Set first = (set - 1) & set; first > 0; first = (first - 1) & set) {
      if (join == Join::beside && !(first & (set & (~set + 1)))) continue;
      for (const Hookup& a : on(first)) {
        if (a.join == join) continue;
        for (const Hookup& b : on(set & ~first)) {
          std::vector<Hookup> parts = {a};
          if (b.join == join)
            parts.insert(parts.end(), b.parts.begin(), b.parts.end());
          else
            parts.push_back(b);
          all.push_back(joined(join, std::move(parts)));
        }
      }
    }
  return all;
}

/// The most that may pass.
double most_through(const SmallPlant& plant, const Hookup& h) {
  if (h.join == Join::vessel) return plant.vessels[static_cast<std::size_t>(h.vessel)].feed_line_m3_s.value_or(none);
  double least = none, sum = 0;
  for (const Hookup& part : h.parts) {
    const double most = most_through(plant, part);
    least = std::min(least, most);
    sum += most;
  }
  return h.join == Join::then ? least : std::min(sum, least / least_share);
}

/// The greatest f in [lo, hi], where it has one top, by golden sections.
template <class F>
double top_of(const F& f, double lo, double hi) {
  constexpr double golden = 0.6180339887498949;
  const double width = hi - lo, finest = 1e-14 * hi;
  double p = hi - golden * (hi - lo), q = lo + golden * (hi - lo), fp = f(p), fq = f(q);
  // at a smooth top the value is known long before its place; at a step only its place tells the value
  while (hi - lo > finest && !(hi - lo < 1e-4 * width && std::abs(fp - fq) < 1e-13 * std::abs(fp))) {
    if (fp > fq) {
      hi = q, q = p, fq = fp, p = hi - golden * (hi - lo), fp = f(p);
    } else {
      lo = p, p = q, fp = fq, q = lo + golden * (hi - lo), fq = f(q);
    }
  }
  return std::max(fp, fq);
}

/// The greatest f in [a, b], which may have several tops, and steps: a scan, then around each of its peaks
/// another (tops may stand close together beside a step), then golden sections around the peaks of those.
template <class F>
double greatest(const F& f, double a, double b, int scans) {
  constexpr int n = 28;
  if (b - a <= 1e-12 * b) return f((a + b) / 2);
  double x[n + 1], y[n + 1];
  for (int i = 0; i <= n; ++i) {
    x[i] = a + (b - a) * (1 - std::cos(std::numbers::pi * i / n)) / 2;
    y[i] = f(x[i]);
  }
  double best = *std::max_element(y, y + n + 1);
  for (int i = 0; i <= n; ++i) {
    if ((i > 0 && y[i - 1] >= y[i]) || (i < n && y[i + 1] > y[i])) continue;  // of a level stretch its first place
    const double lo = x[std::max(i - 1, 0)], hi = x[std::min(i + 1, n)];
    best = std::max(best, scans > 1 ? greatest(f, lo, hi, scans - 1) : top_of(f, lo, hi));
  }
  return best;
}

/// The best of one hookup entered at x; every step of the way falls with a lower inlet, so the best at a joint is the
/// best at the end. Precondition: its feed lines can be kept.
class Best {
 public:
  explicit Best(const SmallPlant& plant) : plant_(plant), falls_(rate_falls(plant.shape)) {}
  double operator()(const Hookup& h, double x, double feed) const {
    if (h.join == Join::vessel)
      return outlet(plant_.shape, plant_.vessels[static_cast<std::size_t>(h.vessel)], x, feed);
    if (h.join == Join::beside) return x + gained(h, 0, x, feed, least_share * feed) / feed;
    for (const Hookup& part : h.parts) x = (*this)(part, x, feed);
    return x;
  }

 private:
  /// What branches i .. add, times their feed, where they share `feed`.
  double gained(const Hookup& h, std::size_t i, double x, double feed, double least) const {
    const auto alone = [&](double q) { return q * ((*this)(h.parts[i], x, q) - x); };
    if (i + 1 == h.parts.size()) return alone(feed);
    double others = 0;
    for (std::size_t k = i + 1; k < h.parts.size(); ++k) others += most_through(plant_, h.parts[k]);
    const double a = std::max(least, feed - others);
    const double b =
        std::min(most_through(plant_, h.parts[i]), feed - least * static_cast<double>(h.parts.size() - i - 1));
    return greatest([&](double q) { return alone(q) + gained(h, i + 1, x, feed - q, least); }, a, std::max(a, b),
                    falls_ ? 1 : 2);
  }
  const SmallPlant& plant_;
  bool falls_;  ///< then no joint has steps
};

double at_shares(const SmallPlant& plant, const Hookup& h, double x, double feed, const double*& share) {
  if (h.join == Join::vessel) return outlet(plant.shape, plant.vessels[static_cast<std::size_t>(h.vessel)], x, feed);
  double mixed = 0;
  for (const Hookup& part : h.parts)
    if (h.join == Join::then) {
      x = at_shares(plant, part, x, feed, share);
    } else {
      const double s = *share++;
      mixed += s * at_shares(plant, part, x, s * feed, share);
    }
  return h.join == Join::then ? x : mixed;
}

}  // namespace

std::vector<Hookup> all_hookups(int n, int most) {
  std::vector<Hookup> all;
  for (Set set = 1; set < 1u << n; ++set)
    if (std::popcount(set) <= most)
      for (Hookup& h : on(set)) all.push_back(std::move(h));
  return all;
}

Hookup with_free_shares(const Hookup& hookup) {
  if (hookup.join == Join::vessel) return hookup;
  std::vector<Hookup> parts;
  for (const Hookup& part : hookup.parts) {
    Hookup free = with_free_shares(part);
    if (free.join == hookup.join)
      parts.insert(parts.end(), free.parts.begin(), free.parts.end());
    else
      parts.push_back(std::move(free));
  }
  return joined(hookup.join, std::move(parts));
}

bool keeps_feed_lines(const SmallPlant& plant, const Hookup& hookup, double feed_m3_s) {
  return most_through(plant, hookup) >= feed_m3_s * (1 - 1e-12);
}

std::optional<double> best_conversion(const SmallPlant& plant, const Hookup& hookup, double feed_m3_s) {
  if (!keeps_feed_lines(plant, hookup, feed_m3_s)) return std::nullopt;
  return Best(plant)(hookup, 0, feed_m3_s);
}

double conversion_at(const SmallPlant& plant, const Hookup& hookup, const std::vector<double>& shares,
                     double feed_m3_s) {
  const double* share = shares.data();
  return at_shares(plant, hookup, 0, feed_m3_s, share);
}

std::optional<double> ceiling(const SmallPlant& plant, const Hookup& hookup, double X, double near_m3_s) {
  const auto reaches = [&](double q) { return best_conversion(plant, hookup, q).value_or(-1) >= X; };
  double lo = near_m3_s, hi = near_m3_s, step = 1.3;
  if (reaches(near_m3_s))
    for (hi *= step; reaches(hi); hi *= step) lo = hi, step *= step;
  else
    for (lo /= step; !reaches(lo); lo /= step) {
      if (lo < 1e-6 * near_m3_s) return std::nullopt;
      hi = lo, step *= step;
    }
  while (hi / lo > 1 + 1e-10) {
    const double middle = std::sqrt(lo * hi);
    (reaches(middle) ? lo : hi) = middle;
  }
  return lo;
}

}  // namespace vatwright::test
