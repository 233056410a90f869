#include "brute_force.hpp"

#include <algorithm>
#include <cmath>
#include <set>

namespace vatwright::test {
namespace {

using Join = Hookup::Join;
constexpr double least = 1e-4;  // of a share: a closed branch is the smaller hookup

double rate(Shape shape, double X) {
  const double C = 1 - X;
  switch (shape) {
    case Shape::half:
      return std::sqrt(C);
    case Shape::first:
      return C;
    case Shape::second:
      return C * C;
    case Shape::autocatalytic:
      return C * (X + seed_of_product);
    case Shape::hindered:
      break;
  }
  return C / ((1 + hindrance * C) * (1 + hindrance * C));
}

/// Integral of dX/r from 0.
double time_to(Shape shape, double X) {
  const double C = 1 - X, s = seed_of_product, K = hindrance;
  switch (shape) {
    case Shape::half:
      return 2 * (1 - std::sqrt(C));
    case Shape::first:
      return -std::log(C);
    case Shape::second:
      return 1 / C - 1;
    case Shape::autocatalytic:
      return std::log((X + s) / (s * C)) / (1 + s);
    case Shape::hindered:
      break;
  }
  return -std::log(C) + 2 * K * X + K * K * (1 - C * C) / 2;
}

template <class Below>
double bisected(double lo, double hi, const Below& below) {
  for (int i = 0; i < 100 && hi - lo > 1e-16; ++i) {
    const double middle = (lo + hi) / 2;
    (below(middle) ? lo : hi) = middle;
  }
  return (lo + hi) / 2;
}

double through(const Plant& plant, const PlantVessel& v, double X, double feed) {
  const double tau = v.volume / feed;
  if (!v.is_tank) {
    const double t = time_to(plant.shape, X) + tau;
    return bisected(X, 1, [&](double x) { return time_to(plant.shape, x) < t; });
  }
  const auto short_of = [&](double x) { return x - X < tau * rate(plant.shape, x); };
  const bool one_state = plant.shape == Shape::half || plant.shape == Shape::first || plant.shape == Shape::second;
  const int scan = one_state ? 1 : 300;
  double before = X;
  for (int i = 1; i <= scan; ++i) {
    const double x = X + (1 - X) * i / scan;
    if (!short_of(x)) return bisected(before, x, short_of);
    before = x;
  }
  return 1;
}

double lines_pass(const Plant& plant, const Hookup& h) {
  if (h.join == Join::vessel) return plant.vessels[static_cast<std::size_t>(h.vessel)].feed_line;
  double fewest = 1e300, sum = 0;
  for (const Hookup& part : h.parts) {
    fewest = std::min(fewest, lines_pass(plant, part));
    sum += lines_pass(plant, part);
  }
  return h.join == Join::then ? fewest : std::min(sum, fewest / least);
}

/// The greatest of f in [a, b]: places, then golden sections between the neighbours of every peak.
double greatest(const std::function<double(double)>& f, double a, double b, int places) {
  std::vector<double> x, y;
  for (int i = 0; i <= places; ++i) {
    const double s = static_cast<double>(i) / places;
    x.push_back(a + (b - a) * s * s * (3 - 2 * s));  // nearer to each other at both ends
    y.push_back(f(x.back()));
  }
  double best = *std::max_element(y.begin(), y.end());
  const double golden = (std::sqrt(5.0) - 1) / 2;
  for (std::size_t i = 0; i < x.size(); ++i) {
    if ((i > 0 && y[i - 1] > y[i]) || (i + 1 < x.size() && y[i + 1] > y[i])) continue;
    double lo = x[i == 0 ? 0 : i - 1], hi = x[std::min(i + 1, x.size() - 1)];
    double p = hi - golden * (hi - lo), q = lo + golden * (hi - lo), fp = f(p), fq = f(q);
    while (hi - lo > 1e-6 * (b - a) && hi - lo > 1e-13 * b) {
      if (fp > fq) {
        hi = q, q = p, fq = fp, p = hi - golden * (hi - lo), fp = f(p);
      } else {
        lo = p, p = q, fp = fq, q = lo + golden * (hi - lo), fq = f(q);
      }
    }
    best = std::max({best, fp, fq});
  }
  return best;
}

double passed(const Plant& plant, const Hookup& h, double X, double feed);

/// Moles converted, over X, by branches i .. of a joint that share q.
double shared(const Plant& plant, const Hookup& h, std::size_t i, double X, double q, double fewest) {
  if (i + 1 == h.parts.size()) return q * (passed(plant, h.parts[i], X, q) - X);
  double rest = 0;
  for (std::size_t k = i + 1; k < h.parts.size(); ++k) rest += lines_pass(plant, h.parts[k]);
  const double others = static_cast<double>(h.parts.size() - i - 1);
  const double a = std::max(fewest, q - rest), b = std::min(lines_pass(plant, h.parts[i]), q - fewest * others);
  if (a > b * (1 + 1e-9)) return -1e300;
  const auto f = [&](double first) {
    return first * (passed(plant, h.parts[i], X, first) - X) + shared(plant, h, i + 1, X, q - first, fewest);
  };
  if (b - a < 1e-8 * q) return f((a + b) / 2);
  const bool one_peak = plant.shape != Shape::hindered && plant.shape != Shape::autocatalytic;
  return greatest(f, a, b, one_peak ? 4 : 24);
}

double passed(const Plant& plant, const Hookup& h, double X, double feed) {
  if (h.join == Join::vessel) return through(plant, plant.vessels[static_cast<std::size_t>(h.vessel)], X, feed);
  if (h.join == Join::beside) return X + shared(plant, h, 0, X, feed, least * feed) / feed;
  for (const Hookup& part : h.parts) X = passed(plant, part, X, feed);
  return X;
}

Hookup leaf(int vessel) { return {Join::vessel, vessel, {}, {}}; }

std::string text(const Hookup& h) {
  if (h.join == Join::vessel) return std::to_string(h.vessel);
  std::vector<std::string> parts;
  for (const Hookup& part : h.parts) parts.push_back(text(part));
  if (h.join == Join::beside) std::sort(parts.begin(), parts.end());
  std::string all = h.join == Join::then ? "(" : "[";
  for (const auto& part : parts) all += part + " ";
  return all + ")";
}

/// b put behind or beside a, groups of one kind flattened.
Hookup joined(Join join, const Hookup& a, const Hookup& b) {
  Hookup h{join, -1, {}, {}};
  for (const Hookup* one : {&a, &b})
    if (one->join == join)
      h.parts.insert(h.parts.end(), one->parts.begin(), one->parts.end());
    else
      h.parts.push_back(*one);
  if (join == Join::beside) h.shares.assign(h.parts.size(), std::nullopt);
  return h;
}

/// By brute force: every way to cut the vessels in two, every pair of hookups of both, joined in every way.
std::vector<Hookup> hookups_of_set(unsigned set) {
  std::vector<int> members;
  for (int i = 0; i < 32; ++i)
    if (set >> i & 1u) members.push_back(i);
  if (members.size() == 1) return {leaf(members[0])};
  std::vector<Hookup> all;
  std::set<std::string> seen;
  for (unsigned part = (set - 1) & set; part > 0; part = (part - 1) & set)
    for (const Hookup& a : hookups_of_set(part))
      for (const Hookup& b : hookups_of_set(set & ~part))
        for (const Join join : {Join::then, Join::beside}) {
          Hookup h = joined(join, a, b);
          if (seen.insert(text(h)).second) all.push_back(std::move(h));
        }
  return all;
}

}  // namespace

std::vector<Hookup> every_hookup(int n, int most) {
  std::vector<Hookup> all;
  for (unsigned set = 1; set < 1u << n; ++set) {
    int size = 0;
    for (int i = 0; i < n; ++i) size += static_cast<int>(set >> i & 1u);
    if (size > most) continue;
    for (Hookup& h : hookups_of_set(set)) all.push_back(std::move(h));
  }
  return all;
}

double brute_conversion(const Plant& plant, const Hookup& hookup, double X_in, double feed) {
  if (lines_pass(plant, hookup) < feed * (1 - 1e-12)) return -1;
  return passed(plant, hookup, X_in, feed);
}

double brute_ceiling(const Plant& plant, const Hookup& hookup, double X, double near) {
  const auto reaches = [&](double ln_q) { return brute_conversion(plant, hookup, 0, std::exp(ln_q)) >= X; };
  double lo = std::log(near * 1e-3), hi = std::log(near * 1e3);
  if (!reaches(lo)) return 0;
  while (hi - lo > 1e-10) (reaches((lo + hi) / 2) ? lo : hi) = (lo + hi) / 2;
  return std::exp((lo + hi) / 2);
}

}  // namespace vatwright::test
