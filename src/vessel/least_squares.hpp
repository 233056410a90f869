#pragma once
#include <span>
#include <vector>

namespace vatwright {

/// x of least |A x - b|^2 by the normal equations, A with b.size() rows of n, row by row; empty where the columns are
/// dependent. For stoichiometry: small whole numbers.
std::vector<double> least_squares(std::span<const double> A, std::span<const double> b, std::size_t n);

}  // namespace vatwright
