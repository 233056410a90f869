#include "vatwright/numeric/hermite.hpp"

#include <algorithm>
#include <cmath>
#include <random>

#include "support/catch.hpp"

using namespace vatwright;

TEST_CASE("three points, worked by hand from the formulas", "[hermite]") {
  // x 0, 1, 3; y 0, 1, 2: secants 1, 1/2; inner slope 9/(5/1 + 4/(1/2)) = 9/13; ends (4 - 1/2)/3 = 7/6, (5/2 - 2)/3 =
  // 1/6. Middle of a piece: mean of y + h (d0 - d1)/8.
  const Hermite curve({0, 1, 3}, {0, 1, 2});
  CHECK(curve.slope(0) == Approx(7.0 / 6));
  CHECK(curve.slope(1) == Approx(9.0 / 13));
  CHECK(curve.slope(3) == Approx(1.0 / 6));
  CHECK(curve(0.5) == Approx(0.5 + 37.0 / 624));
  CHECK(curve(2) == Approx(1.5 + 41.0 / 312));
  CHECK(curve.slope(0.5) == Approx(1.5 - 145.0 / 312));
}

TEST_CASE("end slopes are cut as told", "[hermite]") {
  CHECK(Hermite({0, 1, 2}, {0, 1, -4}).slope(0) == Approx(3));   // (3 + 5)/2 = 4, above 3 secants, second of other sign
  CHECK(Hermite({0, 1, 2}, {0, 1, 6}).slope(0) == 0);            // (3 - 5)/2 = -1, not the sign of the first secant
  CHECK(Hermite({0, 1, 2}, {6, 1, 0}).slope(2) == 0);            // the same at the other end
  CHECK(Hermite({0, 1, 2}, {0, 1, 1}).slope(0) == Approx(1.5));  // a level second secant does not cut what is below 3
}

TEST_CASE("two points give a straight line", "[hermite]") {
  const Hermite line({1, 3}, {2, 8});
  CHECK(line(1.5) == Approx(3.5));
  CHECK(line.slope(2.9) == Approx(3));
}

TEST_CASE("a straight line is met exactly through uneven points", "[hermite]") {
  const Hermite line({0, 0.1, 0.7, 1}, {1, 1.2, 2.4, 3});
  for (double x : {0.0, 0.05, 0.3, 0.7, 0.99, 1.0}) CHECK(line(x) == Approx(1 + 2 * x));
}

TEST_CASE("outside there is no value", "[hermite]") {
  const Hermite curve({0, 1, 3}, {0, 1, 2});
  CHECK(std::isnan(curve(-1e-12)));
  CHECK(std::isnan(curve(3.0000001)));
  CHECK(std::isnan(curve.slope(4)));
  CHECK(curve(3) == 2);
}

TEST_CASE("no overshoot: every piece stays between its ends where the data are monotone or not", "[hermite]") {
  std::mt19937 random(5);
  std::uniform_real_distribution<double> gap(0.05, 2), level(-3, 3);
  for (int trial = 0; trial < 200; ++trial) {
    std::vector<double> x{0}, y{level(random)};
    for (int i = 0; i < 6; ++i) {
      x.push_back(x.back() + gap(random));
      y.push_back(level(random));
    }
    const Hermite curve(x, y);
    for (std::size_t i = 0; i + 1 < x.size(); ++i)
      for (int k = 0; k <= 20; ++k) {
        const double value = curve(x[i] + (x[i + 1] - x[i]) * k / 20);
        CHECK(value >= std::min(y[i], y[i + 1]) - 1e-12);
        CHECK(value <= std::max(y[i], y[i + 1]) + 1e-12);
      }
  }
}

TEST_CASE("slope is the derivative", "[hermite]") {
  const Hermite curve({0, 1, 3, 4}, {0, 1, 2, 0.5});
  for (double x : {0.2, 0.8, 1.7, 2.9, 3.4})
    CHECK(curve.slope(x) == Approx((curve(x + 1e-6) - curve(x - 1e-6)) / 2e-6).epsilon(1e-7));
}
