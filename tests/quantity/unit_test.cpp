#include <string>

#include "support/catch.hpp"
#include "vatwright/quantity/quantity.hpp"

using namespace vatwright;

namespace {

struct Known {
  const char* text;
  double si;
  Dimension dimension;
};

double si_of(const std::string& text) {
  const auto read = parse_quantity(text);
  INFO(text);
  REQUIRE(std::holds_alternative<Quantity>(read));
  return std::get<Quantity>(read).si;
}

void check(const Known& known) {
  INFO(known.text);
  const auto read = to_si(known.text, known.dimension, Sense::plain);
  REQUIRE(std::holds_alternative<double>(read));
  CHECK(std::get<double>(read) == Approx(known.si).epsilon(1e-12));
}

}  // namespace

TEST_CASE("units that are exact by definition", "[quantity][units]") {
  // BIPM, SI brochure, 9th ed., tables 5, 7, 8; NIST SP 811 (2008), appendix B.8: in, ft, gal, lb, atm, cal, psi from
  // lbf
  const Known known[] = {
      {"6.3 m3", 6.3, dim::volume},
      {"1 L", 1e-3, dim::volume},
      {"1 mL", 1e-6, dim::volume},
      {"1 ML", 1e3, dim::volume},
      {"1 gal", 3.785411784e-3, dim::volume},
      {"1 ft3", 2.8316846592e-2, dim::volume},
      {"1 cm", 1e-2, dim::length},
      {"52.5 mm", 0.0525, dim::length},
      {"1 um", 1e-6, dim::length},
      {"1 in", 2.54e-2, dim::length},
      {"1 ft", 0.3048, dim::length},
      {"1 g", 1e-3, dim::mass},
      {"1 mg", 1e-6, dim::mass},
      {"1 t", 1e3, dim::mass},
      {"1 lb", 0.45359237, dim::mass},
      {"1 kmol", 1e3, dim::amount},
      {"1 lbmol", 453.59237, dim::amount},
      {"1 min", 60, dim::time},
      {"1 h", 3600, dim::time},
      {"1 d", 86400, dim::time},
      {"1 day", 86400, dim::time},
      {"1 year", 31536000, dim::time},  // 365 d, a ruling of this project: plants count so
      {"1 kPa", 1e3, dim::pressure},
      {"1 MPa", 1e6, dim::pressure},
      {"1 bar", 1e5, dim::pressure},
      {"1 mbar", 1e2, dim::pressure},
      {"1 bara", 1e5, dim::pressure},
      {"1 atm", 101325, dim::pressure},
      {"760 torr", 101325, dim::pressure},
      {"1 mPa.s", 1e-3, dim::viscosity},
      {"1 Pa.s", 1, dim::viscosity},
      {"1 cP", 1e-3, dim::viscosity},
      {"1 cSt", 1e-6, dim::area / dim::time},
      {"1 kJ", 1e3, dim::energy},
      {"1 MJ", 1e6, dim::energy},
      {"1 cal", 4.184, dim::energy},
      {"1 kcal", 4184, dim::energy},
      {"1 kW", 1e3, dim::power},
      {"1 MW", 1e6, dim::power},
      {"60 rpm", 1, dim::frequency},
      {"1 1/s", 1, dim::frequency},
      {"95 %", 0.95, dim::none},
      {"0.95", 0.95, dim::none},
  };
  for (const Known& k : known) check(k);
}

TEST_CASE("units that are measured or follow from several", "[quantity][units]") {
  // NIST SP 811 (2008), appendix B.8 (from memory): seven digits, so half a unit of the last one is left open
  const auto printed = [](double value, double last_digit) { return Approx(value).epsilon(0).margin(last_digit / 2); };
  CHECK(si_of("1 psi") == printed(6894.757, 1e-3));
  CHECK(si_of("1 BTU/h/ft2/degF") == printed(5.678263, 1e-6));
  CHECK(si_of("1 BTU/h") == printed(0.2930711, 1e-7));
  CHECK(si_of("1 hp") == printed(745.6999, 1e-4));
  CHECK(si_of("1 mmHg") == printed(133.3224, 1e-4));
  CHECK(si_of("1 torr") == printed(133.3224, 1e-4));
  CHECK(si_of("1 gpm") == printed(6.309020e-5, 1e-11));
  CHECK(si_of("1 ft3/min") == printed(4.719474e-4, 1e-10));
  CHECK(si_of("1 lb/ft3") == printed(16.01846, 1e-5));
  // lbf = lb * 9.80665 m/s2 on one square inch; the International Table BTU is 2326 J/kg * lb * degF: exact
  CHECK(si_of("1 psi") == Approx(0.45359237 * 9.80665 / (0.0254 * 0.0254)).epsilon(1e-14));
  CHECK(si_of("1 psia") == si_of("1 psi"));
  CHECK(si_of("1 BTU") == Approx(1055.05585262).epsilon(1e-14));
  CHECK(si_of("1 BTU/lb/degF") == Approx(4186.8).epsilon(1e-11));
  CHECK(si_of("1 BTU/lb") == Approx(2326).epsilon(1e-11));
  CHECK(si_of("1 kcal/m2/h/K") == Approx(4184.0 / 3600).epsilon(1e-14));
}

TEST_CASE("temperatures", "[quantity][units]") {
  // fixed points: NIST SP 811, B.8 (degC + 273.15; (degF + 459.67)/1.8); BIPM SI brochure 9, 2.3.1
  CHECK(si_of("0 degC") == 273.15);
  CHECK(si_of("72 degC") == Approx(345.15).epsilon(1e-15));
  CHECK(si_of("32 degF") == Approx(273.15).epsilon(1e-15));
  CHECK(si_of("212 degF") == Approx(373.15).epsilon(1e-15));
  CHECK(si_of("491.67 degR") == Approx(273.15).epsilon(1e-15));
  CHECK(si_of("-273.15 degC") == 0);
  CHECK(si_of("-459.67 degF") == 0);
  CHECK(si_of("299 K") == 299);
  CHECK(std::get<double>(to_si("9 degF", dim::temperature, Sense::difference)) == Approx(5).epsilon(1e-15));
  CHECK(std::get<double>(to_si("-300 degC", dim::temperature, Sense::difference)) == -300);
  CHECK(std::get<double>(to_si("5 K", dim::temperature, Sense::difference)) == 5);
  CHECK(si_of("1 W/m2/degC") == 1);
  CHECK(si_of("1.8 W/m2/degF") == Approx(3.24).epsilon(1e-15));
  CHECK(std::get<Quantity>(parse_quantity("9 degF")).difference == Approx(5).epsilon(1e-15));
  CHECK(std::get<Quantity>(parse_quantity("9 degF")).temperature);
  CHECK_FALSE(std::get<Quantity>(parse_quantity("9 J/K")).temperature);
}

TEST_CASE("gauge pressures count from 1.01325 bar", "[quantity][units]") {
  CHECK(si_of("0 barg") == 101325);
  CHECK(si_of("6 barg") == Approx(701325).epsilon(1e-15));
  CHECK(si_of("-1.01325 barg") == 0);
  CHECK(si_of("100 kPag") == Approx(201325).epsilon(1e-15));
  CHECK(si_of("14.695948775 psig") == Approx(202650).epsilon(1e-9));  // 1 atm = 14.69595 psi, NIST SP 811
  CHECK(std::get<Quantity>(parse_quantity("6 barg")).gauge);
  CHECK(std::get<Quantity>(parse_quantity("3 bar")).plain_bar);
  CHECK_FALSE(std::get<Quantity>(parse_quantity("3 bara")).plain_bar);
  CHECK_FALSE(std::get<Quantity>(parse_quantity("3 bar/min")).plain_bar);
}

TEST_CASE("the same unit written in several ways", "[quantity][units]") {
  for (const char* text : {"420 W/m2/K", "420 W/(m2.K)", "420 W/(m2*K)", "420 W/(m\xc2\xb2\xc2\xb7K)", "420 W/m^2/K",
                           "420W/m2/K", "420 W.m-2.K-1", "+420 W / m2 / K"})
    CHECK(si_of(text) == Approx(420).epsilon(1e-14));
  CHECK(si_of("3 (L/mol)^0.5/min") == Approx(si_of("3 L^0.5/mol^0.5/min")).epsilon(1e-14));
  CHECK(si_of("3 mol^(-1/2)") == Approx(si_of("3 mol^-0.5")).epsilon(1e-14));
  CHECK(si_of("0.03 s\xe2\x81\xbb\xc2\xb9") == si_of("0.03 1/s"));
  CHECK(si_of("0.03 s-1") == si_of("0.03/s"));
  CHECK(si_of(" 95 % ") == 0.95);
  CHECK(si_of("6.3\xc2\xa0m3") == 6.3);
  CHECK(si_of("5.e3 Pa") == 5000);
  CHECK(si_of("1e-3 m3") == 1e-3);
  CHECK(si_of("1 kg/(m2.s)") == 1);
  CHECK(si_of("5 gal(US)") == si_of("5 gal"));
}

TEST_CASE("moles read as mass", "[quantity]") {
  const auto read = std::get<Quantity>(parse_quantity("6 mg/L/h"));
  CHECK(mass_for_moles(read.dimension, dim::concentration / dim::time) == 1.0);
  CHECK(mass_for_moles(dim::concentration, dim::concentration) == 0.0);
  CHECK(mass_for_moles(dim::volume / dim::mass / dim::time, dim::volume / dim::amount / dim::time) == -1.0);
  CHECK_FALSE(mass_for_moles(dim::pressure, dim::concentration).has_value());
  CHECK(moles_as_mass(dim::concentration) == dim::density);
}
