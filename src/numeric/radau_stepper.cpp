#include <algorithm>
#include <cmath>
#include <limits>

#include "radau.hpp"
#include "stepper.hpp"

namespace vatwright {
namespace {

constexpr std::size_t stages = Radau::stages;
constexpr int most_iterations = 12;

}  // namespace

double Tolerance::norm(std::span<const double> v, const State& y, const State& y1) const {
  double largest = 0;
  for (std::size_t i = 0; i < y.size(); ++i)
    largest = std::max(largest, std::abs(v[i]) / (abs[i] + rel * std::max(std::abs(y[i]), std::abs(y1[i]))));
  return largest;
}

void difference_jacobian(CountedRhs& f, double t, const State& y, const State& dydt, double h, const State& floor,
                         std::span<double> J) {
  const std::size_t n = y.size();
  State moved(y), there(n);
  for (std::size_t j = 0; j < n; ++j) {
    const double size = std::max({std::abs(y[j]), std::abs(h * dydt[j]), floor[j]});
    moved[j] = y[j] + 1.5e-8 * size;  // the square root of the rounding unit
    f(t, moved, there);
    for (std::size_t i = 0; i < n; ++i) J[i * n + j] = (there[i] - dydt[i]) / (moved[j] - y[j]);
    moved[j] = y[j];
  }
}

RadauStepper::RadauStepper(std::size_t n, const Jacobian* jacobian, const Tolerance& tolerance)
    : n_(n),
      jacobian_(jacobian),
      tolerance_(tolerance),
      floor_(tolerance.abs),
      J_(n * n),
      lu_(stages * n * stages * n),
      b_(stages * n),
      Z_(stages * n),
      F_(stages * n),
      place_(n),
      pivots_(stages * n),
      q_(stages * n) {
  for (double& each : floor_) each *= 1e3;
}

void RadauStepper::take_jacobian(CountedRhs& f, const Step& s) {
  if (fresh_) return;
  fresh_ = true;
  if (jacobian_ != nullptr)
    (*jacobian_)(s.t, s.y, J_);
  else
    difference_jacobian(f, s.t, s.y, s.dydt, s.h, floor_, J_);
}

/// I - h A (x) J, made into L and U in place.
bool RadauStepper::factorise(double h) {
  const std::size_t m = stages * n_;
  const auto& A = radau().A;
  for (std::size_t i = 0; i < m; ++i)
    for (std::size_t j = 0; j < m; ++j)
      lu_[i * m + j] = (i == j ? 1.0 : 0.0) - h * A[i / n_][j / n_] * J_[(i % n_) * n_ + j % n_];
  for (std::size_t k = 0; k < m; ++k) {
    std::size_t best = k;
    for (std::size_t i = k + 1; i < m; ++i)
      if (std::abs(lu_[i * m + k]) > std::abs(lu_[best * m + k])) best = i;
    if (!(std::abs(lu_[best * m + k]) > 0)) return false;  // singular, or NaN
    pivots_[k] = best;
    if (best != k) std::swap_ranges(&lu_[k * m], &lu_[k * m] + m, &lu_[best * m]);
    for (std::size_t i = k + 1; i < m; ++i) {
      const double factor = lu_[i * m + k] /= lu_[k * m + k];
      if (factor == 0) continue;
      for (std::size_t j = k + 1; j < m; ++j) lu_[i * m + j] -= factor * lu_[k * m + j];
    }
  }
  return true;
}

void RadauStepper::solve() {
  const std::size_t m = b_.size();
  for (std::size_t k = 0; k < m; ++k) std::swap(b_[k], b_[pivots_[k]]);
  for (std::size_t i = 1; i < m; ++i)
    for (std::size_t j = 0; j < i; ++j) b_[i] -= lu_[i * m + j] * b_[j];
  for (std::size_t i = m; i-- > 0;) {
    for (std::size_t j = i + 1; j < m; ++j) b_[i] -= lu_[i * m + j] * b_[j];
    b_[i] /= lu_[i * m + i];
  }
}

/// The last polynomial carried on past its end, where it is worth it.
void RadauStepper::guess(const Step& s) {
  std::ranges::fill(Z_, 0.0);
  if (!(q_h_ > 0) || s.h > 3 * q_h_) return;
  for (std::size_t stage = 0; stage < stages; ++stage) {
    const double theta = 1 + radau().c[stage] * s.h / q_h_;
    double theta_k = 1;
    for (std::size_t k = 0; k < stages; ++k) {
      theta_k *= theta;
      for (std::size_t i = 0; i < n_; ++i) Z_[stage * n_ + i] += q_[k * n_ + i] * (theta_k - 1);
    }
  }
}

/// Newton's method with the Jacobian of the start; false: it does not converge.
bool RadauStepper::iterate(CountedRhs& f, const Step& s) {
  const auto& [c, A, P] = radau();
  double before = 0;
  for (int iteration = 0; iteration < most_iterations; ++iteration) {
    for (std::size_t stage = 0; stage < stages; ++stage) {
      for (std::size_t i = 0; i < n_; ++i) place_[i] = s.y[i] + Z_[stage * n_ + i];
      f(stage + 1 == stages ? s.t + s.h : s.t + c[stage] * s.h, place_, {&F_[stage * n_], n_});
    }
    for (std::size_t stage = 0; stage < stages; ++stage)
      for (std::size_t i = 0; i < n_; ++i) {
        double sum = 0;
        for (std::size_t j = 0; j < stages; ++j) sum += A[stage][j] * F_[j * n_ + i];
        b_[stage * n_ + i] = s.h * sum - Z_[stage * n_ + i];
      }
    solve();
    double change = 0;
    for (std::size_t stage = 0; stage < stages; ++stage) {
      for (std::size_t i = 0; i < n_; ++i) place_[i] = s.y[i] + (Z_[stage * n_ + i] += b_[stage * n_ + i]);
      const double part = tolerance_.norm({&b_[stage * n_], n_}, s.y, place_);
      if (!std::isfinite(part)) return false;
      change = std::max(change, part);
    }
    const double rate = iteration == 0 ? 0.5 : change / before;
    if (change == 0 || (rate < 1 && change * rate / (1 - rate) < 0.01)) return true;
    if (iteration > 1 && rate > 0.9) return change < 0.05;  // rounding, or no convergence
    before = change;
  }
  return false;
}

void RadauStepper::take_polynomial() {
  for (std::size_t k = 0; k < stages; ++k)
    for (std::size_t i = 0; i < n_; ++i) {
      double sum = 0;
      for (std::size_t stage = 0; stage < stages; ++stage) sum += radau().P[k][stage] * Z_[stage * n_ + i];
      b_[k * n_ + i] = sum;
    }
}

/// The best approximation of a theta^k on [0, 1] by lower powers is off by a 2^(1 - 2k).
void RadauStepper::estimate(Step& s) {
  const auto weight = [&](std::size_t k) {
    return tolerance_.norm({&b_[(k - 1) * n_], n_}, s.y, s.y1) * std::ldexp(1.0, 1 - 2 * static_cast<int>(k));
  };
  const double third = weight(3), fourth = weight(4), fifth = weight(5);
  const auto ratio = [](double now, double before) { return before > 0 ? std::min(now / before, 1.0) : 1.0; };
  const double fall = std::max(ratio(fifth, fourth), ratio(fourth, third));
  for (std::size_t i = 0; i < n_; ++i) s.error[i] = b_[4 * n_ + i] * std::ldexp(fall, -9);
}

void RadauStepper::attempt(CountedRhs& f, Step& s) {
  take_jacobian(f, s);
  guess(s);
  if (!factorise(s.h) || !iterate(f, s)) {
    std::ranges::fill(s.error, std::numeric_limits<double>::infinity());  // no step: it will be cut
    return;
  }
  for (std::size_t i = 0; i < n_; ++i) s.y1[i] = s.y[i] + Z_[(stages - 1) * n_ + i];
  f(s.t + s.h, s.y1, s.dydt1);
  take_polynomial();
  estimate(s);
}

void RadauStepper::dense(const Step& s, std::span<double> rows) {
  std::ranges::copy(s.y, rows.begin());
  std::ranges::copy(b_, rows.begin() + static_cast<std::ptrdiff_t>(n_));
  q_ = b_;
  q_h_ = s.h;
}

}  // namespace vatwright
