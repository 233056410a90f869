#pragma once
#include <boost/numeric/odeint/stepper/runge_kutta_dopri5.hpp>
#include <span>
#include <vector>

#include "vatwright/numeric/rhs.hpp"

namespace vatwright {

using State = std::vector<double>;

/// f with its calls counted.
class CountedRhs {
 public:
  explicit CountedRhs(Rhs f) : f_(f) {}
  void operator()(double t, std::span<const double> y, std::span<double> dydt) {
    ++calls_;
    f_(t, y, dydt);
  }
  [[nodiscard]] long calls() const { return calls_; }

 private:
  Rhs f_;
  long calls_ = 0;
};

/// One step from (t, y) to (t + h, y1), with what the march needs of it.
struct Step {
  double t = 0, h = 0;
  State y, dydt;           ///< at its start
  State y1, dydt1, error;  ///< at its end: state, derivative, estimate of the error
};

/// What an error is measured against: the largest |v_i|/(abs_i + rel |y_i|), y the larger of two states.
struct Tolerance {
  double rel = 0;
  State abs;
  [[nodiscard]] double norm(std::span<const double> v, const State& y, const State& y1) const;
};

/// Powers of theta = (t - s.t)/s.h in the polynomial of a step, 0 .. 5.
inline constexpr std::size_t rows_of_step = 6;

/// Dormand and Prince's pair, from the library; the error goes with h^5.
class ExplicitStepper {
 public:
  static constexpr double power = 1.0 / 5;
  void attempt(CountedRhs& f, Step& s);
  /// rows_of_step rows of n: the polynomial of the step just made.
  void dense(const Step& s, std::span<double> rows);

 private:
  boost::numeric::odeint::runge_kutta_dopri5<State> stepper_;
  State middle_;
};

/// df/dy by differences from dydt = f(t, y), one-sided, J row by row. h: the step ahead, which tells how far to look
/// where a component is near zero; floor: what of each is noise.
void difference_jacobian(CountedRhs& f, double t, const State& y, const State& dydt, double h, const State& floor,
                         std::span<double> J);

/// Radau IIA with five stages: L-stable, of order 9 at the nodes, its polynomial of degree 5 good to h^6 between them
/// even where the fast part follows the slow one. The error is estimated from the fall of that polynomial's
/// coefficients: the last, as a share of best approximation, times the ratio by which they fall (at most 1); it goes
/// with h^6.
class RadauStepper {
 public:
  static constexpr double power = 1.0 / 6;
  RadauStepper(std::size_t n, const Jacobian* jacobian, const Tolerance& tolerance);
  void attempt(CountedRhs& f, Step& s);
  void dense(const Step& s, std::span<double> rows);
  /// The step just made was kept: the next starts at its end.
  void moved() { fresh_ = false; }
  /// Another method made steps since: the last polynomial is no guess any more.
  void forget() { q_h_ = 0; }
  /// The Jacobian at the start of the last step.
  [[nodiscard]] std::span<const double> jacobian() const { return J_; }

 private:
  void take_jacobian(CountedRhs& f, const Step& s);
  void guess(const Step& s);
  bool factorise(double h);
  void solve();
  bool iterate(CountedRhs& f, const Step& s);
  void take_polynomial();
  void estimate(Step& s);

  std::size_t n_;
  const Jacobian* jacobian_;
  const Tolerance& tolerance_;
  State floor_, J_, lu_, b_, Z_, F_, place_;
  std::vector<std::size_t> pivots_;
  State q_;         // 5 rows of n: powers 1 .. 5 of the last step's polynomial
  double q_h_ = 0;  // the step that it belongs to; 0: none
  bool fresh_ = false;
};

}  // namespace vatwright
