#include "small_plant.hpp"

#include <algorithm>
#include <array>
#include <cmath>

namespace vatwright::test {
namespace {

double speed_up(double X) { return std::exp(activation_K * (1 / feed_K - 1 / (feed_K + rise_K * X))); }

/// Where a rising f passes zero in [lo, hi], to rounding.
template <class F>
double bisected(double lo, double hi, const F& f) {
  for (;;) {
    const double middle = lo + (hi - lo) / 2;
    if (middle <= lo || middle >= hi || hi - lo < 1e-16) return hi;
    (f(middle) < 0 ? lo : hi) = middle;
  }
}

/// Adiabatic: time over u = -ln(1 - X), dt/du = 1/speed_up, by Gauss-Legendre quadrature of five points (abscissae and
/// weights by their closed form) on panels of 1/20.
class AdiabaticTime {
 public:
  AdiabaticTime() {
    for (std::size_t i = 0; i < panels; ++i) {
      const double u = static_cast<double>(i) * width;
      at_[i + 1] = at_[i] + piece(u, u + width);
    }
  }
  [[nodiscard]] double u_at(double t) const {
    if (t >= at_[panels]) return panels * width + (t - at_[panels]) * speed_up(1);  // 1 - X below 1e-17
    const auto i = std::upper_bound(at_.begin(), at_.end(), t) - at_.begin() - 1;
    const double from = static_cast<double>(i) * width, rest = t - at_[static_cast<std::size_t>(i)];
    double u = from + rest * speed_up(-std::expm1(-from));
    for (int k = 0; k < 4; ++k) u += (rest - piece(from, u)) * speed_up(-std::expm1(-u));
    return u;
  }
  [[nodiscard]] double of(double u) const {
    const int i = std::min(panels, static_cast<int>(u / width));
    return at_[static_cast<std::size_t>(i)] + piece(i * width, u);
  }

 private:
  static constexpr int panels = 800;
  static constexpr double width = 0.05;
  static double piece(double a, double b) {
    static const double near = std::sqrt(5 - 2 * std::sqrt(10.0 / 7)) / 3,
                        far = std::sqrt(5 + 2 * std::sqrt(10.0 / 7)) / 3;
    static const double w_near = (322 + 13 * std::sqrt(70.0)) / 900, w_far = (322 - 13 * std::sqrt(70.0)) / 900;
    const double c = (a + b) / 2, h = (b - a) / 2;
    const auto f = [](double u) { return 1 / speed_up(-std::expm1(-u)); };
    return h * (128.0 / 225 * f(c) + w_near * (f(c - h * near) + f(c + h * near)) +
                w_far * (f(c - h * far) + f(c + h * far)));
  }
  std::array<double, panels + 1> at_{};
};

double adiabatic_tube(double x, double tau) {
  static const AdiabaticTime time;
  if (x >= 1) return 1;
  return -std::expm1(-time.u_at(time.of(-std::log1p(-x)) + tau));
}

/// ln C falls along the tube: t = u + 2 K (C0 - C) + K^2 (C0^2 - C^2)/2 from C0 on, u = ln(C0/C).
double hindered_tube(double x, double tau) {
  const double C0 = 1 - x, K = hindrance;
  if (C0 <= 0) return 1;
  const auto short_by = [&](double u) {
    const double C = C0 * std::exp(-u);
    return u + 2 * K * (C0 - C) + K * K * (C0 * C0 - C * C) / 2 - tau;
  };
  double u =
      0;  // the time is concave in u: Newton's method from the left, with the slope where it stands, may overshoot
  double lo = 0, hi = tau;
  for (int i = 0; i < 200 && hi - lo > 1e-15 * hi; ++i) {
    const double miss = short_by(u);
    (miss < 0 ? lo : hi) = u;
    const double D = 1 + K * C0 * std::exp(-u);
    const double next = u - miss / (D * D);
    if (next == u) break;
    u = next > lo && next < hi ? next : (lo + hi) / 2;
  }
  return 1 - C0 * std::exp(-u);
}

/// (c - C)(1 + K C)^2 = tau C, a cubic: its greatest root below c, between its extrema.
double hindered_tank(double x, double tau) {
  const double c = 1 - x, K = hindrance;
  const auto above = [&](double C) { return (c - C) * (1 + K * C) * (1 + K * C) - tau * C; };  // > 0 at 0, < 0 at c
  const double a = -3 * K * K, b = 2 * (c * K * K - 2 * K), d = 2 * c * K - 1 - tau;
  std::array<double, 4> from = {c, 0, 0, 0};
  std::size_t n = 1;
  if (const double D = b * b - 4 * a * d; D > 0)
    for (const double C : {(-b - std::sqrt(D)) / (2 * a), (-b + std::sqrt(D)) / (2 * a)})  // a < 0: the greater first
      if (C > 0 && C < c) from[n++] = C;
  from[n++] = 0;
  for (std::size_t i = 0; i + 1 < n; ++i)
    if (above(from[i + 1]) >= 0) return 1 - bisected(from[i + 1], from[i], [&](double C) { return -above(C); });
  return 1;
}

/// The lowest root by a scan, each top of it between places that does not reach zero looked at again.
double adiabatic_tank(double x, double tau) {
  constexpr int places = 600;
  static const auto rates = [] {
    std::array<double, places + 1> r{};
    for (int i = 0; i <= places; ++i) r[static_cast<std::size_t>(i)] = rate(Shape::adiabatic, i / double{places});
    return r;
  }();
  const auto f = [&](double X) { return X - x - tau * rate(Shape::adiabatic, X); };
  double before2 = x, f2 = f(x), before = x, f1 = f2;
  for (int i = static_cast<int>(x * places) + 1; i <= places; ++i) {
    const double X = i / double{places}, here = X - x - tau * rates[static_cast<std::size_t>(i)];
    if (f1 < 0 && f1 >= f2 && f1 >= here && f1 + 2 * (f1 - std::min(f2, here)) >= 0) {  // a top near zero
      double lo = before2, hi = X;
      for (int k = 0; k < 60; ++k) {
        const double p = lo + (hi - lo) / 3, q = hi - (hi - lo) / 3;
        (f(p) < f(q) ? lo : hi) = f(p) < f(q) ? p : q;
      }
      if (f(lo) >= 0) return bisected(before2, lo, f);
    }
    if (here >= 0) return bisected(before, X, f);
    before2 = before, f2 = f1, before = X, f1 = here;
  }
  return 1;
}

}  // namespace

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
      return C * (X + seed_conversion);
    case Shape::hindered:
      return C / ((1 + hindrance * C) * (1 + hindrance * C));
    case Shape::adiabatic:
      break;
  }
  return C * speed_up(X);
}

double tube_outlet(Shape shape, double x, double tau) {
  const double C = 1 - x;
  switch (shape) {
    case Shape::half: {
      const double root = std::max(0.0, std::sqrt(C) - tau / 2);
      return 1 - root * root;
    }
    case Shape::first:
      return 1 - C * std::exp(-tau);
    case Shape::second:
      return 1 - C / (1 + C * tau);
    case Shape::autocatalytic: {  // C/(X + s) falls as exp(-(1 + s) t)
      const double s = seed_conversion, ratio = C / (x + s) * std::exp(-(1 + s) * tau);
      return (1 - s * ratio) / (1 + ratio);
    }
    case Shape::hindered:
      return hindered_tube(x, tau);
    case Shape::adiabatic:
      break;
  }
  return adiabatic_tube(x, tau);
}

double tank_outlet(Shape shape, double x, double tau) {
  const double C = 1 - x;
  switch (shape) {
    case Shape::half: {  // root^2 + tau root = C
      const double root = 2 * C / (tau + std::sqrt(tau * tau + 4 * C));
      return C > 0 ? 1 - root * root : 1;
    }
    case Shape::first:
      return 1 - C / (1 + tau);
    case Shape::second:
      return 1 - 2 * C / (1 + std::sqrt(1 + 4 * tau * C));
    case Shape::autocatalytic: {  // tau X^2 + b X = x + tau s: one root above zero
      const double s = seed_conversion, b = 1 - tau + tau * s, e = x + tau * s, D = std::sqrt(b * b + 4 * tau * e);
      return b > 0 ? 2 * e / (b + D) : (D - b) / (2 * tau);
    }
    case Shape::hindered:
      return hindered_tank(x, tau);
    case Shape::adiabatic:
      break;
  }
  return adiabatic_tank(x, tau);
}

double outlet(Shape shape, const SmallVessel& vessel, double x, double feed_m3_s) {
  const double tau = vessel.volume_m3 / feed_m3_s;
  return vessel.is_tank ? tank_outlet(shape, x, tau) : tube_outlet(shape, x, tau);
}

}  // namespace vatwright::test
