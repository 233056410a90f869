#pragma once
#include <array>
#include <cstddef>

namespace vatwright {

/// Collocation at Radau's right points on [0, 1] with five stages (Radau IIA of order 9).
///   Z_i = h sum_j A_ij f(y0 + Z_j),  y(theta) = y0 + sum_k q_k theta^k,  q_k = sum_i P_ki Z_i,  k = 1 .. 5
struct Radau {
  static constexpr std::size_t stages = 5;
  using Matrix = std::array<std::array<double, stages>, stages>;
  std::array<double, stages> c{};  ///< rising, the last 1
  Matrix A{}, P{};
};

/// Made once, from the points: the roots of the difference of two Legendre polynomials.
const Radau& radau();

}  // namespace vatwright
