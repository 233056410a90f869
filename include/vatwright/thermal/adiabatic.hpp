#pragma once
#include <span>

#include "vatwright/thermal/chemistry.hpp"

namespace vatwright {

/// What complete reaction without any exchange of heat may come to.
struct AdiabaticRange {
  double coldest_K = 0, warmest_K = 0;
};
/// The coldest and the warmest that contents of extents xi at T can become when the reactions run forward to
/// completion, each as far as what is left of its reactants allows, in any order (the order of the equations alone
/// above five). Equilibrium is not looked at: an upper bound where it is. T itself is in the range. T alone where heat
/// is not known.
AdiabaticRange adiabatic_range(const Chemistry& chemistry, std::span<const double> xi, double T_K);

}  // namespace vatwright
