#include <algorithm>
#include <cmath>
#include <limits>

#include "vatwright/thermal/chemistry.hpp"

namespace vatwright {
namespace {

bool made_by_some_reaction(const Kinetics& kinetics, int species) {
  for (int j = 0; j < kinetics.reactions(); ++j)
    if (kinetics.nu(species, j) > 0) return true;
  return false;
}

/// What is missing to reckon with heat, empty: nothing.
std::string missing_for_heat(const Chemistry& chemistry) {
  const Kinetics& kinetics = chemistry.kinetics;
  for (int j = 0; j < kinetics.reactions(); ++j)
    if (!kinetics.reaction(j).heat)
      return "reaction " + kinetics.reaction(j).name + " has no heat of reaction, others have";
  return missing_heat_capacity(chemistry);
}

}  // namespace

std::string missing_heat_capacity(const Chemistry& chemistry) {
  const Kinetics& kinetics = chemistry.kinetics;
  const Feed& feed = chemistry.feed;
  if (feed.heat_capacity_J_kg_K)
    return chemistry.feed_mass() ? "" : "the feed has a heat capacity per mass and no density";
  if (feed.unnamed_solvent) return "the unnamed solvent has no heat capacity";
  for (std::size_t i = 0; i < feed.species.size(); ++i) {
    const bool counts = feed.c_mol_m3[i] > 0 || made_by_some_reaction(kinetics, static_cast<int>(i));
    if (counts && !feed.species[i].heat_capacity) return "species " + feed.species[i].name + " has no heat capacity";
  }
  return "";
}

namespace {

/// rho cp of the feed where the mixture's is given; J/K per m3 of mixed feed.
std::optional<double> constant_capacity(const Chemistry& chemistry) {
  const auto& cp = chemistry.feed.heat_capacity_J_kg_K;
  if (!cp) return std::nullopt;
  return *cp * chemistry.feed_mass().value_or(0);
}

double amount_at(const Chemistry& chemistry, std::span<const double> xi, std::size_t i) {
  double c = chemistry.feed.c_mol_m3[i];
  for (int j = 0; j < chemistry.kinetics.reactions(); ++j)
    c += chemistry.kinetics.nu(static_cast<int>(i), j) * xi[static_cast<std::size_t>(j)];
  return c;
}

template <class OfSpecies>
double sum_over_species(const Chemistry& chemistry, std::span<const double> xi, OfSpecies of_species) {
  double total = 0;
  for (std::size_t i = 0; i < chemistry.feed.species.size(); ++i)
    if (const auto& cp = chemistry.feed.species[i].heat_capacity)
      total += amount_at(chemistry, xi, i) * of_species(*cp);
  return total;
}

}  // namespace

HeatKnowledge heat_knowledge(const Chemistry& chemistry) {
  bool asked = false;
  for (int j = 0; j < chemistry.kinetics.reactions(); ++j)
    asked = asked || chemistry.kinetics.reaction(j).heat.has_value();
  if (!asked) return {HeatKnowledge::State::not_asked, "no reaction has a heat of reaction"};
  std::string missing = missing_for_heat(chemistry);
  if (!missing.empty()) return {HeatKnowledge::State::unknown, std::move(missing)};
  return {HeatKnowledge::State::known, ""};
}

bool heat_is_constant(const Chemistry& chemistry) {
  if (!chemistry.feed.heat_capacity_J_kg_K) return false;
  for (int j = 0; j < chemistry.kinetics.reactions(); ++j)
    if (const auto& heat = chemistry.kinetics.reaction(j).heat; heat && !heat->dCp.empty()) return false;
  return true;
}

double heat_capacity(const Chemistry& chemistry, std::span<const double> xi, double T_K) {
  if (const auto constant = constant_capacity(chemistry)) return *constant;
  return sum_over_species(chemistry, xi, [T_K](const HeatCapacity& cp) { return cp.at(T_K); });
}

double sensible_heat(const Chemistry& chemistry, std::span<const double> xi, double from_K, double to_K) {
  if (const auto constant = constant_capacity(chemistry)) return *constant * (to_K - from_K);
  return sum_over_species(chemistry, xi, [=](const HeatCapacity& cp) { return cp.integral(from_K, to_K); });
}

double released_heat(const Chemistry& chemistry, std::span<const double> xi_in, std::span<const double> xi,
                     double T_K) {
  double heat = 0;
  for (int j = 0; j < chemistry.kinetics.reactions(); ++j) {
    const auto& dH = chemistry.kinetics.reaction(j).heat;
    const auto at = static_cast<std::size_t>(j);
    if (dH) heat -= dH->at(T_K) * (xi[at] - xi_in[at]);
  }
  return heat;
}

double adiabatic_temperature(const Chemistry& chemistry, std::span<const double> xi_in, double T_in_K,
                             std::span<const double> xi) {
  return mixed_temperature(chemistry, xi_in, T_in_K, xi, {});
}

double mixed_temperature(const Chemistry& chemistry, std::span<const double> xi_in, double T_in_K,
                         std::span<const double> xi, const Exchange& exchange) {
  const double nowhere = std::numeric_limits<double>::quiet_NaN();
  // f(T) = sensible(xi_in, T_in, T) + per_K (T - medium) - released(xi_in, xi, T) - added; its slope is the heat
  // capacity at xi, where the heats of reaction move with the heat capacities, and per_K.
  double T = T_in_K;
  for (int i = 0; i < 60; ++i) {
    const double excess = sensible_heat(chemistry, xi_in, T_in_K, T) - released_heat(chemistry, xi_in, xi, T) -
                          exchange.added_J_m3 + exchange.per_K_J_m3_K * (T - exchange.medium_K);
    const double capacity =
        heat_capacity(chemistry, heat_is_constant(chemistry) ? xi_in : xi, T) + exchange.per_K_J_m3_K;
    if (!(capacity > 0)) return nowhere;
    const double step = excess / capacity;
    const double next = std::max(T - step, T / 4);  // never below 0 K on the way
    const bool settled = std::abs(next - T) <= 4e-16 * T || (i > 0 && std::abs(step) <= 1e-14 * T && next == T - step);
    T = next;
    if (settled) return T > 1e-3 ? T : nowhere;
    if (T < 1e-3) return nowhere;
  }
  return nowhere;
}

}  // namespace vatwright
