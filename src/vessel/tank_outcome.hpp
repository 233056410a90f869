#pragma once
#include "solver.hpp"

namespace vatwright {

/// Fills in what follows from the reached state: outlet, temperatures, pressures, heat, contents. outcome.uncooled_K:
/// of the start-up, where it was followed.
void tell_of_tank(const Setup& setup, double feed_m3_s, VesselOutcome& outcome, Detail detail,
                  RateEvaluator& evaluator);

}  // namespace vatwright
