#include <algorithm>
#include <array>
#include <cmath>
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "vatwright/quantity/quantity.hpp"
#include "vatwright/quantity/show.hpp"

namespace vatwright {
namespace {

struct Named {
  Dimension dimension;
  const char* name;
  const char* example;
};

constexpr Dimension speed = dim::length / dim::time;
constexpr Dimension per_kelvin = dim::none / dim::temperature;

constexpr std::array named{
    Named{dim::none, "a plain number", "0.95"},
    Named{dim::length, "a length", "52.5 mm"},
    Named{dim::area, "an area", "14.2 m2"},
    Named{dim::volume, "a volume", "6.3 m3"},
    Named{dim::mass, "a mass", "250 kg"},
    Named{dim::amount, "an amount of substance", "12 kmol"},
    Named{dim::time, "a time", "4 h"},
    Named{dim::temperature, "a temperature", "72 degC"},
    Named{dim::pressure, "a pressure", "3 barg"},
    Named{dim::energy, "an energy", "18 MJ"},
    Named{dim::power, "a power", "4.1 kW"},
    Named{dim::density, "a density or mass concentration", "930 kg/m3"},
    Named{dim::viscosity, "a viscosity", "0.8 cP"},
    Named{dim::volume_flow, "a volume flow", "2.4 m3/h"},
    Named{dim::mass_flow, "a mass flow", "2200 kg/h"},
    Named{dim::molar_flow, "a molar flow", "40 kmol/h"},
    Named{dim::concentration, "a concentration", "3.2 mol/L"},
    Named{dim::molar_mass, "a molar mass", "102.09 g/mol"},
    Named{dim::molar_energy, "an energy per mole", "58 kJ/mol"},
    Named{dim::heat_capacity, "a heat capacity", "2.1 kJ/kg/K"},
    Named{dim::molar_heat_capacity, "a molar heat capacity", "177 J/mol/K"},
    Named{dim::molar_heat_capacity * per_kelvin, "a molar heat capacity per K", "0.183 J/mol/K2"},
    Named{dim::molar_heat_capacity * per_kelvin * per_kelvin, "a molar heat capacity per K2", "-4.6e-5 J/mol/K3"},
    Named{dim::heat_capacity * per_kelvin, "a heat capacity per K", "0.003 kJ/kg/K2"},
    Named{dim::heat_transfer, "a power per area and temperature", "420 W/m2/K"},
    Named{dim::fouling, "a fouling resistance", "0.0002 m2.K/W"},
    Named{dim::frequency, "a rate per time", "0.042 1/min"},
    Named{dim::power / dim::area, "a power per area", "12 kW/m2"},
    Named{dim::power / dim::temperature, "a power per temperature", "5.4 kW/K"},
    Named{dim::energy / dim::mass, "an energy per mass", "62 kJ/kg"},
    Named{dim::area / dim::time, "a kinematic viscosity", "0.9 cSt"},
    Named{speed, "a speed", "1.5 m/s"},
    Named{per_kelvin, "an inverse temperature", "0.05 1/K"},
};

struct Power {
  const char* unit;
  double power;
};

/// "L2/mol/kg/min", "kg.m2/s2", "1/min"; powers of zero are left out.
std::string written(const std::vector<Power>& powers) {
  std::string above, below;
  for (const auto& [unit, exact] : powers) {
    const double power = std::round(exact * 1e12) / 1e12;
    if (power == 0) continue;
    const double size = std::abs(power);
    std::string& side = power > 0 ? above : below;
    if (power < 0)
      side += "/";
    else if (!above.empty())
      side += ".";
    side += unit;
    if (size != std::floor(size)) side += '^';
    if (size != 1) side += shortest(size);
  }
  return (above.empty() ? "1" : above) + below;
}

std::string in_si(Dimension d) {
  return written({{"kg", d.mass}, {"m", d.length}, {"mol", d.amount}, {"K", d.temperature}, {"s", d.time}});
}

/// A dimension that comes up in kinetics, for any order: its name and its usual unit.
struct Kinetic {
  std::string name, unit;
};

std::string order_text(double n) { return shortest(std::round(n * 1e9) / 1e9); }

constexpr double tolerance = 1e-9;
bool near(double a, double b) { return std::abs(a - b) < tolerance; }

/// k in (mol/m3)^(1-n)/s; in (kg/m3)^(1-n)/s where all is counted by mass.
std::optional<Kinetic> per_fluid(Dimension d) {
  const bool by_mass = near(d.amount, 0) && !near(d.mass, 0);
  const double counted = by_mass ? d.mass : d.amount, n = 1 - counted;
  const Dimension one = by_mass ? dim::density : dim::concentration;
  if (!(d == pow(one, 1 - n) / dim::time)) return {};
  const std::string name = near(n, 0) ? "a rate per volume" : "a rate constant of order " + order_text(n);
  return Kinetic{name, written({{by_mass ? "g" : "mol", 1 - n}, {"L", n - 1}, {"min", -1}})};
}

/// k in (mol/m3)^(1-n) m3/kg/s, the kg of catalyst.
std::optional<Kinetic> per_catalyst(Dimension d) {
  const double n = 1 - d.amount;
  if (!(d == pow(dim::concentration, 1 - n) * dim::volume / dim::mass / dim::time)) return {};
  const std::string name =
      near(n, 0) ? "a rate per catalyst mass" : "a rate constant of order " + order_text(n) + " per catalyst mass";
  return Kinetic{name, written({{"L", n}, {"mol", 1 - n}, {"kg", -1}, {"min", -1}})};
}

/// k in mol/m3/s/Pa^n, or in mol/kg/s/Pa^n with the kg of catalyst.
std::optional<Kinetic> by_pressure(Dimension d) {
  const double n_fluid = -d.mass, n_catalyst = -d.mass - 1;
  const std::string name = "a rate constant in pressures of order ";
  if (d == dim::concentration / dim::time / pow(dim::pressure, n_fluid))
    return Kinetic{name + order_text(n_fluid), written({{"mol", 1}, {"L", -1}, {"min", -1}, {"bar", -n_fluid}})};
  if (d == dim::amount / dim::mass / dim::time / pow(dim::pressure, n_catalyst))
    return Kinetic{name + order_text(n_catalyst) + " per catalyst mass",
                   written({{"mol", 1}, {"kg", -1}, {"min", -1}, {"bar", -n_catalyst}})};
  return {};
}

/// K of an equilibrium or an adsorption, in a power of a concentration or a pressure.
std::optional<Kinetic> of_equilibrium(Dimension d) {
  if (d == pow(dim::concentration, d.amount))
    return Kinetic{d.amount < 0 ? "an inverse concentration" : "a power of a concentration",
                   written({{"mol", d.amount}, {"L", -d.amount}})};
  if (d == pow(dim::pressure, d.mass))
    return Kinetic{d.mass < 0 ? "an inverse pressure" : "a power of a pressure", written({{"bar", d.mass}})};
  if (d == pow(dim::density, d.mass))
    return Kinetic{d.mass < 0 ? "an inverse mass concentration" : "a power of a mass concentration",
                   written({{"g", d.mass}, {"L", -d.mass}})};
  return {};
}

std::optional<Kinetic> kinetic(Dimension d) {
  for (const auto family : {per_catalyst, per_fluid, by_pressure, of_equilibrium})
    if (auto found = family(d)) return found;
  return {};
}

const Named* find_named(Dimension d) {
  const auto found = std::find_if(named.begin(), named.end(), [&](const Named& n) { return n.dimension == d; });
  return found == named.end() ? nullptr : &*found;
}

}  // namespace

std::string name_of(Dimension dimension) {
  if (const Named* found = find_named(dimension)) return found->name;
  if (const auto found = kinetic(dimension)) return found->name;
  return in_si(dimension);
}

std::string example_of(Dimension dimension, Sense sense) {
  if (sense == Sense::difference && dimension == dim::temperature) return "5 K";
  if (sense == Sense::difference && dimension == dim::pressure) return "3 bar";
  if (const Named* found = find_named(dimension)) return found->example;
  const auto found = kinetic(dimension);
  return "0.042 " + (found ? found->unit : in_si(dimension));
}

}  // namespace vatwright
