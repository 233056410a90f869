#pragma once
#include <optional>
#include <string>
#include <vector>

namespace vatwright {

/// Molar heat capacity as a polynomial in K: cp(T) = a[0] + a[1] T + a[2] T^2 + ..   [J/mol/K]
struct HeatCapacity {
  std::vector<double> a;
  [[nodiscard]] double at(double T_K) const;                      ///< cp(T)
  [[nodiscard]] double integral(double from_K, double to_K) const;  ///< integral of cp dT, J/mol
};

/// Vapour pressure by Antoine's equation, log10(p/unit) = A - B/(T + C), T in K or degC as the file says.
struct Antoine {
  double A = 0, B = 0, C = 0;
  double unit_Pa = 1e5;          ///< the pressure unit of the equation, in Pa
  double offset_K = 0;           ///< T of the equation is T_K - offset_K (273.15 for degC)
  [[nodiscard]] double pressure_Pa(double T_K) const;
};

/// What is known of a species; everything is optional unless a calculation needs it.
struct Species {
  std::string name;
  std::optional<double> molar_mass_kg_mol;
  std::optional<HeatCapacity> heat_capacity;
  std::optional<Antoine> antoine;
  bool is_volatile = true;  ///< false: a salt, no vapour pressure
  bool solvent = false;     ///< fills up to the density
};

}  // namespace vatwright
