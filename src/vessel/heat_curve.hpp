#pragma once
#include "setup.hpp"

namespace vatwright {

/// Heat made and heat removed by a tank over its temperature, at one feed rate, the composition balances met at each:
///   made = v released(xi_in to xi(T), T) + agitator,  removed = v sensible(T_in to T) + u (T - medium)
/// Where both are equal there is a steady state. From a little below the coldest to a little above the hottest of feed,
/// medium, start and states.
HeatCurve heat_curve(const Setup& setup, double feed_m3_s, const std::vector<SteadyState>& states);

}  // namespace vatwright
