#include "vatwright/kinetics/rate_table.hpp"

#include <cmath>

#include "support/catch.hpp"
#include "vatwright/numeric/quadrature.hpp"

using namespace vatwright;

TEST_CASE("the points of a table are met, and it stays above zero between them", "[table]") {
  const RateTable table{{0.0, 0.2, 0.4, 0.6, 0.8}, {9.1, 7.6, 5.9, 4.0, 2.05}, 343.15};
  const RateCurve curve(table);
  for (std::size_t i = 0; i < table.conversion.size(); ++i)
    CHECK(curve(table.conversion[i]) == Approx(table.consumption_mol_m3_s[i]).epsilon(1e-14));
  double before = 10;
  for (int i = 0; i <= 800; ++i) {
    const double now = curve(0.001 * i);
    CHECK(now > 0);
    CHECK(now < before);  // falling data, falling curve
    before = now;
  }
}

TEST_CASE("one inner slope by hand", "[table]") {
  // 1/r = 1, 2, 5 at X = 0, 1/2, 1: secants 2, 6; inner slope 3/(1.5/2 + 1.5/6) = 3; ends (3 h s0 - h s1)/(2 h) = 0
  // and 8.
  const RateCurve curve(RateTable{{0, 0.5, 1}, {1, 0.5, 0.2}, std::nullopt});
  CHECK(curve.reciprocal_slope(0.5) == Approx(3));
  CHECK(curve.reciprocal_slope(0) == Approx(0).margin(1e-14));
  CHECK(curve.reciprocal_slope(1) == Approx(8));
  CHECK(curve.reciprocal(0.25) == Approx(1.5 + 0.5 * (0 - 3) / 8));
}

TEST_CASE("a second-order law told as a table gives the tube's volume back", "[table]") {
  // r = k C0^2 (1 - X)^2: V/F = X/(k C0^2 (1 - X)) in closed form; 17 points, k C0^2 = 2.
  RateTable table;
  for (int i = 0; i <= 16; ++i) {
    const double X = 0.05 * i;
    table.conversion.push_back(X);
    table.consumption_mol_m3_s.push_back(2 * (1 - X) * (1 - X));
  }
  const RateCurve curve(table);
  const auto volume = integrate([&](double X) { return curve.reciprocal(X); }, 0, 0.8, {.rel_tol = 1e-8});
  CHECK(answer(volume)->value == Approx(0.8 / (2 * 0.2)).epsilon(2e-3));
}

TEST_CASE("outside the table there is no value", "[table]") {
  const RateCurve curve(RateTable{{0.1, 0.8}, {3, 1}, std::nullopt});
  CHECK(std::isnan(curve(0.0999)));
  CHECK(std::isnan(curve(0.8001)));
}
