#include "least_squares.hpp"

#include "vatwright/numeric/matrix.hpp"

namespace vatwright {

std::vector<double> least_squares(std::span<const double> A, std::span<const double> b, std::size_t n) {
  if (rank_of(A, static_cast<int>(b.size()), static_cast<int>(n)) < static_cast<int>(n)) return {};
  std::vector<double> N(n * n), x(n);
  for (std::size_t i = 0; i < b.size(); ++i)
    for (std::size_t j = 0; j < n; ++j) {
      for (std::size_t k = 0; k < n; ++k) N[j * n + k] += A[i * n + j] * A[i * n + k];
      x[j] += A[i * n + j] * b[i];
    }
  if (!solve_linear(N, x)) return {};
  return x;
}

}  // namespace vatwright
