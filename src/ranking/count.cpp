#include "vatwright/ranking/enumerate.hpp"

namespace vatwright {
namespace {

__extension__ typedef __int128 Wide;
constexpr Wide most_counted = Wide(1) << 62;
constexpr int most_vessels = 40;  // far beyond the overflow

struct Counts {
  std::vector<Wide> series, parallel;  // [n], n vessels; top series, top beside
  int usable = 0;                      // up to this n nothing overflows
};

std::vector<std::vector<Wide>> binomials(int n) {
  std::vector<std::vector<Wide>> b(static_cast<std::size_t>(n) + 1,
                                   std::vector<Wide>(static_cast<std::size_t>(n) + 1, 0));
  for (std::size_t i = 0; i < b.size(); ++i) {
    b[i][0] = 1;
    for (std::size_t k = 1; k <= i; ++k) b[i][k] = b[i - 1][k - 1] + b[i - 1][k];
  }
  return b;
}

// series(n) = sum over the first block T, a proper subset: C(n,t) block(t) any(n - t), block = vessel or beside;
// parallel(n) = the same over the branch with the first vessel: C(n-1,t-1) branch(t) [branch(n-t) + parallel(n-t)].
Counts count_all() {
  Counts c;
  const auto C = binomials(most_vessels);
  c.series.assign(most_vessels + 1, 0);
  c.parallel.assign(most_vessels + 1, 0);
  const auto alone = [](std::size_t n) { return Wide(n == 1 ? 1 : 0); };
  c.usable = 1;
  for (std::size_t n = 2; n <= most_vessels; ++n) {
    for (std::size_t t = 1; t < n; ++t) {
      const Wide any = alone(n - t) + c.series[n - t] + c.parallel[n - t];
      c.series[n] += C[n][t] * (alone(t) + c.parallel[t]) * any;
      c.parallel[n] += C[n - 1][t - 1] * (alone(t) + c.series[t]) * any;
      if (c.series[n] > most_counted || c.parallel[n] > most_counted) return c;
    }
    c.usable = static_cast<int>(n);
  }
  return c;
}

const Counts& counts() {
  static const Counts all = count_all();
  return all;
}

std::optional<long long> narrow(Wide n) {
  if (n > most_counted) return std::nullopt;
  return static_cast<long long>(n);
}

}  // namespace

std::optional<long long> count_series(int n) {
  if (n < 1 || n > counts().usable) return std::nullopt;
  return narrow(counts().series[static_cast<std::size_t>(n)]);
}

std::optional<long long> count_hookups(int n) {
  if (n < 1 || n > counts().usable) return std::nullopt;
  const auto i = static_cast<std::size_t>(n);
  return narrow(Wide(n == 1 ? 1 : 0) + counts().series[i] + counts().parallel[i]);
}

std::optional<long long> count_hookups_up_to(int n, int most) {
  Wide sum = 0, choose = 1;
  for (int k = 1; k <= most && k <= n; ++k) {
    choose = choose * (n - k + 1) / k;
    const auto each = count_hookups(k);
    if (!each || choose > most_counted) return std::nullopt;
    if (*each != 0 && choose > most_counted / *each) return std::nullopt;
    sum += choose * *each;
    if (sum > most_counted) return std::nullopt;
  }
  return narrow(sum);
}

}  // namespace vatwright
