#include "radau.hpp"

#include <cmath>
#include <utility>

namespace vatwright {
namespace {

constexpr std::size_t s = Radau::stages;
using Long = std::array<std::array<long double, s>, s>;

/// P_s(x) - P_(s-1)(x) of Legendre, by the recurrence n P_n = (2n - 1) x P_(n-1) - (n - 1) P_(n-2).
long double difference_of_legendre(long double x) {
  long double before = 1, now = x;
  for (std::size_t n = 2; n <= s; ++n) before = std::exchange(now, ((2 * n - 1) * x * now - (n - 1) * before) / n);
  return now - before;
}

long double halved(long double lo, long double hi) {
  const bool rising = difference_of_legendre(hi) > 0;
  for (int i = 0; i < 80; ++i) {
    const long double middle = (lo + hi) / 2;
    ((difference_of_legendre(middle) > 0) == rising ? hi : lo) = middle;
  }
  return (lo + hi) / 2;
}

std::array<long double, s> points() {
  std::array<long double, s> c{};
  std::size_t found = 0;
  constexpr int cells = 200;
  for (int i = 0; i + 1 < cells && found + 1 < s; ++i) {  // the last cell holds the root at 1
    const long double lo = -1 + 2.0L * i / cells, hi = -1 + 2.0L * (i + 1) / cells;
    if ((difference_of_legendre(lo) > 0) != (difference_of_legendre(hi) > 0)) c[found++] = (1 + halved(lo, hi)) / 2;
  }
  c[s - 1] = 1;
  return c;
}

/// The inverse of M by Gauss and Jordan with pivots.
Long inverse(Long M) {
  Long X{};
  for (std::size_t i = 0; i < s; ++i) X[i][i] = 1;
  for (std::size_t k = 0; k < s; ++k) {
    std::size_t best = k;
    for (std::size_t i = k; i < s; ++i)
      if (std::abs(M[i][k]) > std::abs(M[best][k])) best = i;
    std::swap(M[k], M[best]);
    std::swap(X[k], X[best]);
    const long double over = 1 / M[k][k];
    for (std::size_t j = 0; j < s; ++j) M[k][j] *= over, X[k][j] *= over;
    for (std::size_t i = 0; i < s; ++i) {
      const long double factor = M[i][k];
      if (i == k) continue;
      for (std::size_t j = 0; j < s; ++j) M[i][j] -= factor * M[k][j], X[i][j] -= factor * X[k][j];
    }
  }
  return X;
}

Radau make() {
  const auto c = points();
  Long slope{}, value{};  // rows: points; columns: powers 1 .. s and their derivatives
  for (std::size_t i = 0; i < s; ++i)
    for (std::size_t k = 0; k < s; ++k) {
      slope[i][k] = static_cast<long double>(k + 1) * std::pow(c[i], static_cast<long double>(k));
      value[i][k] = std::pow(c[i], static_cast<long double>(k + 1));
    }
  const Long from_slopes = inverse(slope), from_values = inverse(value);
  Radau radau;
  for (std::size_t i = 0; i < s; ++i) {
    radau.c[i] = static_cast<double>(c[i]);
    for (std::size_t j = 0; j < s; ++j) {
      long double sum = 0;
      for (std::size_t k = 0; k < s; ++k) sum += value[i][k] * from_slopes[k][j];
      radau.A[i][j] = static_cast<double>(sum);
      radau.P[i][j] = static_cast<double>(from_values[i][j]);
    }
  }
  return radau;
}

}  // namespace

const Radau& radau() {
  static const Radau made = make();
  return made;
}

}  // namespace vatwright
