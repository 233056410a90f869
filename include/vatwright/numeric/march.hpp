#pragma once
#include <optional>
#include <span>
#include <vector>

#include "vatwright/error/outcome.hpp"
#include "vatwright/numeric/rhs.hpp"

namespace vatwright {

struct MarchOptions {
  double rel_tol = 1e-10;
  double abs_tol = 1e-12;        ///< times `scale` of each component where given
  std::span<const double> scale; ///< empty: 1 each
  long most_calls = 2'000'000;
  double first_step = 0;         ///< 0: chosen
};

/// A solution kept as steps that can be read anywhere: rising t, states, and derivatives (for the Hermite start of a
/// reading); `read` interpolates to the accuracy of the march.
class Track {
 public:
  [[nodiscard]] int size() const { return n_; }                 ///< components
  [[nodiscard]] double begin() const;
  [[nodiscard]] double end() const;
  void read(double t, std::span<double> y) const;
  [[nodiscard]] const std::vector<double>& nodes() const { return t_; }
  [[nodiscard]] long calls() const { return calls_; }
  /// Why it ended before the wanted t, where an event did it: index of the event.
  [[nodiscard]] std::optional<int> ended_by() const { return ended_by_; }

 private:
  friend Outcome<Track> march(Rhs, std::span<const double>, double, double, const MarchOptions&,
                              std::span<const FunctionRef<double(double, std::span<const double>)>>);
  int n_ = 0;
  std::vector<double> t_;
  std::vector<double> coefficients_;   // per step, the polynomial of the dense output
  int degree_ = 0;
  long calls_ = 0;
  std::optional<int> ended_by_;
};

/// dy/dt = f from t0 to t1 (t1 > t0), Dormand and Prince's 5(4) pair with dense output while it serves, an L-stable Rosenbrock
/// method where the step is held by stability. Ends at the first zero crossing (from + to -) of an event g(t, y), which is
/// located on the dense output to rounding. NaN is never accepted: a step into one is cut; a march that can not go on is
/// NoAnswer::unsolved and says where.
Outcome<Track> march(Rhs f, std::span<const double> y0, double t0, double t1, const MarchOptions& options = {},
                     std::span<const FunctionRef<double(double, std::span<const double>)>> events = {});

}  // namespace vatwright
