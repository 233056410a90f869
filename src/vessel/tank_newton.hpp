#pragma once
#include <optional>

#include "tank_balance.hpp"
#include "transient.hpp"

namespace vatwright {

/// A root of the balances from a start: Newton's method with steps cut so that no amount passes zero and the balances
/// close better each time; where that stalls, steps of the transient (implicit Euler, growing). nullopt: none found.
std::optional<std::vector<double>> settle(TankBalance& balance, std::vector<double> y);

/// How fast the transient balances of a liquid, or of a gas at one temperature, leave the state, per space time: the
/// largest real part of the eigenvalues of -dF/dy, the heat balance over what the contents take up. Below zero: stable.
/// Infinite where it can not be had.
double growth(TankBalance& balance, std::span<const double> y);
/// The same of a gas whose temperature moves, y as the transient has it.
double growth(Transient& transient, std::span<const double> y);

}  // namespace vatwright
