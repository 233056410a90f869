#include "vatwright/thermal/chemistry.hpp"

#include <numeric>

#include "vatwright/error/expects.hpp"

namespace vatwright {
namespace {

double sum_of(std::span<const double> c) { return std::accumulate(c.begin(), c.end(), 0.0); }

/// Moles per m3 of mixed feed after the reactions, without making the composition.
double moles_at(const Chemistry& chemistry, std::span<const double> xi) {
  double total = sum_of(chemistry.feed.c_mol_m3);
  for (int j = 0; j < chemistry.kinetics.reactions(); ++j)
    total += chemistry.kinetics.mole_change(j) * xi[static_cast<std::size_t>(j)];
  return total;
}

}  // namespace

void Chemistry::concentrations(std::span<const double> xi, double T_K, double P_Pa, std::span<double> C) const {
  kinetics.amounts(feed.c_mol_m3, xi, C);
  concentrations_of_amounts(C, T_K, P_Pa, C);
}

void Chemistry::concentrations_of_amounts(std::span<const double> c, double T_K, double P_Pa,
                                          std::span<double> C) const {
  double per_m3_of_fluid = 1;
  if (feed.phase == Phase::gas) {
    const double total = sum_of(c);
    per_m3_of_fluid = total > 0 ? P_Pa / (gas_constant * T_K) / total : 0;  // C_i = c_i/sum(c) P/(R T)
  }
  for (std::size_t i = 0; i < c.size(); ++i) C[i] = c[i] * per_m3_of_fluid;
}

double Chemistry::expansion(std::span<const double> xi, double T_K, double P_Pa) const {
  if (feed.phase == Phase::liquid) return 1;
  return moles_at(*this, xi) * gas_constant * T_K / P_Pa;
}

std::optional<double> Chemistry::feed_mass() const {
  if (feed.density_kg_m3) return feed.density_kg_m3;
  if (feed.phase == Phase::liquid) return std::nullopt;
  double mass = 0;
  for (std::size_t i = 0; i < feed.species.size(); ++i) {
    if (feed.c_mol_m3[i] == 0) continue;
    if (!feed.species[i].molar_mass_kg_mol) return std::nullopt;
    mass += feed.c_mol_m3[i] * *feed.species[i].molar_mass_kg_mol;
  }
  return mass;
}

std::optional<double> Chemistry::density(std::span<const double> xi, double T_K, double P_Pa) const {
  const auto mass = feed_mass();
  if (!mass) return std::nullopt;
  return *mass / expansion(xi, T_K, P_Pa);
}

}  // namespace vatwright
