#pragma once
#include <optional>
#include <vector>

#include "vatwright/rating/rating.hpp"

namespace vatwright {

/// What free shares serve, at the outlet of the whole.
struct Objective {
  enum class Of { conversion, yield, demand };
  Of of = Of::conversion;
  int index = 0;            ///< yield: the species; demand: its place in Target::demands
  double moles_needed = 0;  ///< yield: n of the species
};

/// The species of the first yield that the target asks. Absent: none is asked.
std::optional<int> yield_asked(const Duty& duty);

/// What the target asks: its first yield, else its conversion, else its first demand.
Objective objective_of(const Duty& duty);
/// The yield of a species; absent where it has none.
std::optional<Objective> yield_objective(const Duty& duty, int species);

/// Its value at an outlet: conversion, yield, or the margin of the demand; absent where it does not exist.
std::optional<double> value_of(const Objective& objective, const Duty& duty, const Stream& outlet);

/// Whether the target asks nothing but this objective at least.
bool is_all_of_target(const Objective& objective, const Duty& duty);

}  // namespace vatwright
