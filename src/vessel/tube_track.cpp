#include "tube_track.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>

namespace vatwright {
namespace {

constexpr double u_most = y_most;
constexpr double narrowest = 1e-15;
constexpr std::size_t most_panels = 4000;

/// cos(pi j k/n), the places and the transform at once, even and odd j apart: by columns of k, so that one column goes
/// to all j at a time.
template <int n>
struct Cosines {
  static constexpr std::size_t half = n / 2;
  std::array<double, n + 1> place{};
  std::array<std::array<double, half + 1>, half + 1> even{}, odd{};
  Cosines() {
    for (int k = 0; k <= n; ++k) place[static_cast<std::size_t>(k)] = std::cos(std::numbers::pi * k / n);
    for (std::size_t k = 0; k <= half; ++k)
      for (std::size_t m = 0; m <= half; ++m) {
        const auto angle = [&](std::size_t order) {
          return std::numbers::pi * static_cast<double>(order * k % (2 * n)) / n;
        };
        even[k][m] = std::cos(angle(2 * m));
        odd[k][m] = std::cos(angle(2 * m + 1));
      }
  }
};

/// sum of a_k T_k(z).
template <std::size_t n>
double chebyshev_sum(const std::array<double, n>& a, double z) {
  double b1 = 0, b2 = 0;
  for (std::size_t k = n; k-- > 1;) {
    const double b = a[k] + 2 * z * b1 - b2;
    b2 = b1;
    b1 = b;
  }
  return a[0] + z * b1 - b2;
}

/// The same with its slope, d/dz, in one pass.
struct Sloped {
  double value = 0, slope = 0;
};
template <std::size_t n>
Sloped sloped_chebyshev_sum(const std::array<double, n>& a, double z) {
  double b1 = 0, b2 = 0, d1 = 0, d2 = 0;
  for (std::size_t k = n; k-- > 1;) {
    const double b = a[k] + 2 * z * b1 - b2, d = 2 * b1 + 2 * z * d1 - d2;
    b2 = b1, b1 = b;
    d2 = d1, d1 = d;
  }
  return {a[0] + z * b1 - b2, b1 + z * d1 - d2};
}

}  // namespace

Place TubeTrack::place_of(double u) const {
  const double L = way_.length();
  if (u > 1) {  // what is left loses no digit in the difference
    const double s = L * std::exp(-u);
    return {L - s, s};
  }
  const double d = -std::expm1(-u);
  return {L * d, L * (1 - d)};
}

double TubeTrack::slowness(double u) {
  const Place p = place_of(u);
  return p.s / way_.rate(p.d, p.s);
}

bool TubeTrack::add_panel(double u0, double u1) {
  static const Cosines<degree> cosines;
  std::array<double, degree + 1> g{}, a{};
  double largest = 0;
  for (std::size_t k = 0; k <= degree; ++k) {
    g[k] = slowness(u0 + (u1 - u0) * (1 + cosines.place[k]) / 2);
    if (!(g[k] > 0) || !std::isfinite(g[k])) return false;
    largest = std::max(largest, g[k]);
  }
  // cos(pi j (n - k)/n) = (-1)^j cos(pi j k/n): places that lie opposite go together, even j by sums, odd j by
  // differences
  constexpr std::size_t half = degree / 2;
  std::array<double, half + 1> even{}, odd{};
  for (std::size_t k = 0; k <= half; ++k) {
    const double share = (k == 0 ? 0.5 : 1) * 2 / degree;
    const double sum = share * (k == half ? g[k] : g[k] + g[degree - k]);
    const double difference = k == half ? 0 : share * (g[k] - g[degree - k]);
    for (std::size_t m = 0; m <= half; ++m) {
      even[m] += cosines.even[k][m] * sum;
      odd[m] += cosines.odd[k][m] * difference;
    }
  }
  for (std::size_t j = 0; j <= degree; ++j) a[j] = j % 2 == 0 ? even[j / 2] : odd[j / 2];
  a[0] /= 2;
  a[degree] /= 2;
  const double last = std::max({std::abs(a[degree]), std::abs(a[degree - 1]), std::abs(a[degree - 2])});
  const double cancelled =
      way_.kind() == EndKind::equilibrium ? 2e-14 * cancels_ * std::exp(u1) : 0;  // of the rate, near its zero
  if (last > largest * (1e-12 + cancelled) && u1 - u0 > narrowest * std::max(1.0, u1)) return false;

  std::array<double, degree + 2> P{};  // the integral from u0
  for (std::size_t j = 1; j <= degree + 1; ++j) {
    const double above = j + 1 <= degree ? a[j + 1] : 0;
    P[j] = ((j == 1 ? 2 : 1) * a[j - 1] - above) / (2 * static_cast<double>(j)) * (u1 - u0) / 2;
  }
  Panel panel{u0, u1, panels_.empty() ? 0 : panels_.back().t1, 0, {}};
  // P(z) - P(-1) = (1 + z) Q(z): (1 + z) T_k = T_k + (T_(k+1) + T_(k-1))/2, taken apart from the top
  panel.Q[degree] = 2 * P[degree + 1];
  for (std::size_t k = degree; k >= 1; --k) {
    const double above = k + 1 <= degree ? panel.Q[k + 1] : 0;
    const double q = 2 * (P[k] - panel.Q[k]) - above;
    panel.Q[k - 1] = k == 1 ? q / 2 : q;
  }
  panel.t1 = panel.t0 + value(panel, 2);
  panels_.push_back(panel);
  return true;
}

double TubeTrack::cancellation(Way& way) {
  if (way.kind() != EndKind::equilibrium || !(way.length() > 0)) return 1;
  return std::max(1.0, way.path().reach(way.sign()).distance / way.length());
}

bool TubeTrack::extend() {
  if (ended_ || failed_) return false;
  const double u0 = panels_.empty() ? 0 : panels_.back().u1;
  if (u0 >= u_most) {
    ended_ = true;
    return false;
  }
  double u1 = std::min(u0 + width_, u_most);
  for (double d : kinks_) {
    const double u = d < way_.length() ? -std::log1p(-d / way_.length()) : u_most;
    if (u > u0 * (1 + 1e-12) + 1e-14) {
      u1 = std::min(u1, u);
      break;
    }
  }
  bool at_once = true;
  while (!add_panel(u0, u1)) {
    at_once = false;
    if (way_.kind() == EndKind::equilibrium && u0 + std::log(cancels_) > 25) {  // the rest is the rounding of the rate
      ended_ = true;
      return false;
    }
    if (u1 - u0 <= narrowest * std::max(1.0, u0) || panels_.size() > most_panels) {
      failed_ = true;
      return false;
    }
    u1 = u0 + (u1 - u0) / 2;
  }
  width_ = std::min((at_once ? 2 : 1) * (u1 - u0), widest);
  return true;
}

double TubeTrack::value(const Panel& panel, double w) { return w * chebyshev_sum(panel.Q, w - 1); }

/// w in [0, 2] where the panel has come to t: Newton's method, kept inside its bracket.
double TubeTrack::solve(const Panel& panel, double t) {
  const double wanted = t - panel.t0, whole = panel.t1 - panel.t0;
  if (wanted <= 0) return 0;
  double lo = 0, hi = 2, w = 2 * wanted / whole;
  for (int i = 0; i < 100; ++i) {
    const Sloped q = sloped_chebyshev_sum(panel.Q, w - 1);
    const double excess = w * q.value - wanted, slope = q.value + w * q.slope;
    (excess > 0 ? hi : lo) = w;
    double next = w - excess / slope;
    const bool newton = next > lo && next < hi;
    if (!newton) next = (lo + hi) / 2;
    // Newton's error is squared in each step: one from within 1e-9 is exact to rounding
    const bool settled = newton && std::abs(next - w) <= 1e-9 * w;
    w = next;
    if (settled || hi - lo <= 2e-16 * hi) break;
  }
  return w;
}

TubeTrack::Reading TubeTrack::read(double t) {
  while ((panels_.empty() || panels_.back().t1 < t) && extend()) {
  }
  if (panels_.empty() || panels_.back().t1 < t) return {{way_.length(), 0}, true};
  const auto panel = std::ranges::lower_bound(panels_, t, {}, &Panel::t1);
  return {place_of(panel->u0 + (panel->u1 - panel->u0) * solve(*panel, t) / 2), false};
}

std::optional<double> TubeTrack::time_to(Place place) {
  if (!(place.s > 0) || !(place.d > 0)) return std::nullopt;
  const double L = way_.length();
  const double u = place.d <= place.s ? -std::log1p(-place.d / L) : -std::log(place.s / L);
  while ((panels_.empty() || panels_.back().u1 < u) && extend()) {
  }
  if (panels_.empty() || panels_.back().u1 < u) return std::nullopt;
  const auto panel = std::ranges::lower_bound(panels_, u, {}, &Panel::u1);
  return panel->t0 + value(*panel, 2 * (u - panel->u0) / (panel->u1 - panel->u0));
}

std::optional<double> TubeTrack::end_time() const {
  if (!ended_ || panels_.empty()) return std::nullopt;
  return panels_.back().t1;
}

}  // namespace vatwright
