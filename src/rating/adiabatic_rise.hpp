#pragma once
#include <optional>

#include "vatwright/thermal/chemistry.hpp"

namespace vatwright {

/// How much the feed would warm up if all of it reacted and nothing took the heat, K, from the feed's temperature:
///   sensible_heat(T_feed, T) = released_heat(xi), largest T - T_feed over xi.
/// xi: the reactions run to the end of their limiting reactant one after another, in the order (of all orders, up to
/// five reactions; else the listed one) and with the prefix of it that warms most. nullopt: heat is not known or not
/// asked, or nothing reacts. Own derivation; for one reaction the usual (-dH) c/(nu rho cp).
std::optional<double> adiabatic_rise(const Chemistry& chemistry);

}  // namespace vatwright
