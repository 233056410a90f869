#include "vatwright/vessel/pressure_drop.hpp"

#include <cmath>

#include "support/catch.hpp"

using namespace vatwright;

namespace {

/// Colebrook's equation by iteration.
double colebrook(double Re, double rough) {
  double f = 0.02;
  for (int i = 0; i < 100; ++i) f = std::pow(-2 * std::log10(rough / 3.7 + 2.51 / (Re * std::sqrt(f))), -2);
  return f;
}

}  // namespace

TEST_CASE("friction is 64/Re in laminar flow", "[vessel][pressure]") {
  for (double Re : {1e-3, 1.0, 50.0, 99.0, 101.0, 500.0, 1500.0})
    CHECK(friction_factor(Re, 1e-3) == Approx(64 / Re).epsilon(2e-4));
}

TEST_CASE("friction follows Colebrook's equation in turbulent flow", "[vessel][pressure]") {
  for (double Re : {1e4, 1e5, 1e6, 1e7, 1e8})
    for (double rough : {0.0, 1e-5, 1e-4, 1e-3, 1e-2, 0.05})
      CHECK(friction_factor(Re, rough) == Approx(colebrook(Re, rough)).epsilon(0.035));
}

// H. S. Fogler, Elements of Chemical Reaction Engineering, 4th ed. 2006, Ex. 4-5: 164.1 lbf/ft3 at the inlet.
TEST_CASE("Ergun's gradient of the published bed", "[vessel][pressure]") {
  const double ft = 0.3048, lb = 0.45359237, h = 3600, lbf = lb * 9.80665;
  const double rho = 0.413 * lb / (ft * ft * ft), mu = 0.0673 * lb / (ft * h);
  const double G = 104.4 * lb / h / (0.01414 * ft * ft);
  const double gradient = ergun_gradient(G / rho, rho, mu, 0.25 / 12 * ft, 0.45);
  CHECK(gradient / (lbf / (ft * ft * ft)) == Approx(164.1).epsilon(0.01));
  CHECK(gradient / (lbf / (ft * ft * ft)) == Approx(163.79).epsilon(5e-4));
}
