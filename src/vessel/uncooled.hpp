#pragma once
#include "setup.hpp"

namespace vatwright {

/// Whether a failure of cooling is a question: the temperature is held or kept by a jacket, and heat is known.
bool cooling_can_fail(const Setup& setup);

/// The hottest that contents can become without cooling and feed: complete reaction of what is there, in the order of
/// the reactions that warms most (see adiabatic_range).
///   C: mol per m3 of fluid at T. A liquid keeps its volume.
double warmest_uncooled(const Setup& setup, std::span<const double> C, double T_K);

/// A quick stand-in for it, to find the worst of many moments: T and all heat that each reaction could release alone.
double potential_K(const Setup& setup, std::span<const double> C, double T_K);

/// 1/(d ln q/dT) at a state, K; absent where no heat is released or it does not rise with temperature.
std::optional<double> most_driving_K(const Setup& setup, RateEvaluator& evaluator, const Stream& there);

}  // namespace vatwright
