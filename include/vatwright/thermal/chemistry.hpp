#pragma once
#include <optional>
#include <span>
#include <string>
#include <vector>

#include "vatwright/kinetics/kinetics.hpp"
#include "vatwright/stream/feed.hpp"

namespace vatwright {

/// The product: its mixed feed and its reactions, with what follows from both. Everything here is per m3 of mixed feed.
struct Chemistry {
  Feed feed;
  Kinetics kinetics;

  /// True concentrations C_i (mol/m3 of fluid) at extents xi, T and P. Liquid: c_feed + nu xi, whatever T and P. Ideal
  /// gas: c_i/sum(c) * P/(R T).   C: one per species.
  void concentrations(std::span<const double> xi, double T_K, double P_Pa, std::span<double> C) const;
  /// The same from the amounts c_i (mol per m3 of mixed feed) themselves; c and C may be one span.
  void concentrations_of_amounts(std::span<const double> c, double T_K, double P_Pa, std::span<double> C) const;
  /// Volume of fluid per m3 of mixed feed: 1 for a liquid, sum(c) R T/P for a gas.
  [[nodiscard]] double expansion(std::span<const double> xi, double T_K, double P_Pa) const;
  /// Density of the fluid, kg/m3, where it is known (gas: from molar masses; mass per m3 of feed over the expansion).
  [[nodiscard]] std::optional<double> density(std::span<const double> xi, double T_K, double P_Pa) const;
  /// Mass of 1 m3 of mixed feed, kg, where it is known: the feed's density, else (gas) from molar masses.
  [[nodiscard]] std::optional<double> feed_mass() const;
};

/// Whether heat can be reckoned with for this product: `not_asked` where no reaction has a heat; `unknown` where some
/// have and some have not, or a heat capacity is missing (why says which); else `known`.
struct HeatKnowledge {
  enum class State { not_asked, unknown, known };
  State state = State::not_asked;
  std::string why;
};
HeatKnowledge heat_knowledge(const Chemistry& chemistry);
/// What is missing to reckon the heat that the product takes up when it is warmed, in words; empty: nothing.
std::string missing_heat_capacity(const Chemistry& chemistry);

/// Whether heat capacity and heats of reaction are the same at any temperature and composition; T is then linear in the
/// extents. Precondition: known.
bool heat_is_constant(const Chemistry& chemistry);

/// Heat capacity of what 1 m3 of mixed feed has become, J/K: rho cp where the mixture's is given (constant), else the
/// sum of c_i cp_i(T). Precondition: known.
double heat_capacity(const Chemistry& chemistry, std::span<const double> xi, double T_K);
/// Enthalpy that the composition at xi_in takes up from T_in to T, J per m3 of mixed feed.
double sensible_heat(const Chemistry& chemistry, std::span<const double> xi, double from_K, double to_K);
/// Heat that the reactions release on the way from xi_in to xi at temperature T, J per m3 of mixed feed (+ = released).
double released_heat(const Chemistry& chemistry, std::span<const double> xi_in, std::span<const double> xi, double T_K);
/// What well mixed contents exchange with their surroundings, per m3 of mixed feed: they take up `added_J_m3` (agitator)
/// and give `per_K_J_m3_K` (T - medium_K) to a medium.
struct Exchange {
  double added_J_m3 = 0, per_K_J_m3_K = 0, medium_K = 0;
};
/// The temperature at xi of well mixed contents that entered at (xi_in, T_in):
///   sensible_heat(xi_in, T_in, T) + per_K (T - medium) = released_heat(xi_in, xi, T) + added
/// By Newton's method on the enthalpy (one step where cp and dH are constant). NaN where no temperature above 0 K does.
double mixed_temperature(const Chemistry& chemistry, std::span<const double> xi_in, double T_in_K,
                         std::span<const double> xi, const Exchange& exchange);
/// The same without any exchange: adiabatic.
double adiabatic_temperature(const Chemistry& chemistry, std::span<const double> xi_in, double T_in_K,
                             std::span<const double> xi);

}  // namespace vatwright
