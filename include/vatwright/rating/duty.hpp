#pragma once
#include <map>
#include <optional>
#include <string>
#include <vector>

#include "vatwright/limits/limit.hpp"
#include "vatwright/vessel/run.hpp"

namespace vatwright {

/// A demand on one species: yield, selectivity, or outlet concentration (mol/m3) / mole fraction (gas, bare number).
struct Demand {
  enum class On { yield, selectivity, concentration, fraction };
  On on = On::yield;
  int species = 0;
  double bound = 0;
  bool at_least = true;
};

struct Target {
  std::optional<double> conversion;  ///< at least, of conversion_of
  std::vector<Demand> demands;
  double feed_m3_s = 0;  ///< the duty's feed rate, however it was given (feed_rate, production, [[feed]])
};

/// Half-width of a 95 % interval on a key, read and checked (its use comes with the spread of answers).
struct Spread {
  std::string key;  ///< full path, "reaction.acylation.rate.k"
  bool relative = true;
  double half_width = 0;  ///< fraction, or SI
};

/// Operation as the file gives it: for all vessels, then for one alone.
struct OperationChoice {
  std::optional<double> temperature_K, pressure_Pa, fill;
  std::optional<std::string> utility;
  std::optional<Thermal> thermal;
  std::optional<double> catalyst_kg_m3;
};

struct Duty {
  std::string name;
  std::string conversion_of;
  Chemistry chemistry;
  Target target;
  Thermal thermal = Thermal::hold;
  OperationChoice operation;
  std::map<std::string, OperationChoice> operation_of;  ///< by tag
  double inlet_pressure_Pa = 101325;                    ///< ruling 18
  double hold_K = 0;                                    ///< of vessels without their own
  double catalyst_kg_m3 = 0;
  Start start;
  ProductLimits limits;
  std::vector<Spread> spreads;
};

struct Site {
  std::string name;
  std::vector<Utility> utilities;
  std::vector<Vessel> vessels;
  std::vector<Spread> spreads;
  [[nodiscard]] const Vessel* find(const std::string& tag) const;
};

/// A value that the files leave out and the program takes. value in trade units.
struct Assumed {
  std::string key, value, why;
  friend bool operator==(const Assumed&, const Assumed&) = default;
};
struct Caution {
  std::string id, text;
  friend bool operator==(const Caution&, const Caution&) = default;
};

/// One inventory and one duty, read and found in order; with cases, one more of these for each.
struct Problem {
  Site site;
  Duty duty;
  std::vector<Assumed> assumed;
  std::vector<std::string> not_asked;  ///< what reading already knows ("spread", ..); rating adds limits never asked
};
struct Problems {
  Problem base;
  std::vector<std::pair<std::string, Problem>> cases;  ///< in the order of the file
};

/// How `vessel` is run in this duty (fill resolved: asked, else the most working fill).
Operation operation_of(const Duty& duty, const Vessel& vessel);
/// The same with its medium, where it runs on its jacket alone: the one asked for, else the first listed, with its
/// `flow`, else all of its `total`. The problem outlives it.
Operation operation_of(const Problem& problem, const Vessel& vessel);

}  // namespace vatwright
