#pragma once
#include <optional>

#include "tank_balance.hpp"

namespace vatwright {

/// A root of the balances from a start: Newton's method with steps cut so that no amount passes zero and the balances
/// close better each time; where that stalls, steps of the transient (implicit Euler, growing). nullopt: none found.
std::optional<std::vector<double>> settle(TankBalance& balance, std::vector<double> y);

/// Whether the transient balances return to the state: every eigenvalue of -dF/dy has a real part below zero.
bool is_stable(TankBalance& balance, std::span<const double> y);

}  // namespace vatwright
