#include "tank_newton.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

#include "vatwright/numeric/matrix.hpp"

namespace vatwright {
namespace {

class Settling {
 public:
  Settling(TankBalance& balance, std::vector<double> y)
      : balance_(balance),
        y_(std::move(y)),
        F_(y_.size()),
        step_(y_.size()),
        trial_(y_.size()),
        F_trial_(y_.size()),
        J_(y_.size() * y_.size()) {}

  std::optional<std::vector<double>> run() {
    if (!balance_(y_, F_)) return std::nullopt;
    double inverse_h = 0;  // 0: Newton; above: a step of the transient
    for (int i = 0; i < 300; ++i) {
      const bool stepped = direction(inverse_h) && (inverse_h > 0 ? advance() : search());
      if (settled_) break;
      if (stepped)
        inverse_h = inverse_h > 1e-3 ? inverse_h / 3 : 0;
      else
        inverse_h = inverse_h == 0 ? 1 : 4 * inverse_h;
      if (inverse_h > 1e14) break;
    }
    if (balance_.imbalance(y_) <= 1e-10) return y_;
    return std::nullopt;
  }

 private:
  double norm(std::span<const double> F) const {
    double sum = 0;
    for (std::size_t i = 0; i < F.size(); ++i) sum += F[i] * F[i] / (balance_.scale(i) * balance_.scale(i));
    return std::sqrt(sum);
  }
  bool direction(double inverse_h) {
    if (!balance_.jacobian(y_, J_)) return false;
    for (std::size_t j = 0; j < y_.size(); ++j) {
      J_[j * y_.size() + j] += inverse_h;
      step_[j] = -F_[j];
    }
    return solve_linear(J_, step_);
  }
  /// Every amount moves by rounding alone.
  bool is_rounding() const {
    for (std::size_t i = 0; i < y_.size(); ++i)
      if (std::abs(step_[i]) > 3e-15 * std::abs(y_[i]) && std::abs(step_[i]) > 1e-30 * balance_.scale(i)) return false;
    return true;
  }
  bool try_share(double share) {
    for (std::size_t j = 0; j < y_.size(); ++j) {
      trial_[j] = y_[j] + share * step_[j];
      // towards zero, never past it; the dust of what neither enters nor is made goes at last
      if (j < balance_.species() && trial_[j] < 0.01 * y_[j])
        trial_[j] = y_[j] < 1e-25 * balance_.scale(j) ? 0 : 0.01 * y_[j];
    }
    return balance_(trial_, F_trial_);
  }
  void take() {
    y_ = trial_;
    F_ = F_trial_;
  }
  bool search() {
    if (is_rounding()) {
      settled_ = true;
      return true;
    }
    double share = balance_.allowed(step_);
    for (int i = 0; i < 12; ++i, share /= 2)
      if (try_share(share) && norm(F_trial_) < (1 - 1e-4 * share) * norm(F_)) {
        take();
        return true;
      }
    if (balance_.imbalance(y_) <= 1e-12) settled_ = true;  // as near as rounding lets it
    return false;
  }
  bool advance() {
    const double share = balance_.allowed(step_);
    if (share < 0.5 || !try_share(share)) return false;  // too long a step of the transient
    if (balance_.imbalance(y_) <= 1e-14) settled_ = true;
    take();
    return true;
  }

  TankBalance& balance_;
  std::vector<double> y_, F_, step_, trial_, F_trial_, J_;
  bool settled_ = false;
};

}  // namespace

std::optional<std::vector<double>> settle(TankBalance& balance, std::vector<double> y) {
  return Settling(balance, std::move(y)).run();
}

namespace {
constexpr double no_value = std::numeric_limits<double>::infinity();
}

double growth(TankBalance& balance, std::span<const double> y) {
  const std::size_t m = balance.size();
  std::vector<double> J(m * m);
  if (!balance.jacobian(y, J)) return no_value;
  const double warms = balance.warms_slower(y);
  for (std::size_t k = 0; k < m && m > balance.species(); ++k) J[(m - 1) * m + k] *= warms;
  const auto all = eigenvalues(J, static_cast<int>(m));
  if (all.empty()) return no_value;
  return -std::ranges::min(all, {}, [](const auto& l) { return l.real(); }).real();
}

double growth(Transient& transient, std::span<const double> y) {
  const std::size_t m = transient.size();
  std::vector<double> J(m * m);
  transient.jacobian(y, J);
  auto all = eigenvalues(J, static_cast<int>(m));
  if (all.size() < 2) return no_value;
  // a gas keeps sum C = P/(R T): the direction across that is neither left nor sought, its eigenvalue is rounding
  all.erase(std::ranges::min_element(all, {}, [](const auto& l) { return std::abs(l); }));
  return std::ranges::max(all, {}, [](const auto& l) { return l.real(); }).real();
}

}  // namespace vatwright
