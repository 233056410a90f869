#pragma once
#include "vatwright/error/outcome.hpp"
#include "vatwright/numeric/rhs.hpp"

namespace vatwright {

/// Integral of f from a to b by Gauss and Legendre's rule of 7, 10, 15, 20 or 30 points (a precondition): exact for
/// polynomials of degree 2 points - 1; no estimate of the error. The ends are not asked. A NaN of f comes through.
double integrate_fixed(Function f, double a, double b, int points);

struct Integral {
  double value = 0;
  double error = 0;  ///< estimated; as a rule far above the true one
  long calls = 0;
};
struct IntegralOptions {
  double rel_tol = 1e-10;
  double abs_tol = 0;
  long most_calls = 20'000;
};
/// Integral of f from a to b (a > b: minus that from b to a) by Gauss and Kronrod's pair of 7 and 15 points; the piece
/// with the largest |difference of the two| is halved until their sum is below the tolerance. The ends are not asked,
/// so a root-like end costs calls, not a NaN. NoAnswer::unsolved: f has no value somewhere, or the tolerance is not met
/// in most_calls. R. Piessens et al., QUADPACK, Springer 1983 (from memory).
Outcome<Integral> integrate(Function f, double a, double b, const IntegralOptions& options = {});

}  // namespace vatwright
