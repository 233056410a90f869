#pragma once
#include <optional>

#include "line.hpp"
#include "vatwright/hookup/objective.hpp"

namespace vatwright {

/// As far along the line as a target may lie to be a place on it.
inline constexpr double at_the_end = 1 - 1e-7;

/// z from which on all that the target asks is met: 1 where it is met nowhere. Absent: it is met in some other part of
/// the line, or not a matter of z alone.
std::optional<double> place_of_target(const Duty& duty, const Line& line);

/// What z = 1 yields; absent: nothing.
std::optional<double> yield_at_end(const Objective& yield, const Duty& duty, const Line& line);

}  // namespace vatwright
