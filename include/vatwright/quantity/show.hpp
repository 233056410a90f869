#pragma once
#include <string>

namespace vatwright {

/// Units for people: trade (m3/h, degC, bar, kW) or field (gpm, degF, psi, BTU/h).
enum class Units { trade, field };

/// What is shown; it decides the unit.
enum class Shown {
  volume, length, bore, area, feed, flow_mol, flow_kg, temperature, difference, pressure, pressure_drop, heat, heat_flux,
  heat_transfer, concentration, density, viscosity, molar_energy, time, speed, percent, number
};

/// The figure alone, with 4 significant digits at the most ("2.4", "0.0521", "1.23e-05"), in the unit of `unit_of`.
std::string show_number(double si, Shown shown, Units units);
/// The unit alone: "m3/h" or "gpm", "degC" or "degF".
std::string unit_of(Shown shown, Units units);
/// Figure and unit: "2.4 m3/h".
std::string show(double si, Shown shown, Units units = Units::trade);
/// The shortest text that reads back to the same double; -0 is written as 0.
std::string shortest(double value);

}  // namespace vatwright
