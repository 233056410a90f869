#include "vatwright/quantity/show.hpp"

#include <cmath>
#include <cstdlib>
#include <random>

#include "support/catch.hpp"
#include "vatwright/quantity/quantity.hpp"

using namespace vatwright;

TEST_CASE("figures in trade units", "[quantity][show]") {
  CHECK(show(2.4 / 3600, Shown::feed) == "2.4 m3/h");
  CHECK(show(1e-9, Shown::feed) == "3.6e-06 m3/h");
  CHECK(show(345.15, Shown::temperature) == "72 degC");
  CHECK(show(273.15 + 1e-13, Shown::temperature) == "0 degC");
  CHECK(show(27, Shown::difference) == "27 K");
  CHECK(show(3e5, Shown::pressure) == "3 bar");
  CHECK(show(52340, Shown::heat) == "52.34 kW");
  CHECK(show(0.0525, Shown::bore) == "52.5 mm");
  CHECK(show(0.905, Shown::percent) == "90.5 %");
  CHECK(show(3200, Shown::concentration) == "3.2 mol/L");
  CHECK(show(8e-4, Shown::viscosity) == "0.8 cP");
  CHECK(show(58000, Shown::molar_energy) == "58 kJ/mol");
  CHECK(show(0, Shown::heat) == "0 kW");
  CHECK(show(0.5, Shown::number) == "0.5");
}

TEST_CASE("figures in field units", "[quantity][show]") {
  // NIST SP 811 (2008), appendix B.8
  CHECK(show(6.309020e-5, Shown::feed, Units::field) == "1 gpm");
  CHECK(show(373.15, Shown::temperature, Units::field) == "212 degF");
  CHECK(show(5, Shown::difference, Units::field) == "9 degF");
  CHECK(show(101325, Shown::pressure, Units::field) == "14.7 psia");
  CHECK(show(6894.757, Shown::pressure_drop, Units::field) == "1 psi");
  CHECK(show(5.678263, Shown::heat_transfer, Units::field) == "1 BTU/h/ft2/degF");
}

TEST_CASE("four figures, no trailing zeros", "[quantity][show]") {
  const auto figure = [](double x) { return show_number(x, Shown::number, Units::trade); };
  CHECK(figure(12345.678) == "12350");
  CHECK(figure(9999.6) == "10000");
  CHECK(figure(0.99996) == "1");
  CHECK(figure(1.20049) == "1.2");
  CHECK(figure(0.05214) == "0.05214");
  CHECK(figure(1.23e-5) == "1.23e-05");
  CHECK(figure(-2.5) == "-2.5");
  CHECK(figure(2.5e7) == "2.5e+07");
}

TEST_CASE("what is shown reads back within its four figures", "[quantity][show][random]") {
  std::mt19937 random(5);
  std::uniform_real_distribution<double> decades(-7, 9);
  for (int i = 0; i < 5000; ++i) {
    const auto shown = static_cast<Shown>(random() % (static_cast<unsigned>(Shown::number) + 1));
    const auto units = random() % 2 == 0 ? Units::trade : Units::field;
    const bool warm = shown == Shown::temperature;
    const double si = warm ? 200 + static_cast<double>(random() % 1000) : std::pow(10, decades(random));
    const std::string text = show(si, shown, units);
    INFO(text);
    const auto read = parse_quantity(text);
    REQUIRE(std::holds_alternative<Quantity>(read));
    const auto& q = std::get<Quantity>(read);
    REQUIRE((shown == Shown::difference ? q.difference : q.si) == Approx(si).epsilon(5.1e-4));
  }
}

TEST_CASE("the shortest text reads back to the same double", "[quantity][show][random]") {
  std::mt19937_64 random(9);
  CHECK(shortest(0.1) == "0.1");
  CHECK(shortest(-0.0) == "0");
  for (int i = 0; i < 5000; ++i) {
    const double x = std::ldexp(static_cast<double>(random()), static_cast<int>(random() % 400) - 200);
    REQUIRE(std::strtod(shortest(x).c_str(), nullptr) == x);
  }
}
