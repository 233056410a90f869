#include "adiabatic_rise.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <numeric>

namespace vatwright {

namespace {
constexpr int most_permuted = 5;

/// Extent that reaction j can still run from c, mol per m3 of mixed feed; 0 where a reactant is missing.
double left_to_run(const Kinetics& k, int j, const std::vector<double>& c) {
  double extent = std::numeric_limits<double>::infinity();
  for (int i = 0; i < k.species(); ++i) {
    const double nu = k.nu(i, j);
    if (nu < 0) extent = std::min(extent, c[static_cast<std::size_t>(i)] / -nu);
  }
  return std::isfinite(extent) ? std::max(extent, 0.0) : 0;
}

double warmest_on_the_way(const Chemistry& chemistry, const std::vector<int>& order) {
  const Kinetics& k = chemistry.kinetics;
  const std::vector<double> none(static_cast<std::size_t>(k.reactions()), 0.0);
  std::vector<double> xi = none, c = chemistry.feed.c_mol_m3;
  double most_K = 0;
  for (const int j : order) {
    const double extent = left_to_run(k, j, c);
    xi[static_cast<std::size_t>(j)] += extent;
    k.amounts(chemistry.feed.c_mol_m3, xi, c);
    const double T_K = adiabatic_temperature(chemistry, none, chemistry.feed.temperature_K, xi);
    if (T_K - chemistry.feed.temperature_K > most_K) most_K = T_K - chemistry.feed.temperature_K;  // false for NaN
  }
  return most_K;
}
}  // namespace

std::optional<double> adiabatic_rise(const Chemistry& chemistry) {
  if (heat_knowledge(chemistry).state != HeatKnowledge::State::known) return std::nullopt;
  std::vector<int> order(static_cast<std::size_t>(chemistry.kinetics.reactions()));
  std::iota(order.begin(), order.end(), 0);
  double most_K = warmest_on_the_way(chemistry, order);
  if (chemistry.kinetics.reactions() <= most_permuted) {
    while (std::next_permutation(order.begin(), order.end()))
      most_K = std::max(most_K, warmest_on_the_way(chemistry, order));
  }
  return most_K > 0 ? std::optional(most_K) : std::nullopt;
}

}  // namespace vatwright
