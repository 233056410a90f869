#pragma once
#include "broken_order.hpp"
#include "setup.hpp"

namespace vatwright {

/// The steady balances of a tank with any number of reactions at one space time,
///   G_j = xi_j - xi_in,j - tau m_j r_j(C(xi), T(xi)) = 0,   T held or from the extents (adiabatic, agitator counted).
/// A reactant of an order below 1 fades out over the last 1e-12 of the scale, so that a state at depletion is a root too.
class TankBalance {
 public:
  TankBalance(const Setup& setup, double feed_m3_s);

  [[nodiscard]] std::size_t size() const { return R_; }
  [[nodiscard]] double scale() const { return c_scale_; }
  void set_tau(double tau) { tau_ = tau; }
  [[nodiscard]] double tau() const { return tau_; }
  [[nodiscard]] double temperature(std::span<const double> xi) const;
  /// G at xi; false: no value there.
  bool operator()(std::span<const double> xi, std::span<double> G);
  /// dG_j/dxi_k row by row, by differences in the amounts of each species, so that small ones keep their digits.
  bool jacobian(std::span<const double> xi, std::span<double> J);
  /// The longest share (at most 1) of a step that takes no species further than 99 % of the way to zero.
  [[nodiscard]] double allowed(std::span<const double> xi, std::span<const double> step) const;
  /// Largest |G_j| over the sum of the terms of that balance.
  double imbalance(std::span<const double> xi);
  void amounts(std::span<const double> xi, std::span<double> c) const;
  [[nodiscard]] long calls() const { return evaluator_.calls(); }
  [[nodiscard]] long no_value() const { return evaluator_.no_value(); }

 private:
  void rates(std::span<const double> c, double T, double X, std::span<double> r);

  const Setup& setup_;
  RateEvaluator evaluator_;
  std::vector<BrokenOrder> broken_;
  std::size_t R_ = 0, n_ = 0;
  double tau_ = 0, added_ = 0, c_scale_ = 1, gone_ = 0;
  bool moves_ = false;
  std::vector<double> c_, C_, r_, r_plus_, dr_dc_, dr_dT_;
};

}  // namespace vatwright
