#include "vatwright/numeric/matrix.hpp"

#include <Eigen/Eigenvalues>
#include <algorithm>
#include <cmath>

#include "vatwright/error/expects.hpp"

namespace vatwright {
namespace {

using RowMajor = Eigen::Matrix<double, Eigen::Dynamic, Eigen::Dynamic, Eigen::RowMajor>;

bool all_finite(std::span<const double> values) {
  return std::ranges::all_of(values, [](double v) { return std::isfinite(v); });
}

void swap_rows(std::span<double> A, std::size_t n, std::size_t first, std::size_t second) {
  for (std::size_t j = 0; j < n; ++j) std::swap(A[first * n + j], A[second * n + j]);
}

std::size_t row_of_pivot(std::span<const double> A, std::size_t n, std::size_t column) {
  std::size_t best = column;
  for (std::size_t i = column + 1; i < n; ++i)
    if (std::abs(A[i * n + column]) > std::abs(A[best * n + column])) best = i;
  return best;
}

}  // namespace

bool solve_linear(std::span<double> A, std::span<double> b) {
  const std::size_t n = b.size();
  VATWRIGHT_EXPECTS(A.size() == n * n);
  for (std::size_t k = 0; k < n; ++k) {
    const std::size_t pivot = row_of_pivot(A, n, k);
    if (!(std::abs(A[pivot * n + k]) > 0)) return false;  // zero or NaN
    swap_rows(A, n, k, pivot);
    std::swap(b[k], b[pivot]);
    for (std::size_t i = k + 1; i < n; ++i) {
      const double factor = A[i * n + k] / A[k * n + k];
      for (std::size_t j = k + 1; j < n; ++j) A[i * n + j] -= factor * A[k * n + j];
      b[i] -= factor * b[k];
    }
  }
  for (std::size_t k = n; k-- > 0;) {
    for (std::size_t j = k + 1; j < n; ++j) b[k] -= A[k * n + j] * b[j];
    b[k] /= A[k * n + k];
  }
  return all_finite(b);
}

std::vector<std::complex<double>> eigenvalues(std::span<const double> A, int n) {
  VATWRIGHT_EXPECTS(n >= 0 && A.size() == static_cast<std::size_t>(n) * static_cast<std::size_t>(n));
  if (n == 0 || !all_finite(A)) return {};
  const Eigen::Map<const RowMajor> matrix(A.data(), n, n);
  const Eigen::EigenSolver<RowMajor> solver(matrix, false);
  if (solver.info() != Eigen::Success) return {};
  return {solver.eigenvalues().begin(), solver.eigenvalues().end()};
}

int rank_of(std::span<const double> A, int m, int n) {
  VATWRIGHT_EXPECTS(m >= 0 && n >= 0 && A.size() == static_cast<std::size_t>(m) * static_cast<std::size_t>(n));
  RowMajor rest = Eigen::Map<const RowMajor>(A.data(), m, n);
  const int most = std::min(m, n);
  double first_pivot = 0;
  for (int k = 0; k < most; ++k) {
    Eigen::Index row = 0, column = 0;
    const double pivot = rest.bottomRightCorner(m - k, n - k).cwiseAbs().maxCoeff(&row, &column);
    if (k == 0) first_pivot = pivot;
    if (!(pivot > 1e-10 * first_pivot)) return k;
    rest.row(k).swap(rest.row(k + row));
    rest.col(k).swap(rest.col(k + column));
    for (int i = k + 1; i < m; ++i) rest.row(i) -= rest(i, k) / rest(k, k) * rest.row(k);
  }
  return most;
}

}  // namespace vatwright
