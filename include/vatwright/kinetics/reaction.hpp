#pragma once
#include <optional>
#include <string>
#include <utility>
#include <variant>
#include <vector>

namespace vatwright {

/// k(T): at `at_K` it is k; away from there by Arrhenius, k exp(-(E/R)(1/T - 1/at)), by theta, k theta^(T - at), or not
/// at all (nor without at_K). SI: mol, m3, s, Pa (kg in place of mol under amounts = mass; kg of catalyst per its
/// mass).
struct RateConstant {
  enum class Moves { not_at_all, arrhenius, theta };
  double k = 0;
  std::optional<double> at_K;
  Moves moves = Moves::not_at_all;
  double activation_J_mol = 0;
  double theta = 1;
  /// At or below 0 K, where a solver may look but nothing is: the limit, 0, where Arrhenius moves it.
  [[nodiscard]] double at(double T_K) const;
};

/// (species index, figure): a coefficient, an order, a half-saturation concentration (mol/m3; Pa on the basis of
/// pressures), an adsorption constant (m3/mol; 1/Pa).
struct SpeciesFigure {
  int species = 0;
  double value = 0;
};

/// k times the product of C_i^n_i. pressure: partial pressures in Pa in place of concentrations (gas only).
struct PowerLaw {
  RateConstant k;
  std::vector<SpeciesFigure> orders;
};
/// most times the product of C/(half + C), half above zero.
struct Saturating {
  RateConstant most;
  std::vector<SpeciesFigure> half;
};

/// What the amounts in a law are: concentrations, mol/m3, or partial pressures, Pa (ideal gas, p_i = C_i R T).
enum class Basis { concentration, pressure };
/// What a rate counts on: m3 of fluid, m3 of packed bed, kg of catalyst. unsaid: fluid, but a packed tube needs it
/// said.
enum class Per { unsaid, fluid, bed, catalyst };

/// A rate law as a whole. The rate of the reaction as written is
///   law / of_coefficient / (1 + sum K_i C_i)^adsorption_power
struct RateLaw {
  std::variant<PowerLaw, Saturating> law;
  double of_coefficient = 1;  ///< |nu| of the species whose rate the constant gives; 1 for the reaction itself
  Basis basis = Basis::concentration;
  Per per = Per::unsaid;
  std::vector<SpeciesFigure> adsorption;
  double adsorption_power = 1;
};

/// Measured rates: consumption of conversion_of (mol/m3 fluid/s, positive) against conversion, at one temperature and
/// the feed's composition. Only in a duty of one reaction. Interpolated in 1/consumption (see kinetics/rate_table.hpp).
struct RateTable {
  std::vector<double> conversion;
  std::vector<double> consumption_mol_m3_s;
  std::optional<double> at_K;
};

/// Heat of reaction per mole of the equation as written; negative dH = releases. Where every species' heat capacity is
/// known it moves: dH(T) = dH_at + integral of dCp from at_K, dCp = sum_n dCp[n] T^n.
struct HeatOfReaction {
  double dH_J_mol = 0;
  double at_K = 298.15;
  std::vector<double> dCp;                    ///< J/mol/K, J/mol/K2, ..; empty: constant
  [[nodiscard]] double at(double T_K) const;  ///< dH(T), J/mol
};

/// K(T) from K at `at_K` by van 't Hoff: d ln K/dT = dH(T)/(R T^2), integrated exactly. heat absent: K constant.
/// K in (mol/m3)^dn (concentration) or Pa^dn (pressure), dn = sum of the equation's coefficients.
struct Equilibrium {
  double K = 1;
  std::optional<double> at_K;
  std::optional<HeatOfReaction> heat;
  [[nodiscard]] double at(double T_K) const;
};

/// What was measured, so that answers outside it can say so.
struct Measured {
  std::optional<std::pair<double, double>> temperature_K;
  std::optional<std::pair<double, double>> conversion;
  std::string source;
};

struct Reaction {
  std::string name;               ///< as given, else the equation
  std::string equation;           ///< as written
  std::vector<SpeciesFigure> nu;  ///< net coefficients, negative = consumed; species with net 0 are kept with 0
  std::variant<RateLaw, RateTable> forward;
  std::optional<Equilibrium> equilibrium;  ///< reversible: exactly one of these two
  std::optional<RateLaw> reverse;
  std::optional<HeatOfReaction> heat;
  std::optional<Measured> measured;
  /// The two sides as written, coefficients positive ("A + R -> 2 R": left A 1, R 1; right R 2). For whoever fills in
  /// orders that were left out; balances and stop rules use nu alone.
  std::vector<SpeciesFigure> left, right;
};

}  // namespace vatwright
