#include "vatwright/numeric/quadrature.hpp"

#include <boost/math/quadrature/gauss.hpp>
#include <boost/math/quadrature/gauss_kronrod.hpp>
#include <cmath>
#include <limits>
#include <queue>
#include <string>

#include "number_text.hpp"
#include "vatwright/error/expects.hpp"

namespace vatwright {
namespace {

namespace quadrature = boost::math::quadrature;

/// On [-1, 1] and scaled here: the library would refuse a > b and take an end at infinity for a range without end.
template <class Rule>
double on_interval(Function f, double a, double b) {
  const double middle = (a + b) / 2, half = (b - a) / 2;
  return half * Rule::integrate([&](double u) { return f(middle + half * u); });
}

struct Piece {
  double a, b, value, error;
  bool operator<(const Piece& other) const { return error < other.error; }
};

Piece measure(Function f, double a, double b) {
  const double middle = (a + b) / 2, half = (b - a) / 2;
  double error = 0;
  const double value = quadrature::gauss_kronrod<double, 15>::integrate([&](double u) { return f(middle + half * u); },
                                                                        -1.0, 1.0, 0, 0.0, &error);
  return {a, b, half * value, std::abs(half) * error};
}

NoAnswer unsolved(const std::string& why) { return {NoAnswer::Kind::unsolved, why}; }

}  // namespace

double integrate_fixed(Function f, double a, double b, int points) {
  if (points == 7) return on_interval<quadrature::gauss<double, 7>>(f, a, b);
  if (points == 10) return on_interval<quadrature::gauss<double, 10>>(f, a, b);
  if (points == 15) return on_interval<quadrature::gauss<double, 15>>(f, a, b);
  if (points == 20) return on_interval<quadrature::gauss<double, 20>>(f, a, b);
  VATWRIGHT_EXPECTS(points == 30);
  return on_interval<quadrature::gauss<double, 30>>(f, a, b);
}

Outcome<Integral> integrate(Function f, double a, double b, const IntegralOptions& options) {
  std::priority_queue<Piece> pieces;
  pieces.push(measure(f, a, b));
  Integral whole{pieces.top().value, pieces.top().error, 15};
  while (whole.error > std::max(options.abs_tol, options.rel_tol * std::abs(whole.value))) {
    if (whole.calls + 30 > options.most_calls)
      return unsolved("an integral was not pinned down in " + std::to_string(options.most_calls) +
                      " evaluations; its error is about " + number_text(whole.error) + " of " +
                      number_text(whole.value));
    const Piece worst = pieces.top();
    pieces.pop();
    const double middle = (worst.a + worst.b) / 2;
    for (const Piece& part : {measure(f, worst.a, middle), measure(f, middle, worst.b)}) {
      whole.value += part.value;
      whole.error += part.error;
      pieces.push(part);
    }
    whole.value -= worst.value;
    whole.error = std::max(0.0, whole.error - worst.error);
    whole.calls += 30;
    if (!std::isfinite(whole.value)) break;
  }
  if (!std::isfinite(whole.value) || !std::isfinite(whole.error))
    return unsolved("the integrand has no value somewhere between " + number_text(a) + " and " + number_text(b));
  return whole;
}

}  // namespace vatwright
