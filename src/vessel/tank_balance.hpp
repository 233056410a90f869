#pragma once
#include "broken_order.hpp"
#include "setup.hpp"

namespace vatwright {

/// The steady balances of a tank with any number of reactions, in what it holds, y = (c_1 .. c_n, T if it moves), so
/// that a species nearly gone keeps its digits:
///   F_i = c_i - c_in,i - tau sum_j nu_ij m_j r_j                               mol per m3 of mixed feed
///   F_T = [sensible(T_in to T) - tau sum_j m_j r_j (-dH_j) - agitator/v + u/v (T - medium)]/cp    K
/// c in mol per m3 of mixed feed, cp per m3 of mixed feed. dy/dt = -F/tau is the transient of a liquid. A reactant of
/// an order below 1 fades out over the last 1e-12 of the scale, so that a state at depletion is a root too.
class TankBalance {
 public:
  TankBalance(const Setup& setup, double feed_m3_s);

  [[nodiscard]] std::size_t size() const { return n_ + (moves_ ? 1 : 0); }
  [[nodiscard]] std::size_t species() const { return n_; }
  [[nodiscard]] double scale(std::size_t row) const { return row < n_ ? c_scale_ : 100; }
  void set_tau(double tau) { tau_ = tau; }
  [[nodiscard]] double tau() const { return tau_; }

  /// y of extents with the temperature that belongs to them.
  [[nodiscard]] std::vector<double> contents(std::span<const double> xi) const;
  [[nodiscard]] double temperature(std::span<const double> y) const { return moves_ ? y[n_] : setup_.inlet_K; }
  /// The extents that lead to y: by least squares, else (dependent reactions) from the rates.
  [[nodiscard]] std::vector<double> extents(std::span<const double> y);

  /// F at y; false: no value there.
  bool operator()(std::span<const double> y, std::span<double> F);
  /// dF/dy row by row.
  bool jacobian(std::span<const double> y, std::span<double> J);
  /// The longest share (at most 1) of a step that takes T no further than 50 K.
  [[nodiscard]] double allowed(std::span<const double> step) const;
  /// Largest |F| over the sum of the terms of that balance; what is made and unmade by one reaction counts apart.
  double imbalance(std::span<const double> y);
  /// Heat capacity of what is fed over that of the contents: F_T is per the one, the transient per the other.
  [[nodiscard]] double warms_slower(std::span<const double> y) const;
  [[nodiscard]] long calls() const { return evaluator_.calls(); }
  [[nodiscard]] long no_value() const { return evaluator_.no_value(); }

 private:
  void rates(std::span<const double> y, double T, std::span<double> r);
  void differences(std::span<const double> y, double T);
  [[nodiscard]] double nu(std::size_t i, std::size_t j) const { return nu_[i * R_ + j]; }

  const Setup& setup_;
  RateEvaluator evaluator_;
  std::vector<BrokenOrder> broken_;
  std::size_t R_ = 0, n_ = 0;
  Exchange exchange_;
  double tau_ = 0, c_scale_ = 1, gone_ = 0;
  bool moves_ = false;
  std::vector<double> nu_, c_in_, c_, C_, r_, r_plus_, dr_dc_, dr_dT_;
};

}  // namespace vatwright
