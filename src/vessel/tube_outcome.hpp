#pragma once
#include "solver.hpp"
#include "vatwright/numeric/rhs.hpp"

namespace vatwright {

/// What is told of a tube, whatever solved it. at(z): the stream at the fraction z of the length, 0 .. 1.
struct SolvedTube {
  const Setup& setup;
  double feed_m3_s;
  FunctionRef<Stream(double z)> at;
  FunctionRef<double(double z)> medium_at;  ///< temperature of the medium; read only with a jacket
  std::vector<double> places;               ///< fractions worth looking at besides the standing ones, rising
  RateEvaluator& evaluator;
};
VesselOutcome tell(const SolvedTube& tube, Detail detail);

/// Pressure lost per length by a stream in this vessel, Pa/m; nullopt where viscosity or density is missing.
std::optional<double> loss_per_length(const Setup& setup, double feed_m3_s, std::span<const double> xi, double T_K,
                                      double P_Pa);
NoAnswer pressure_used_up(double z, double length_m);

}  // namespace vatwright
