#include "vatwright/numeric/hermite.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

#include "vatwright/error/expects.hpp"

namespace vatwright {
namespace {

double inner_slope(double h_before, double h, double s_before, double s) {
  if (!(s_before * s > 0)) return 0;
  const double w1 = 2 * h + h_before, w2 = h + 2 * h_before;
  return (w1 + w2) / (w1 / s_before + w2 / s);
}

double end_slope(double h0, double h1, double s0, double s1) {
  const double d = ((2 * h0 + h1) * s0 - h0 * s1) / (h0 + h1);
  if (!(d * s0 > 0)) return 0;
  if (!(s0 * s1 > 0) && std::abs(d) > 3 * std::abs(s0)) return 3 * s0;
  return d;
}

bool rises(const std::vector<double>& x) {
  return std::ranges::adjacent_find(x, [](double a, double b) { return !(a < b); }) == x.end();
}

}  // namespace

Hermite::Hermite(std::vector<double> x, std::vector<double> y) : x_(std::move(x)), y_(std::move(y)), d_(x_.size()) {
  VATWRIGHT_EXPECTS(x_.size() >= 2 && x_.size() == y_.size() && rises(x_));
  const std::size_t last = x_.size() - 1;
  std::vector<double> h(last), s(last);
  for (std::size_t i = 0; i < last; ++i) {
    h[i] = x_[i + 1] - x_[i];
    s[i] = (y_[i + 1] - y_[i]) / h[i];
  }
  if (last == 1) {
    d_[0] = d_[1] = s[0];
    return;
  }
  d_[0] = end_slope(h[0], h[1], s[0], s[1]);
  for (std::size_t i = 1; i < last; ++i) d_[i] = inner_slope(h[i - 1], h[i], s[i - 1], s[i]);
  d_[last] = end_slope(h[last - 1], h[last - 2], s[last - 1], s[last - 2]);
}

std::size_t Hermite::piece(double x) const {
  const auto after = std::upper_bound(x_.begin() + 1, x_.end() - 1, x);
  return static_cast<std::size_t>(after - x_.begin()) - 1;
}

double Hermite::operator()(double x) const {
  if (outside(x)) return std::numeric_limits<double>::quiet_NaN();
  const std::size_t i = piece(x);
  const double h = x_[i + 1] - x_[i], u = (x - x_[i]) / h, v = 1 - u;
  return v * v * ((1 + 2 * u) * y_[i] + u * h * d_[i]) + u * u * ((1 + 2 * v) * y_[i + 1] - v * h * d_[i + 1]);
}

double Hermite::slope(double x) const {
  if (outside(x)) return std::numeric_limits<double>::quiet_NaN();
  const std::size_t i = piece(x);
  const double h = x_[i + 1] - x_[i], u = (x - x_[i]) / h, v = 1 - u;
  return 6 * u * v * (y_[i + 1] - y_[i]) / h + v * (v - 2 * u) * d_[i] + u * (u - 2 * v) * d_[i + 1];
}

}  // namespace vatwright
