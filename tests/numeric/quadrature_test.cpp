#include "vatwright/numeric/quadrature.hpp"

#include <cmath>
#include <numbers>

#include "support/catch.hpp"

using namespace vatwright;

TEST_CASE("Gauss and Legendre's rule is exact to its degree", "[quadrature]") {
  const int points = GENERATE(7, 10, 15, 20, 30);
  const int degree = 2 * points - 1;
  const auto power = [&](double x) { return std::pow(x, degree); };
  const double exact = (std::pow(1.5, degree + 1) - std::pow(0.5, degree + 1)) / (degree + 1);
  CHECK(integrate_fixed(power, 0.5, 1.5, points) == Approx(exact).epsilon(1e-13));
  CHECK(integrate_fixed(power, 1.5, 0.5, points) == Approx(-exact).epsilon(1e-13));
}

TEST_CASE("adaptive integrals agree with closed forms, and the estimate does not flatter", "[quadrature]") {
  const auto [f, a, b, exact] = GENERATE(table<double (*)(double), double, double, double>({
      {[](double x) { return std::exp(x); }, 0.0, 1.0, std::numbers::e - 1},
      {[](double x) { return 1 / (1 + x * x); }, -5.0, 5.0, 2 * std::atan(5.0)},
      {[](double x) { return std::sqrt(x); }, 0.0, 1.0, 2.0 / 3},
      {[](double x) { return 1 / std::sqrt(x); }, 0.0, 1.0, 2.0},
      {[](double x) { return 1 / (x * x + 1e-6); }, -1.0, 1.0, 2e3 * std::atan(1e3)},
      {[](double x) { return std::abs(x - 0.3); }, 0.0, 1.0, 0.29},
      {[](double x) { return std::cos(x); }, 2.0, 0.0, -std::sin(2.0)},
  }));
  const auto integral = integrate(f, a, b, {.rel_tol = 1e-9});
  REQUIRE(answer(integral) != nullptr);
  CHECK(answer(integral)->value == Approx(exact).epsilon(2e-9));
  CHECK(std::abs(answer(integral)->value - exact) <= answer(integral)->error + 1e-15 * std::abs(exact));
}

TEST_CASE("the gas tube of half order by its design integral", "[quadrature]") {
  // O. Levenspiel, Chemical Reaction Engineering, 3rd ed., example 5.4: integral of sqrt((1 + X)/(1 - X)) to 0.8
  // is 1.328, and asin(X) - sqrt(1 - X^2) + 1 in closed form.
  const auto f = [](double X) { return std::sqrt((1 + X) / (1 - X)); };
  const double closed = std::asin(0.8) - 0.6 + 1;
  CHECK(closed == Approx(1.328).epsilon(1e-3));
  CHECK(answer(integrate(f, 0, 0.8))->value == Approx(closed).epsilon(1e-12));
  CHECK(answer(integrate(f, 0, 1, {.rel_tol = 1e-8}))->value == Approx(std::numbers::pi / 2 + 1).epsilon(1e-8));
}

TEST_CASE("an integral that can not be had says why", "[quadrature]") {
  const auto log_below_zero = integrate([](double x) { return std::log(x); }, -1, 1);
  CHECK(std::get<NoAnswer>(log_below_zero).why == "the integrand has no value somewhere between -1 and 1");
  const auto endless = integrate([](double x) { return 1 / x; }, 0, 1, {.most_calls = 500});
  CHECK(std::get<NoAnswer>(endless).why.find("an integral was not pinned down in 500 evaluations") == 0);
}

TEST_CASE("an empty range and a zero function are zero", "[quadrature]") {
  CHECK(answer(integrate([](double x) { return std::exp(x); }, 1, 1))->value == 0);
  CHECK(answer(integrate([](double) { return 0.0; }, 0, 1))->value == 0);
}
