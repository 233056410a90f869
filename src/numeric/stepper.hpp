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

/// Dormand and Prince's pair, from the library; the error goes with h^5.
class ExplicitStepper {
 public:
  static constexpr double power = 1.0 / 5;
  void attempt(CountedRhs& f, Step& s);
  /// Five rows of n: the polynomial in (t - s.t)/s.h over the step just made.
  void dense(const Step& s, std::span<double> rows);

 private:
  boost::numeric::odeint::runge_kutta_dopri5<State> stepper_;
  State middle_;
};

/// df/dy by differences about (t, y); central: second order, else one-sided from dydt. step: what the solution moves by
/// in the step ahead, which sets how far to look where a component is near zero. J: n x n, row by row.
void difference_jacobian(CountedRhs& f, double t, const State& y, const State& dydt, double h,
                         std::span<const double> floor, bool central, std::span<double> J);

/// RODAS of Hairer and Wanner, L-stable; the error goes with h^4.
class RosenbrockStepper {
 public:
  static constexpr double power = 1.0 / 4;
  RosenbrockStepper(std::size_t n, const Jacobian* jacobian, State floor)
      : n_(n),
        jacobian_(jacobian),
        floor_(std::move(floor)),
        J_(n * n),
        lu_(n * n),
        pivots_(n),
        dfdt_(n),
        y_(n),
        f_(n),
        k_(6 * n) {}
  /// New place: the Jacobian is taken anew by the next attempt.
  void moved() { fresh_ = false; }
  void attempt(CountedRhs& f, Step& s);
  void dense(const Step& s, std::span<double> rows);
  [[nodiscard]] std::span<const double> jacobian() const { return J_; }

 private:
  void take_derivatives(CountedRhs& f, const Step& s);
  bool factorise(double diagonal);
  void solve(std::span<double> b) const;
  std::span<double> k(std::size_t i) { return {k_.data() + i * n_, n_}; }
  std::span<const double> k(std::size_t i) const { return {k_.data() + i * n_, n_}; }

  std::size_t n_;
  const Jacobian* jacobian_;
  State floor_;
  State J_, lu_;
  std::vector<std::size_t> pivots_;
  State dfdt_, y_, f_, k_;
  bool fresh_ = false;
};

}  // namespace vatwright
