#pragma once
#include "vatwright/kinetics/reaction.hpp"
#include "vatwright/numeric/hermite.hpp"

namespace vatwright {

/// Measured rates, ready to be read: consumption of conversion_of (mol/m3 fluid/s) at conversion X.
///   consumption(X) = 1/g(X), g the shape-preserving cubic (numeric/hermite.hpp) through (X_i, 1/consumption_i)
/// Interpolated in the reciprocal, because the volume of a tube is the integral of it. Preconditions: at least two
/// points, X rising strictly, consumption above zero. NaN outside the table.
class RateCurve {
 public:
  explicit RateCurve(const RateTable& table);
  [[nodiscard]] double operator()(double X) const { return 1 / reciprocal_(X); }
  /// 1/consumption, m3 s/mol, and how it moves with X.
  [[nodiscard]] double reciprocal(double X) const { return reciprocal_(X); }
  [[nodiscard]] double reciprocal_slope(double X) const { return reciprocal_.slope(X); }

 private:
  Hermite reciprocal_;
};

}  // namespace vatwright
