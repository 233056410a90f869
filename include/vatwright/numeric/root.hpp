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

/// A root of f in [a, b] where f(a), f(b) differ in sign (or one is 0); a jump through zero counts as a root. The
/// middle of the last bracket, which is narrower than max(abs_tol, rel_tol |x|) and never asked to be below rounding.
/// NoAnswer::unsolved, saying where: f is not finite at a place tried, no change of sign, more than most_calls.
/// About 8 to 15 calls for a smooth f. G. E. Alefeld, F. A. Potra, Y. Shi, Algorithm 748, ACM TOMS 21 (1995) 327.
Outcome<double> find_root(Function f, double a, double b, const RootOptions& options = {});

/// All roots of f in [a, b] that the rising sample points `at` (first a, last b) show: sign changes between samples,
/// and, where three samples of one sign have the middle one nearest to zero, the extremum refined by Brent's method and
/// looked past; in the first and the last interval the fall of |f| from both ends shows such an extremum. Double roots
/// within `touch` (absolute, in f) count once. Rising order. A dip narrower than the samples stays unseen: they say how
/// sure the count is. NoAnswer as in find_root.
Outcome<std::vector<double>> find_all_roots(Function f, const std::vector<double>& at, double touch = 0,
                                            const RootOptions& options = {});

/// A place and the value there.
struct Peak {
  double at = 0, value = 0;
};
/// Where f is greatest in [a, b], ends included, f of one peak there (of several: one of them). Where f has no value it
/// counts as below everything. The place to about rel_tol, at best the root of rounding (1.5e-8); the value to
/// rounding. R. P. Brent, Algorithms for Minimization without Derivatives, Prentice-Hall 1973, ch. 5 (from memory).
Peak find_peak(Function f, double a, double b, double rel_tol = 1e-9);

}  // namespace vatwright
