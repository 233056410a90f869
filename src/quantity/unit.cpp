#include "unit.hpp"

#include <algorithm>
#include <array>

namespace vatwright {
namespace {

using Kind = Unit::Kind;

// Exact by definition (SI brochure 9; NIST SP 811, appendix B), except hp, mmHg and BTU (International Table), which
// SP 811 gives to the digits here.
constexpr long double inch = 0.0254L, foot = 0.3048L, pound = 0.45359237L;
constexpr long double standard_gravity = 9.80665L;
constexpr long double pound_per_square_inch = pound * standard_gravity / (inch * inch);
constexpr long double gallon = 231 * inch * inch * inch;
constexpr long double atmosphere = 101325;
constexpr Dimension kinematic_viscosity = dim::area / dim::time;

constexpr std::array units{
    Unit{"m", 1, dim::length},
    Unit{"cm", 0.01L, dim::length},
    Unit{"mm", 0.001L, dim::length},
    Unit{"um", 1e-6L, dim::length},
    Unit{"in", inch, dim::length},
    Unit{"ft", foot, dim::length},
    Unit{"L", 0.001L, dim::volume},
    Unit{"mL", 1e-6L, dim::volume},
    Unit{"ML", 1000, dim::volume},
    Unit{"gal", gallon, dim::volume},
    Unit{"kg", 1, dim::mass},
    Unit{"g", 0.001L, dim::mass},
    Unit{"mg", 1e-6L, dim::mass},
    Unit{"t", 1000, dim::mass},
    Unit{"lb", pound, dim::mass},
    Unit{"mol", 1, dim::amount},
    Unit{"kmol", 1000, dim::amount},
    Unit{"lbmol", pound * 1000, dim::amount},
    Unit{"s", 1, dim::time},
    Unit{"min", 60, dim::time},
    Unit{"h", 3600, dim::time},
    Unit{"d", 86400, dim::time},
    Unit{"day", 86400, dim::time},
    Unit{"year", 365 * 86400.0L, dim::time},
    Unit{"K", 1, dim::temperature, Kind::temperature},
    Unit{"degC", 1, dim::temperature, Kind::temperature, 273.15},
    Unit{"degF", 1 / 1.8L, dim::temperature, Kind::temperature, 459.67},
    Unit{"degR", 1 / 1.8L, dim::temperature, Kind::temperature},
    Unit{"Pa", 1, dim::pressure},
    Unit{"mPa", 0.001L, dim::pressure, Kind::part},
    Unit{"kPa", 1000, dim::pressure},
    Unit{"MPa", 1e6L, dim::pressure},
    Unit{"bar", 1e5L, dim::pressure},
    Unit{"mbar", 100, dim::pressure},
    Unit{"bara", 1e5L, dim::pressure},
    Unit{"atm", atmosphere, dim::pressure},
    Unit{"psi", pound_per_square_inch, dim::pressure},
    Unit{"psia", pound_per_square_inch, dim::pressure},
    Unit{"mmHg", 133.322387L, dim::pressure},
    Unit{"torr", atmosphere / 760, dim::pressure},
    Unit{"barg", 1e5L, dim::pressure, Kind::gauge},
    Unit{"psig", pound_per_square_inch, dim::pressure, Kind::gauge},
    Unit{"kPag", 1000, dim::pressure, Kind::gauge},
    Unit{"J", 1, dim::energy},
    Unit{"kJ", 1000, dim::energy},
    Unit{"MJ", 1e6L, dim::energy},
    Unit{"cal", 4.184L, dim::energy},
    Unit{"kcal", 4184, dim::energy},
    Unit{"BTU", 1055.05585262L, dim::energy},
    Unit{"W", 1, dim::power},
    Unit{"kW", 1000, dim::power},
    Unit{"MW", 1e6L, dim::power},
    Unit{"hp", 745.699872L, dim::power},
    Unit{"cP", 0.001L, dim::viscosity},
    Unit{"cSt", 1e-6L, kinematic_viscosity},
    Unit{"rpm", 1 / 60.0L, dim::frequency},
    Unit{"Hz", 1, dim::frequency},
    Unit{"gpm", gallon / 60, dim::volume_flow},
    Unit{"%", 0.01L, dim::none},
};

}  // namespace

std::span<const Unit> all_units() { return units; }

const Unit* find_unit(std::string_view word) {
  const auto found = std::find_if(units.begin(), units.end(), [&](const Unit& u) { return u.name == word; });
  return found == units.end() ? nullptr : &*found;
}

}  // namespace vatwright
