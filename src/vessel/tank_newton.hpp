#pragma once
#include <optional>

#include "tank_balance.hpp"
#include "transient.hpp"

namespace vatwright {

/// A root of the balances from a start: Newton's method with steps cut so that no amount passes zero and the balances
/// close better each time; where that stalls, steps of the transient (implicit Euler, growing). nullopt: none found.
std::optional<std::vector<double>> settle(TankBalance& balance, std::vector<double> y);

/// Whether the transient balances of a liquid, or of a gas at one temperature, return to the state: every eigenvalue of
/// -dF/dy has a real part below zero, the heat balance over what the contents take up.
bool is_stable(TankBalance& balance, std::span<const double> y);
/// The same of a gas whose temperature moves, y as the transient has it.
bool is_stable(Transient& transient, std::span<const double> y);

}  // namespace vatwright
