#pragma once
#include <span>

#include "vatwright/error/outcome.hpp"
#include "vatwright/thermal/chemistry.hpp"

namespace vatwright {

/// What branches become that meet and mix adiabatically, at the lowest of their pressures:
///   xi = sum q_b xi_b / q,   sum q_b H(xi_b, T_b -> T) = 0,   q = sum q_b
/// with the sensible heat H; mixing itself has no heat. Where no heat capacity is known (then no vessel after it asks
/// for one) the temperature is the mean by flow.
///   branches: at least one, feed_m3_s > 0 each.
/// NoAnswer::unsolved: no temperature solves the balance (heat capacities below zero).
Outcome<Stream> mix(const Chemistry& chemistry, std::span<const Stream> branches);

/// Whether heat_capacity and sensible_heat can be had for this product: the mixture's, or every species' and no unnamed
/// solvent.
bool heat_capacity_known(const Chemistry& chemistry);

}  // namespace vatwright
