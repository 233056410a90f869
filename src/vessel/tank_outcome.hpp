#pragma once
#include "solver.hpp"

namespace vatwright {

/// Fills in what follows from the reached state: outlet, temperatures, pressures, heat, contents.
void tell_of_tank(const Setup& setup, double feed_m3_s, VesselOutcome& outcome, Detail detail);

}  // namespace vatwright
