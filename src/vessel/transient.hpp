#pragma once
#include "broken_order.hpp"
#include "mirror.hpp"
#include "setup.hpp"

namespace vatwright {

/// The transient balances of a tank in space times, theta = t v/V, per m3 of its working fluid:
///   dC_i/dtheta = c_in,i - w C_i + tau sum_j nu_ij m_j r_j
///   (sum C_i cp_i) dT/dtheta = -sensible(feed, T_in to T) + tau sum_j m_j r_j (-dH_j) + agitator/v - u/v (T - medium)
/// w: what leaves over what is fed, by volume: 1 for a liquid; a gas stays at its pressure, sum C_i = P/(R T).
/// y: C_i, then T where it moves. A reactant of an order below 1 that runs out fades over the last millionth, so that
/// the march can go on.
class Transient {
 public:
  Transient(const Setup& setup, double feed_m3_s);
  [[nodiscard]] std::size_t size() const { return n_ + (moves_ ? 1 : 0); }
  [[nodiscard]] std::size_t species() const { return n_; }
  [[nodiscard]] bool moves() const { return moves_; }
  [[nodiscard]] double temperature(std::span<const double> y) const { return moves_ ? y[n_] : setup_.inlet_K; }
  /// The size of each component: all that is fed, and 300 K.
  [[nodiscard]] std::vector<double> scale() const;

  /// dy/dtheta; NaN where y is no state.
  void operator()(std::span<const double> y, std::span<double> dy);
  /// By differences in proportion to each amount, so that what is nearly gone is felt at its own size.
  void jacobian(std::span<const double> y, std::span<double> J);

 private:
  void rates(std::span<const double> y, double T);
  [[nodiscard]] double warming(std::span<const double> y, double T) const;
  [[nodiscard]] double capacity(std::span<const double> y, double T) const;

  static constexpr double fade = 1e-6;
  const Setup& setup_;
  RateEvaluator evaluator_;
  std::vector<BrokenOrder> broken_;
  Mirror mirror_;
  Exchange exchange_;
  double tau_ = 0, total_in_ = 0, c_scale_ = 1;
  std::size_t n_ = 0;
  std::vector<double> c_in_, C_, r_;
  bool moves_ = false;
};

}  // namespace vatwright
