#pragma once
#include <optional>
#include <span>
#include <utility>
#include <vector>

#include "vatwright/kinetics/kinetics.hpp"
#include "vatwright/kinetics/reaction.hpp"

namespace vatwright {

/// One direction of a reaction in the form that all laws share,
///   factor(T) prod C_i^orders_i / prod (half_i + C_i) / (1 + sum K_i C_i)^power
/// with the species that must all be above zero for it to run.
struct RatePart {
  std::vector<std::pair<int, double>> orders;  ///< species, order; no two of one species, none of order zero
  std::vector<SpeciesFigure> half, adsorption;
  double adsorption_power = 1;
  std::vector<int> needs;
  Basis basis = Basis::concentration;
  RateConstant k;
  double divisor = 1;               ///< of_coefficient
  std::optional<Equilibrium> over;  ///< its K(T) divides this part, where there is one

  [[nodiscard]] bool runs(std::span<const double> C) const;
};

/// The forward part of reaction j and, where it is reversible, the reverse part; nothing for a measured table.
std::vector<RatePart> parts_of(const Kinetics& kinetics, int j);

}  // namespace vatwright
