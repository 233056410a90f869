#pragma once
#include <array>
#include <vector>

#include "way.hpp"

namespace vatwright {

/// Space time along a way of one reaction, t = V/v = integral of d xi / R, kept as it grows: it serves every feed rate.
///   u = -ln(s/L), s what is left of the way:  dt/du = s/R(s)
/// In panels of u, each a Chebyshev series of degree 20 through as many places (C. W. Clenshaw and A. R. Curtis, Numer.
/// Math. 2 (1960) 197, from memory), halved until its last terms are below 1e-12 of the largest value. A first order
/// reaction has a constant dt/du, a power law an exponential: one panel goes a long way.
class TubeTrack {
 public:
  explicit TubeTrack(Way way)
      : way_(std::move(way)), kinks_(way_.path().kinks(way_.sign())), cancels_(cancellation(way_)) {
    if (way_.kind() == EndKind::depleted) width_ = widest;
  }

  /// Where the fluid is after the space time t; d = length at or beyond the end (then `through` is true).
  struct Reading {
    Place place;
    bool through = false;
  };
  Reading read(double t);
  /// Space time to the place that is d from the inlet and s from the end; nullopt where it is never reached.
  std::optional<double> time_to(Place place);
  /// Space time at which the end is reached to rounding, as far as is known by now.
  [[nodiscard]] std::optional<double> end_time() const;
  [[nodiscard]] bool failed() const { return failed_; }
  /// How many times larger the terms of the rate are than the rate itself at the inlet of a way that ends in
  /// equilibrium, about: the way to depletion over the way to equilibrium. The rate's rounding counts that much more,
  /// e^u times at u.
  [[nodiscard]] double cancels() const { return cancels_; }
  Way& way() { return way_; }

 private:
  static constexpr int degree = 20;
  static constexpr double widest = 3;  // of a panel: one of it takes a power law from nothing to 95 %
  struct Panel {
    double u0 = 0, u1 = 0, t0 = 0, t1 = 0;
    std::array<double, degree + 1> Q{};  // t - t0 = w Q(w - 1), w = 2 (u - u0)/(u1 - u0): exact for small steps
  };
  bool extend();
  bool add_panel(double u0, double u1);
  [[nodiscard]] double slowness(double u);
  [[nodiscard]] static double value(const Panel& panel, double w);
  [[nodiscard]] static double solve(const Panel& panel, double t);
  [[nodiscard]] Place place_of(double u) const;

  static double cancellation(Way& way);

  Way way_;
  std::vector<double> kinks_;
  double cancels_ = 1;
  std::vector<Panel> panels_;
  double width_ = 2;
  bool ended_ = false, failed_ = false;
};

}  // namespace vatwright
