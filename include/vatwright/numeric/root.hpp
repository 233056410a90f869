#pragma once
#include <vector>

#include "vatwright/error/outcome.hpp"
#include "vatwright/numeric/rhs.hpp"

namespace vatwright {

struct RootOptions {
  double rel_tol = 1e-14;  ///< of the root
  double abs_tol = 0;
  int most_calls = 200;
};

/// A root of f in [a, b] where f(a), f(b) differ in sign (or one is 0); a jump through zero counts as a root.
/// toms748 of Alefeld, Potra and Shi (ACM TOMS 21 (1995) 327). NaN, no bracket or too many calls: NoAnswer::unsolved.
Outcome<double> find_root(Function f, double a, double b, const RootOptions& options = {});

/// All roots of f in [a, b] that the rising sample points `at` (first a, last b) show: sign changes between samples,
/// and, where three samples of one sign have the middle one nearest to zero, the extremum refined by Brent's method and
/// looked past. Double roots within `touch` (absolute, in f) count once. Rising order.
Outcome<std::vector<double>> find_all_roots(Function f, const std::vector<double>& at, double touch = 0,
                                            const RootOptions& options = {});

/// Where f is greatest in [a, b], f of one peak there (Brent 1973); both the place and the value.
struct Peak {
  double at = 0, value = 0;
};
Peak find_peak(Function f, double a, double b, double rel_tol = 1e-9);

}  // namespace vatwright
