#include <algorithm>
#include <cmath>
#include <random>
#include <string>

#include "support/catch.hpp"
#include "support/utf8.hpp"
#include "vatwright/quantity/quantity.hpp"

using namespace vatwright;

namespace {

/// "found; expected" as a person reads it, empty where the text was taken.
std::string refusal(const std::string& text) {
  const auto read = parse_quantity(text);
  const auto* fault = std::get_if<QuantityFault>(&read);
  return fault == nullptr ? "" : fault->found + "; " + fault->expected;
}

std::string refusal(const std::string& text, Dimension expected, Sense sense = Sense::plain) {
  const auto read = to_si(text, expected, sense);
  const auto* fault = std::get_if<QuantityFault>(&read);
  return fault == nullptr ? "" : fault->found + "; " + fault->expected;
}

struct Refused {
  const char* text;
  const char* message;
};

}  // namespace

TEST_CASE("slips of numbers are refused with the right text", "[quantity][refused]") {
  const Refused cases[] = {
      {"6,3 m3", R"~(found "6,3 m3", a decimal comma; expected "6.3 m3")~"},
      {"6 300 L", R"~(found "6 300 L", two numbers before the unit; expected "6300 L")~"},
      {"6'300 L", R"~(found "6'300 L", a mark between digits; expected "6300 L")~"},
      {"1,234.5 L", R"~(found "1,234.5 L", commas in the number; expected "1234.5 L")~"},
      {"1.234,5 L", R"~(found "1.234,5 L", commas in the number; expected "1234.5 L")~"},
      {"1,234 L", R"~(found "1,234 L", a comma in the number; expected "1.234 L" or "1234 L")~"},
      {"-0,5 m3", R"~(found "-0,5 m3", a decimal comma; expected "-0.5 m3")~"},
      {"inf m3", R"~(found "inf m3", which is not finite; expected a finite number)~"},
      {"-NaN", R"~(found "-NaN", which is not finite; expected a finite number)~"},
      {"1e999 m3", R"~(found "1e999 m3", a number out of range; expected a size between 1e-300 and 1e300)~"},
      {"5 to 6 m3", R"~(found "5 to 6 m3", more than one number; expected one number with its unit)~"},
      {"5-6 m3", R"~(found "5-6 m3", more than one number; expected one number with its unit)~"},
      {"5x10^-3 mol", R"~(found "5x10^-3 mol", a power of ten; expected it with an e, such as "5e-3 mol/L")~"},
      {"m3", R"~(found "m3", no number at the front; expected a number with its unit)~"},
      {"", R"~(found "", an empty text; expected a number with its unit)~"},
  };
  for (const Refused& c : cases) CHECK(refusal(c.text) == c.message);
}

TEST_CASE("slips of units are refused with the right text", "[quantity][refused]") {
  const Refused cases[] = {
      {"6.3 M3", R"~(found "6.3 M3", no unit "M3"; expected "6.3 m3" (capitals count))~"},
      {"3 Bar", R"~(found "3 Bar", no unit "Bar"; expected "3 bar" (capitals count))~"},
      {"3 KW", R"~(found "3 KW", no unit "KW"; expected "3 kW" (capitals count))~"},
      {"72 C", R"~(found "72 C", no unit "C"; expected "72 degC")~"},
      {"72 \xc2\xb0\x43", "found \"72 \xc2\xb0\x43\", no unit \"\xc2\xb0\x43\"; expected \"72 degC\""},
      {"380 W/m2K", R"~(found "380 W/m2K", no unit "m2K"; expected "380 W/m2/K")~"},
      {"2.1 kJ/kgK", R"~(found "2.1 kJ/kgK", no unit "kgK"; expected "2.1 kJ/kg/K")~"},
      {"1 kg/(m2 s)", R"~(found "1 kg/(m2 s)", a space inside the unit; expected "1 kg/(m2.s)")~"},
      {"1 W/m2.K", R"~(found "1 W/m2.K", a product after a stroke, which is read in two ways; expected "1 W/m2/K")~"},
      {"4 kW/M2/k", R"~(found "4 kW/M2/k", no unit "M2"; expected "4 kW/m2/K" (capitals count))~"},
      {"6 bar(g)", R"~(found "6 bar(g)", no unit "bar(g)"; expected "6 barg")~"},
      {"3 mPa",
       R"~(found "3 mPa", a unit that counts inside compounds only; expected "MPa" or "Pa" (capitals count))~"},
      {"-300 degC", R"~(found "-300 degC", 26.85 K below absolute zero; expected at least "0 K" or "-273.15 degC")~"},
      {"-1.2 barg", R"~(found "-1.2 barg", 0.1867 bar below full vacuum; expected at least "-1.01325 barg")~"},
      {"6 barg/min",
       R"~(found "6 barg/min", a gauge pressure inside a compound unit; expected an absolute one there, such as "bar")~"},
  };
  for (const Refused& c : cases) CHECK(refusal(c.text) == c.message);
}

TEST_CASE("no prefix is taken that is not listed", "[quantity][refused]") {
  for (const char* text : {"1 km", "1 hPa", "1 GJ", "1 mW", "1 ms", "1 nm", "1 kbar", "1 mmol", "1 dL", "1 Mg"})
    CHECK(refusal(text).find("no unit") != std::string::npos);
}

TEST_CASE("units that say too little come with their question", "[quantity][refused]") {
  for (const char* text : {"5 Nm3/h", "5 Sm3", "5 scf", "5 SCFM", "5 MMscfd", "5 slpm", "5 nm3/h"})
    CHECK(refusal(text).find("at which temperature and pressure?") != std::string::npos);
  for (const char* text : {"100 ppm", "100 ppb", "100 PPM"})
    CHECK(refusal(text).find("of mass, moles or volume?") != std::string::npos);
  CHECK(refusal("2 in sch40").find("schedules are not looked up") != std::string::npos);
}

TEST_CASE("a wrong dimension is told by name", "[quantity][refused]") {
  CHECK(refusal("6.3 m2", dim::volume) == R"~(found "6.3 m2", an area; expected a volume, such as "6.3 m3")~");
  CHECK(refusal("2.4 m3", dim::volume_flow) ==
        R"~(found "2.4 m3", a volume; expected a volume flow, such as "2.4 m3/h")~");
  CHECK(refusal("327 kcal/h", dim::heat_transfer) ==
        R"~(found "327 kcal/h", a power; expected a power per area and temperature, such as "420 W/m2/K")~");
  CHECK(refusal("58 kJ", dim::molar_energy) ==
        R"~(found "58 kJ", an energy; expected an energy per mole, such as "58 kJ/mol")~");
  const Dimension second = dim::volume / dim::amount / dim::time;
  CHECK(refusal("0.042 1/min", second) ==
        R"~(found "0.042 1/min", a rate per time; expected a rate constant of order 2, such as "0.042 L/mol/min")~");
  CHECK(refusal("0.042", second) ==
        R"~(found "0.042", a number without a unit; expected a rate constant of order 2, such as "0.042 L/mol/min")~");
  CHECK(refusal("0.042 L/mol/min", second * dim::volume / dim::mass) ==
        "found \"0.042 L/mol/min\", a rate constant of order 2; expected a rate constant of order 2 per catalyst mass, "
        "such as \"0.042 L2/mol/kg/min\"");
  CHECK(refusal("6.3", dim::volume) ==
        R"~(found "6.3", a number without a unit; expected a volume, such as "6.3 m3")~");
  CHECK(refusal("299", dim::temperature, Sense::temperature) ==
        R"~(found "299", a number without a unit; expected "299 K" or "299 degC")~");
  CHECK(refusal("3 barg", dim::pressure, Sense::difference) ==
        "found \"3 barg\", a gauge pressure where a difference is meant; expected a pressure difference, such as \"3 "
        "bar\"");
  CHECK(refusal("3 m3", dim::none).find("expected a number without a unit") != std::string::npos);
  CHECK_FALSE(refusal("300 K2/K", dim::temperature, Sense::temperature).empty());
}

TEST_CASE("any text is answered with a value or a printable fault", "[quantity][refused][random]") {
  std::mt19937 random(20);
  const std::string trade = "0123456789.,+-eE /*^()%mKgLbarWJsdhC\xc2\xb2\xb7 ";
  const auto check = [](const std::string& text) {
    const auto read = parse_quantity(text);
    const auto* fault = std::get_if<QuantityFault>(&read);
    if (fault == nullptr) {
      REQUIRE(std::isfinite(std::get<Quantity>(read).si));
      return;
    }
    REQUIRE_FALSE(fault->found.empty());
    REQUIRE(fault->expected.starts_with("expected "));
    REQUIRE(is_utf8(fault->found + fault->expected));
    REQUIRE(fault->found.size() + fault->expected.size() < 1200);
    const std::string all = fault->found + fault->expected;
    REQUIRE(std::none_of(all.begin(), all.end(), [](unsigned char c) { return c < 0x20 || c == 0x7f; }));
  };
  for (int i = 0; i < 20000; ++i) {
    std::string text(random() % 40, ' ');
    for (char& c : text) c = i % 2 == 0 ? static_cast<char>(random() % 256) : trade[random() % trade.size()];
    if (i % 4 == 3) text.insert(0, "5 ");
    check(text);
  }
  check(std::string(1000000, '('));
  check("5 " + std::string(190, '('));
  check("5 m" + std::string(190, '9'));
  check(std::string(199, '9'));
  check(std::string("5 m\0", 4));
}
