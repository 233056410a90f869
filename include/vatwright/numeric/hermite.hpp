#pragma once
#include <vector>

namespace vatwright {

/// Cubic Hermite interpolation that keeps the shape of the data: no overshoot, monotone where they are.
///   slope inside   d_i = 0 where the secants s_(i-1), s_i differ in sign, else their weighted harmonic mean
///                  (w1 + w2)/d_i = w1/s_(i-1) + w2/s_i,  w1 = 2 h_i + h_(i-1),  w2 = h_i + 2 h_(i-1)
///   slope at ends  three-point formula ((2 h_0 + h_1) s_0 - h_0 s_1)/(h_0 + h_1); zero where its sign is not that of
///   s_0;
///                  cut to 3 s_0 where s_0, s_1 differ in sign and it is steeper than that
///   two points     a straight line
/// x rises strictly, at least two points, y finite (preconditions). Third order between smooth data.
/// F. N. Fritsch, J. Butland, SIAM J. Sci. Stat. Comput. 5 (1984) 300 (from memory).
class Hermite {
 public:
  Hermite(std::vector<double> x, std::vector<double> y);
  /// y at x; NaN outside [front, back].
  [[nodiscard]] double operator()(double x) const;
  /// dy/dx at x; NaN outside [front, back].
  [[nodiscard]] double slope(double x) const;
  [[nodiscard]] double front() const { return x_.front(); }
  [[nodiscard]] double back() const { return x_.back(); }

 private:
  [[nodiscard]] bool outside(double x) const { return !(x >= front() && x <= back()); }
  [[nodiscard]] std::size_t piece(double x) const;
  std::vector<double> x_, y_, d_;
};

}  // namespace vatwright
