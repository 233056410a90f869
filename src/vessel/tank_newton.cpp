#include "tank_newton.hpp"

#include <algorithm>
#include <cmath>

#include "vatwright/numeric/matrix.hpp"

namespace vatwright {
namespace {

double norm(std::span<const double> G) {
  double sum = 0;
  for (double g : G) sum += g * g;
  return std::sqrt(sum);
}

class Settling {
 public:
  Settling(TankBalance& balance, std::vector<double> xi)
      : balance_(balance), xi_(std::move(xi)), G_(xi_.size()), step_(xi_.size()), trial_(xi_.size()), G_trial_(xi_.size()),
        J_(xi_.size() * xi_.size()) {}

  std::optional<std::vector<double>> run() {
    if (!balance_(xi_, G_)) return std::nullopt;
    double inverse_h = 0;  // 0: Newton; above: a step of the transient
    for (int i = 0; i < 400; ++i) {
      if (norm(G_) <= 1e-14 * balance_.scale()) break;
      if (!direction(inverse_h)) {
        inverse_h = inverse_h == 0 ? 1 : 4 * inverse_h;
        if (inverse_h > 1e12) return std::nullopt;
        continue;
      }
      const double share = balance_.allowed(xi_, step_);
      const double length = norm(step_);
      if (share * length <= 1e-15 * balance_.scale() && inverse_h == 0) break;
      if (inverse_h > 0 ? advance(share) : search(share)) {
        inverse_h = inverse_h > 1e-3 ? inverse_h / 3 : 0;
      } else {
        if (norm(G_) <= 1e-11 * balance_.scale()) break;  // rounding
        inverse_h = inverse_h == 0 ? 1 : 4 * inverse_h;
        if (inverse_h > 1e12) return std::nullopt;
      }
    }
    if (balance_.imbalance(xi_) <= 1e-9) return xi_;
    return std::nullopt;
  }

 private:
  bool direction(double inverse_h) {
    if (!balance_.jacobian(xi_, J_)) return false;
    for (std::size_t j = 0; j < xi_.size(); ++j) {
      J_[j * xi_.size() + j] += inverse_h;
      step_[j] = -G_[j];
    }
    return solve_linear(J_, step_);
  }
  bool try_share(double share) {
    for (std::size_t j = 0; j < xi_.size(); ++j) trial_[j] = xi_[j] + share * step_[j];
    return balance_(trial_, G_trial_);
  }
  void take() {
    xi_ = trial_;
    G_ = G_trial_;
  }
  bool search(double share) {
    for (int i = 0; i < 12; ++i, share /= 2)
      if (try_share(share) && norm(G_trial_) < (1 - 1e-4 * share) * norm(G_)) {
        take();
        return true;
      }
    return false;
  }
  bool advance(double share) {
    if (share < 0.5 || !try_share(share)) return false;  // too long a step of the transient
    take();
    return true;
  }

  TankBalance& balance_;
  std::vector<double> xi_, G_, step_, trial_, G_trial_, J_;
};

}  // namespace

std::optional<std::vector<double>> settle(TankBalance& balance, std::vector<double> xi) {
  return Settling(balance, std::move(xi)).run();
}

bool is_stable(TankBalance& balance, std::span<const double> xi) {
  std::vector<double> J(balance.size() * balance.size());
  if (!balance.jacobian(xi, J)) return false;
  const auto all = eigenvalues(J, static_cast<int>(balance.size()));
  return !all.empty() && std::ranges::all_of(all, [](const auto& l) { return l.real() > 0; });
}

}  // namespace vatwright
