#pragma once
#include <complex>
#include <span>
#include <vector>

namespace vatwright {

/// Solves A x = b for a small dense A (n x n, row by row; overwritten), b overwritten with x. false: singular or not
/// finite.
bool solve_linear(std::span<double> A, std::span<double> b);
/// All eigenvalues of a real n x n matrix, row by row; empty where they can not be had (not finite).
std::vector<std::complex<double>> eigenvalues(std::span<const double> A, int n);
/// Rank of an m x n matrix, row by row, by full pivoting with a relative threshold of 1e-10.
int rank_of(std::span<const double> A, int m, int n);

}  // namespace vatwright
