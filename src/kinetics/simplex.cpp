#include "simplex.hpp"

#include <cmath>

#include "vatwright/error/expects.hpp"

namespace vatwright {
namespace {

constexpr double nothing = 1e-10;
constexpr int most_pivots = 10'000;  // Bland's rule ends by itself; rounding might not let it

/// Rows of [A | artificial unit matrix | b] and a basic column for each.
class Tableau {
 public:
  Tableau(const std::vector<double>& A, const std::vector<double>& b, std::size_t n)
      : m_(b.size()), n_(n), width_(n + b.size() + 1), cell_(m_ * width_, 0.0) {
    for (std::size_t i = 0; i < m_; ++i) {
      for (std::size_t j = 0; j < n; ++j) at(i, j) = A[i * n + j];
      at(i, n + i) = 1;
      at(i, width_ - 1) = b[i];
      basic_.push_back(n + i);
    }
  }

  /// Least cost over the columns before `columns`; false: no bound below.
  bool minimise(const std::vector<double>& cost, std::size_t columns) {
    for (int pivots = 0; pivots < most_pivots; ++pivots) {
      const auto in = entering(cost, columns);
      if (!in) return true;
      const auto out = leaving(*in);
      if (!out) return false;
      pivot(*out, *in);
    }
    return false;
  }

  double value(const std::vector<double>& cost) const {
    double sum = 0;
    for (std::size_t i = 0; i < m_; ++i) sum += cost[basic_[i]] * at(i, width_ - 1);
    return sum;
  }

  /// Artificial columns still basic, at zero, leave where any real column can take the place; else the row says
  /// nothing.
  void drive_out_artificials() {
    for (std::size_t i = 0; i < m_; ++i)
      for (std::size_t j = 0; basic_[i] >= n_ && j < n_; ++j)
        if (std::abs(at(i, j)) > nothing) pivot(i, j);
  }

 private:
  double& at(std::size_t i, std::size_t j) { return cell_[i * width_ + j]; }
  double at(std::size_t i, std::size_t j) const { return cell_[i * width_ + j]; }

  std::optional<std::size_t> entering(const std::vector<double>& cost, std::size_t columns) const {
    for (std::size_t j = 0; j < columns; ++j) {
      double reduced = cost[j];
      for (std::size_t i = 0; i < m_; ++i) reduced -= cost[basic_[i]] * at(i, j);
      if (reduced < -nothing) return j;
    }
    return std::nullopt;
  }

  std::optional<std::size_t> leaving(std::size_t j) const {
    std::optional<std::size_t> best;
    double least_ratio = 0;
    for (std::size_t i = 0; i < m_; ++i) {
      if (at(i, j) <= nothing) continue;
      const double ratio = at(i, width_ - 1) / at(i, j);
      if (best && (ratio > least_ratio || (ratio == least_ratio && basic_[i] > basic_[*best]))) continue;
      best = i;
      least_ratio = ratio;
    }
    return best;
  }

  void pivot(std::size_t row, std::size_t column) {
    const double over = 1 / at(row, column);
    for (std::size_t j = 0; j < width_; ++j) at(row, j) *= over;
    for (std::size_t i = 0; i < m_; ++i) {
      const double factor = at(i, column);
      if (i == row || factor == 0) continue;
      for (std::size_t j = 0; j < width_; ++j) at(i, j) -= factor * at(row, j);
    }
    basic_[row] = column;
  }

  std::size_t m_, n_, width_;
  std::vector<double> cell_;
  std::vector<std::size_t> basic_;
};

}  // namespace

std::optional<double> least(const std::vector<double>& c, const std::vector<double>& A, const std::vector<double>& b) {
  const std::size_t n = c.size(), m = b.size();
  VATWRIGHT_EXPECTS(A.size() == n * m);
  Tableau tableau(A, b, n);
  std::vector<double> artificial(n + m, 0.0), cost(c);
  for (std::size_t i = n; i < n + m; ++i) artificial[i] = 1;
  cost.resize(n + m, 0.0);
  tableau.minimise(artificial, n);
  if (tableau.value(artificial) > 1e-8) return std::nullopt;
  tableau.drive_out_artificials();
  if (!tableau.minimise(cost, n)) return std::nullopt;
  return tableau.value(cost);
}

}  // namespace vatwright
