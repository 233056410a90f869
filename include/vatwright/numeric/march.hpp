#pragma once
#include <optional>
#include <span>
#include <vector>

#include "vatwright/error/outcome.hpp"
#include "vatwright/numeric/rhs.hpp"

namespace vatwright {

struct MarchOptions {
  double rel_tol = 1e-10;
  double abs_tol = 1e-12;              ///< times `scale` of each component where given
  std::span<const double> scale = {};  ///< empty: 1 each
  long most_calls = 2'000'000;         ///< of f, those for differences of a Jacobian included
  double first_step = 0;               ///< 0: chosen
  bool starts_stiff = false;           ///< goes on from a march that ended with the stiff method
};

/// g(t, y), whose first zero crossing from + to - ends a march.
using Event = FunctionRef<double(double, std::span<const double>)>;

/// A solution kept as steps that can be read anywhere: one polynomial of the fourth degree a step, the dense output of
/// the method that made the step. A reading is as good as the nodes to within a small factor: the error of the
/// polynomial is of the order of the error that the step control bounds (tests/numeric/march_test.cpp measures it).
class Track {
 public:
  [[nodiscard]] int size() const { return n_; }  ///< components
  [[nodiscard]] double begin() const;
  [[nodiscard]] double end() const;
  /// y(t) for begin() <= t <= end() (a precondition; rounding beyond the ends is forgiven). y: size() long. No
  /// allocation.
  void read(double t, std::span<double> y) const;
  /// The ends of the steps, rising; the first is begin(), the last end(). One alone where the march had no way to go.
  [[nodiscard]] const std::vector<double>& nodes() const { return t_; }
  /// Evaluations of f.
  [[nodiscard]] long calls() const { return calls_; }
  /// Steps made by the stiff method, of nodes().size() - 1.
  [[nodiscard]] long stiff_steps() const { return stiff_steps_; }
  /// Whether the stiff method was at work at the end.
  [[nodiscard]] bool ended_stiff() const { return ended_stiff_; }
  /// Why it ended before the wanted t, where an event did it: index of the event.
  [[nodiscard]] std::optional<int> ended_by() const { return ended_by_; }

 private:
  friend class Marcher;
  int n_ = 0;
  std::vector<double> t_;
  std::vector<double> coefficients_;  // per step: 6 rows of n, powers of (t - t_i)/(t_(i+1) - t_i)
  long calls_ = 0, stiff_steps_ = 0;
  bool ended_stiff_ = false;
  std::optional<int> ended_by_;
};

/// dy/dt = f(t, y) from t0 to t1 (t1 >= t0), each step with the estimated error of every component below
/// abs_tol scale_i + rel_tol |y_i|.
///   Dormand and Prince's 5(4) pair with its dense output while it serves. Where its step is held by stability (step
///   times fastest decay, by the eigenvalues of the Jacobian, above 0.7 for 50 steps or above 0.3 for 200): Radau IIA
///   of five stages, L-stable, and back where the step is short against the fastest decay again. (A Rosenbrock method
///   of order 4 was tried: right at the nodes, but its polynomial was off by 300 times the tolerance between them where
///   a fast part follows a slow one, and it took three times the calls.)
///
/// f: called only inside [t0, t1], but with any y near the solution, so also with small negative amounts. NaN or
///   infinity from f is never accepted: a step into one is cut.
/// events: the march ends at the first zero crossing from + to - of any of them, located to rounding on the dense
///   output (looked for at four points of each step). What only grazes zero may not cross: ask for a small positive
///   level.
/// jacobian: df/dy where it is known; left out, the stiff method takes differences (n calls a step). It steers the
///   convergence inside a step, not the answer.
/// NoAnswer::unsolved, saying where: f has no value at the start, the step falls below rounding (a singular point, the
///   blow-up of y' = y^2), more than most_calls.
/// J. R. Dormand, P. J. Prince, J. Comput. Appl. Math. 6 (1980) 19; E. Hairer, G. Wanner, Solving Ordinary Differential
/// Equations II, 2nd ed., Springer 1996, sec. IV.5 and IV.8 (both from memory).
Outcome<Track> march(Rhs f, std::span<const double> y0, double t0, double t1, const MarchOptions& options = {},
                     std::span<const Event> events = {}, const Jacobian* jacobian = nullptr);

}  // namespace vatwright
