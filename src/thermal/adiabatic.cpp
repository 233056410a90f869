#include "vatwright/thermal/adiabatic.hpp"

#include <algorithm>
#include <numeric>
#include <vector>

namespace vatwright {

namespace {
constexpr int most_permuted = 5;

void widen(const Chemistry& chemistry, std::span<const double> xi_in, double T_in_K, const std::vector<int>& order,
           AdiabaticRange& range) {
  const Kinetics& k = chemistry.kinetics;
  std::vector<double> xi(xi_in.begin(), xi_in.end()), c(chemistry.feed.c_mol_m3.size());
  for (const int j : order) {
    k.amounts(chemistry.feed.c_mol_m3, xi, c);
    xi[static_cast<std::size_t>(j)] += k.left_to_run(j, c);
    const double T_K = adiabatic_temperature(chemistry, xi_in, T_in_K, xi);
    if (T_K > range.warmest_K) range.warmest_K = T_K;  // false for NaN
    if (T_K < range.coldest_K) range.coldest_K = T_K;
  }
}
}  // namespace

AdiabaticRange adiabatic_range(const Chemistry& chemistry, std::span<const double> xi, double T_K) {
  AdiabaticRange range{T_K, T_K};
  if (heat_knowledge(chemistry).state != HeatKnowledge::State::known) return range;
  std::vector<int> order(static_cast<std::size_t>(chemistry.kinetics.reactions()));
  std::iota(order.begin(), order.end(), 0);
  widen(chemistry, xi, T_K, order, range);
  if (chemistry.kinetics.reactions() <= most_permuted)
    while (std::next_permutation(order.begin(), order.end())) widen(chemistry, xi, T_K, order, range);
  return range;
}

}  // namespace vatwright
