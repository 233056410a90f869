#pragma once
#include <optional>

#include "broken_order.hpp"
#include "mirror.hpp"
#include "setup.hpp"

namespace vatwright {

/// The balances along a tube with any number of reactions:
///   dxi_j/ds = f m_j r_j(C, T),   T held or from the extents (adiabatic), or with a jacket
///   cp dT/ds = f [sum_j m_j r_j (-dH_j) - u (T - Tm)],   u = U A/V, cp of the contents per m3 of mixed feed
///   dTm/ds = +-f u (T - Tm)/(m cp/v)                  co-current +, counter-current -; uniform: Tm at supply
///   d(P/P_in)^2/ds = -2 P/P_in^2 L loss(xi, T, P)     where the pressure acts
/// s is V/v (f = 1) where nothing but the space time matters, else the fraction of the length (f = V/v). y: the
/// extents, then T with a jacket, Tm where it moves, (P/P_in)^2 where it acts.
///
/// A reactant of an order below 1 that has run out is `exhausted`: the reactions that use it up are scaled down
/// together to what others make of it, until they make more than could be used.
class TubeBalance {
 public:
  enum class Coordinate { space_time, length };  ///< of the march: V/v, which serves every feed rate, or the fraction
  TubeBalance(const Setup& setup, Coordinate coordinate, double feed_m3_s);
  /// The rate feels the pressure drop: a gas where it can be reckoned.
  [[nodiscard]] static bool pressure_acts(const Setup& setup);
  /// One march in V/v serves every feed rate: no pressure acts, and the medium is at one temperature.
  [[nodiscard]] static bool serves_all_rates(const Setup& setup);

  [[nodiscard]] std::size_t size() const { return size_; }
  /// medium_K: where the feed comes in, if it moves.
  [[nodiscard]] std::vector<double> at_inlet(double medium_K) const;
  [[nodiscard]] std::vector<double> scale() const;
  void operator()(std::span<const double> y, std::span<double> dy);
  /// d(dy/ds)/dy row by row; the row of the pressure, which is never stiff, is left zero.
  void jacobian(std::span<const double> y, std::span<double> J);
  [[nodiscard]] double temperature(std::span<const double> y) const;
  [[nodiscard]] double pressure(std::span<const double> y) const;
  /// Of the medium; its supply where it does not move. Only with a jacket.
  [[nodiscard]] double medium(std::span<const double> y) const {
    return medium_ ? y[*medium_] : setup_.jacket.supply_K;
  }
  [[nodiscard]] bool medium_moves() const { return medium_.has_value(); }

  /// Species that can run out, each once.
  [[nodiscard]] const std::vector<std::size_t>& can_run_out() const { return can_run_out_; }
  [[nodiscard]] const std::vector<bool>& exhausted() const { return exhausted_; }
  void set_exhausted(std::vector<bool> exhausted) { exhausted_ = std::move(exhausted); }
  /// What is left of a species over what counts as gone; crosses zero where it runs out.
  [[nodiscard]] double left(std::size_t species, std::span<const double> y) const;
  /// Takes the last trace of a species that runs out, by the reaction that uses most of it.
  void finish(std::size_t species, std::span<double> y);
  /// Use that an exhausted species could have, less what is made of it; crosses zero where it comes back.
  [[nodiscard]] double wanting(std::size_t species, std::span<const double> y);
  /// Below this the pressure counts as used up, as (P/P_in)^2.
  static constexpr double no_pressure = 1e-6;
  [[nodiscard]] long calls() const { return evaluator_.calls(); }
  [[nodiscard]] long no_value() const { return evaluator_.no_value(); }
  [[nodiscard]] std::size_t extents() const { return R_; }
  [[nodiscard]] Coordinate coordinate() const { return coordinate_; }
  [[nodiscard]] bool with_pressure() const { return pressure_.has_value(); }
  /// What is left of the pressure, (P/P_in)^2. Precondition: with_pressure().
  [[nodiscard]] double pressure_left(std::span<const double> y) const { return y[*pressure_]; }
  [[nodiscard]] const Setup& setup() const { return setup_; }

 private:
  void rates_just_above(std::span<const double> y, double T, std::optional<std::size_t> raised = {});
  void rates_of_amounts(double T, double X, double P);
  void share_out();
  [[nodiscard]] double made(std::size_t species) const;
  [[nodiscard]] double used(std::size_t species) const;
  [[nodiscard]] double warming(std::span<const double> y, double T) const;

  const Setup& setup_;
  RateEvaluator evaluator_;
  std::vector<BrokenOrder> broken_;
  Mirror mirror_;
  std::vector<std::size_t> can_run_out_;
  std::vector<bool> exhausted_;  // per species
  std::size_t R_ = 0, size_ = 0;
  Coordinate coordinate_;
  std::optional<std::size_t> temperature_, medium_, pressure_;  // places in y
  bool linear_ = true;
  double u_ = 0, medium_u_ = 0;  // W/m3/K; the same over the medium's m cp/v, signed by its passage
  double factor_ = 1, feed_m3_s_ = 0, length_m_ = 0, c_scale_ = 1, gone_ = 0;
  std::vector<double> C_, r_, dT_;
};

}  // namespace vatwright
