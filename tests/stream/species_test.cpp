#include "vatwright/stream/species.hpp"

#include <cmath>

#include "support/catch.hpp"

using namespace vatwright;

TEST_CASE("a heat capacity that moves, and its integral", "[species]") {
  // Acetone: H. S. Fogler, Elements of Chemical Reaction Engineering, 3rd ed., example 8-7: 26.63 + 0.183 T - 45.86e-6
  // T^2 J/mol/K; integral written out as in the textbook, a T + b T^2/2 + c T^3/3.
  const HeatCapacity acetone{{26.63, 0.183, -45.86e-6}};
  CHECK(acetone.at(1035) == Approx(26.63 + 0.183 * 1035 - 45.86e-6 * 1035 * 1035));
  const auto primitive = [](double T) { return 26.63 * T + 0.183 * T * T / 2 - 45.86e-6 * T * T * T / 3; };
  CHECK(acetone.integral(298, 1035) == Approx(primitive(1035) - primitive(298)).epsilon(1e-12));
  CHECK(acetone.integral(1035, 298) == Approx(-acetone.integral(298, 1035)).epsilon(1e-14));
}

TEST_CASE("a constant and an absent heat capacity", "[species]") {
  CHECK(HeatCapacity{{75.3}}.at(300) == 75.3);
  CHECK(HeatCapacity{{75.3}}.integral(300, 310) == Approx(753));
  CHECK(HeatCapacity{}.at(300) == 0);
  CHECK(HeatCapacity{}.integral(300, 310) == 0);
}

TEST_CASE("the integral over a small difference is exact to rounding", "[species]") {
  const HeatCapacity cp{{26.63, 0.183, -45.86e-6}};
  const double from = 350, to = 350 + 0x1p-20;  // the difference is exact in binary
  CHECK(cp.integral(from, to) / (to - from) == Approx(cp.at(350)).epsilon(1e-8));
  CHECK(cp.integral(from, from) == 0);
}

TEST_CASE("water boils at 100 degC", "[species]") {
  // Antoine constants of water in mmHg and degC, 8.07131, 1730.63, 233.426 (Lange's Handbook, from memory): 760 mmHg at
  // 100 degC.
  const Antoine water{8.07131, 1730.63, 233.426, 133.322387, 273.15};
  CHECK(water.pressure_Pa(373.15) == Approx(101325).epsilon(1e-3));
}

TEST_CASE("the same vapour pressure in K and bar", "[species]") {
  // log10(p/bar) = A - B/(T/K + C): the constants of water for 344 .. 373 K, 5.08354, 1663.125, -45.622 (NIST, from
  // memory).
  const Antoine water{5.08354, 1663.125, -45.622, 1e5, 0};
  CHECK(water.pressure_Pa(373.15) == Approx(101325).epsilon(5e-3));
}

TEST_CASE("a vapour pressure is finite at any temperature", "[species]") {
  const Antoine water{8.07131, 1730.63, 233.426, 133.322387, 273.15};
  for (double T : {-10.0, 0.0, 1.0, 39.7, 39.724, 39.73, 1e3, 1e6, 1e300}) {
    CHECK(std::isfinite(water.pressure_Pa(T)));
    CHECK(water.pressure_Pa(T) >= 0);
  }
  const Antoine odd{1, -4000, -50, 1e5, 0};  // B below zero: the pole is at infinity
  CHECK(std::isfinite(odd.pressure_Pa(50.0001)));
}
