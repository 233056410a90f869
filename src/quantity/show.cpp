#include "vatwright/quantity/show.hpp"

#include <array>
#include <charconv>
#include <cmath>

#include "compound.hpp"
#include "unit.hpp"
#include "wording.hpp"

namespace vatwright {
namespace {

struct Scale {
  const char* trade;
  const char* field;
};

/// One unit for each thing shown, large or small, so that columns can be compared.
Scale scale_of(Shown shown) {
  switch (shown) {
    case Shown::volume:
      return {"m3", "gal"};
    case Shown::length:
      return {"m", "ft"};
    case Shown::bore:
      return {"mm", "in"};
    case Shown::area:
      return {"m2", "ft2"};
    case Shown::feed:
      return {"m3/h", "gpm"};
    case Shown::flow_mol:
      return {"kmol/h", "lbmol/h"};
    case Shown::flow_kg:
      return {"kg/h", "lb/h"};
    case Shown::temperature:
      return {"degC", "degF"};
    case Shown::difference:
      return {"K", "degF"};
    case Shown::pressure:
      return {"bar", "psia"};
    case Shown::pressure_drop:
      return {"bar", "psi"};
    case Shown::heat:
      return {"kW", "BTU/h"};
    case Shown::heat_flux:
      return {"kW/m2", "BTU/h/ft2"};
    case Shown::heat_transfer:
      return {"W/m2/K", "BTU/h/ft2/degF"};
    case Shown::concentration:
      return {"mol/L", "lbmol/ft3"};
    case Shown::density:
      return {"kg/m3", "lb/ft3"};
    case Shown::viscosity:
      return {"cP", "cP"};
    case Shown::molar_energy:
      return {"kJ/mol", "BTU/lbmol"};
    case Shown::time:
      return {"h", "h"};
    case Shown::speed:
      return {"m/s", "ft/s"};
    case Shown::percent:
      return {"%", "%"};
    case Shown::number:
      return {"", ""};
  }
  return {"", ""};
}

/// Factor and zero of every unit of the table, read once.
struct Measured {
  long double factor = 1, zero = 0;
};
Measured measure_of(Shown shown, Units units) {
  using Table = std::array<std::array<Measured, 2>, static_cast<std::size_t>(Shown::number) + 1>;
  static const Table table = [] {
    Table made{};
    for (std::size_t s = 0; s < made.size(); ++s)
      for (std::size_t u = 0; u < 2; ++u) {
        const Scale scale = scale_of(static_cast<Shown>(s));
        const std::string unit = u == 0 ? scale.trade : scale.field;
        if (unit.empty()) continue;
        const auto read = read_compound(unit);
        const auto* compound = std::get_if<Compound>(&read);  // a test reads every unit of this table
        if (compound == nullptr) continue;
        made[s][u].factor = compound->factor;
        if (compound->whole != nullptr) made[s][u].zero = compound->whole->zero;
      }
    return made;
  }();
  return table[static_cast<std::size_t>(shown)][units == Units::field ? 1 : 0];
}

double in_unit(double si, Shown shown, Units units) {
  const Measured unit = measure_of(shown, units);
  const long double value = static_cast<long double>(si) / unit.factor;
  if (shown != Shown::temperature) return static_cast<double>(value);
  // thousandths of a degree: next to 0 degC more figures would show the rounding of the subtraction
  return static_cast<double>(std::round((value - unit.zero) * 1000) / 1000);
}

}  // namespace

std::string unit_of(Shown shown, Units units) {
  const Scale scale = scale_of(shown);
  return units == Units::field ? scale.field : scale.trade;
}

std::string show_number(double si, Shown shown, Units units) { return brief(in_unit(si, shown, units)); }

std::string show(double si, Shown shown, Units units) {
  const std::string unit = unit_of(shown, units);
  return show_number(si, shown, units) + (unit.empty() ? "" : " " + unit);
}

std::string shortest(double value) {
  if (value == 0) return "0";
  std::array<char, 40> digits{};
  const auto end = std::to_chars(digits.data(), digits.data() + digits.size(), value).ptr;
  return {digits.data(), end};
}

}  // namespace vatwright
