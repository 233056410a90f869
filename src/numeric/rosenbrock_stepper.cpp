#include <algorithm>
#include <cmath>
#include <limits>

#include "stepper.hpp"

namespace vatwright {
namespace {

// RODAS, E. Hairer, G. Wanner, Solving Ordinary Differential Equations II, 2nd ed., Springer 1996, sec. IV.7 and VI.4,
// in the form without products by the Jacobian:
//   (1/(h gamma) - J) k_i = f(t + c_i h, y + sum_j a_ij k_j) + sum_j (C_ij/h) k_j + h d_i df/dt
constexpr double gamma = 0.25;
constexpr double a[6][5] = {{},
                            {1.544},
                            {0.9466785280815826, 0.2557011698983284},
                            {3.314825187068521, 2.896124015972201, 0.9986419139977817},
                            {1.221224509226641, 6.019134481288629, 12.53708332932087, -0.6878860361058950},
                            {1.221224509226641, 6.019134481288629, 12.53708332932087, -0.6878860361058950, 1}};
constexpr double C[6][5] = {
    {},
    {-5.6688},
    {-2.430093356833875, -0.2063599157091915},
    {-0.1073529058151375, -9.594562251023355, -20.47028614809616},
    {7.496443313967647, -10.24680431464352, -33.99990352819905, 11.70890893206160},
    {8.083246795921522, -7.981132988064893, -31.52159432874371, 16.31930543123136, -6.058818238834054}};
constexpr double c[6] = {0, 0.386, 0.21, 0.63, 1, 1};
constexpr double d[6] = {0.25, -0.1043, 0.1035, -0.0362, 0, 0};
// dense output: y0 + theta (y1 - y0) + theta (1 - theta) (p + theta q)
constexpr double p[5] = {10.12623508344586, -7.487995877610167, -34.80091861555747, -7.992771707568823,
                         1.025137723295662};
constexpr double q[5] = {-0.6762803392801253, 6.087714651680015, 16.43084320892478, 24.76722511418386,
                         -6.594389125716872};

}  // namespace

void difference_jacobian(CountedRhs& f, double t, const State& y, const State& dydt, double h,
                         std::span<const double> floor, bool central, std::span<double> J) {
  const std::size_t n = y.size();
  const double reach = central ? 6e-6 : 1.5e-8;  // cube and square root of the rounding unit
  State moved(y), up(n), down(dydt);
  for (std::size_t j = 0; j < n; ++j) {
    const double size = std::max({std::abs(y[j]), std::abs(h * dydt[j]), floor[j]});
    const double above = y[j] + reach * size, below = central ? y[j] - reach * size : y[j];
    moved[j] = above;
    f(t, moved, up);
    moved[j] = below;
    if (central) f(t, moved, down);
    moved[j] = y[j];
    for (std::size_t i = 0; i < n; ++i) J[i * n + j] = (up[i] - down[i]) / (above - below);
  }
}

void RosenbrockStepper::take_derivatives(CountedRhs& f, const Step& s) {
  if (jacobian_ != nullptr)
    (*jacobian_)(s.t, s.y, J_);
  else
    difference_jacobian(f, s.t, s.y, s.dydt, s.h, floor_, true, J_);
  std::ranges::fill(dfdt_, 0.0);
  const double ahead = 1e-3 * s.h;
  f(s.t + ahead, s.y, f_);
  if (f_ == s.dydt) return;  // t does not enter
  f(s.t + 2 * ahead, s.y, y_);
  for (std::size_t i = 0; i < n_; ++i) dfdt_[i] = (4 * f_[i] - 3 * s.dydt[i] - y_[i]) / (2 * ahead);
}

bool RosenbrockStepper::factorise(double diagonal) {
  for (std::size_t i = 0; i < n_ * n_; ++i) lu_[i] = -J_[i];
  for (std::size_t i = 0; i < n_; ++i) lu_[i * n_ + i] += diagonal;
  for (std::size_t m = 0; m < n_; ++m) {
    std::size_t best = m;
    for (std::size_t i = m + 1; i < n_; ++i)
      if (std::abs(lu_[i * n_ + m]) > std::abs(lu_[best * n_ + m])) best = i;
    if (!(std::abs(lu_[best * n_ + m]) > 0)) return false;  // singular, or NaN
    pivots_[m] = best;
    for (std::size_t j = 0; j < n_; ++j) std::swap(lu_[m * n_ + j], lu_[best * n_ + j]);
    for (std::size_t i = m + 1; i < n_; ++i) {
      const double factor = lu_[i * n_ + m] /= lu_[m * n_ + m];
      for (std::size_t j = m + 1; j < n_; ++j) lu_[i * n_ + j] -= factor * lu_[m * n_ + j];
    }
  }
  return true;
}

void RosenbrockStepper::solve(std::span<double> b) const {
  for (std::size_t m = 0; m < n_; ++m) std::swap(b[m], b[pivots_[m]]);
  for (std::size_t i = 1; i < n_; ++i)
    for (std::size_t j = 0; j < i; ++j) b[i] -= lu_[i * n_ + j] * b[j];
  for (std::size_t i = n_; i-- > 0;) {
    for (std::size_t j = i + 1; j < n_; ++j) b[i] -= lu_[i * n_ + j] * b[j];
    b[i] /= lu_[i * n_ + i];
  }
}

void RosenbrockStepper::attempt(CountedRhs& f, Step& s) {
  if (!fresh_) take_derivatives(f, s);
  fresh_ = true;
  if (!factorise(1 / (s.h * gamma))) {
    std::ranges::fill(s.error, std::numeric_limits<double>::infinity());  // no step: it will be cut
    return;
  }
  for (std::size_t stage = 0; stage < 6; ++stage) {
    y_ = s.y;
    for (std::size_t j = 0; j < stage; ++j)
      for (std::size_t i = 0; i < n_; ++i) y_[i] += a[stage][j] * k(j)[i];
    if (stage == 0)
      f_ = s.dydt;
    else
      f(s.t + c[stage] * s.h, y_, f_);
    for (std::size_t j = 0; j < stage; ++j)
      for (std::size_t i = 0; i < n_; ++i) f_[i] += C[stage][j] / s.h * k(j)[i];
    for (std::size_t i = 0; i < n_; ++i) f_[i] += s.h * d[stage] * dfdt_[i];
    solve(f_);
    std::ranges::copy(f_, k(stage).begin());
  }
  for (std::size_t i = 0; i < n_; ++i) {
    s.y1[i] = y_[i] + k(5)[i];
    s.error[i] = k(5)[i];
  }
  f(s.t + s.h, s.y1, s.dydt1);
}

void RosenbrockStepper::dense(const Step& s, std::span<double> rows) {
  for (std::size_t i = 0; i < n_; ++i) {
    double P = 0, Q = 0;
    for (std::size_t j = 0; j < 5; ++j) {
      P += p[j] * k(j)[i];
      Q += q[j] * k(j)[i];
    }
    rows[i] = s.y[i];
    rows[n_ + i] = s.y1[i] - s.y[i] + P;
    rows[2 * n_ + i] = Q - P;
    rows[3 * n_ + i] = -Q;
    rows[4 * n_ + i] = 0;
  }
}

}  // namespace vatwright
