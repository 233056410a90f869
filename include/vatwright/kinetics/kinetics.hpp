#pragma once
#include <memory>
#include <optional>
#include <span>
#include <string>
#include <utility>
#include <vector>

#include "vatwright/kinetics/reaction.hpp"

namespace vatwright {

/// R in J/mol/K.
inline constexpr double gas_constant = 8.314462618;

class RateEvaluator;

/// The reactions of a duty, compiled for evaluation: dense stoichiometry, orders sorted by kind, no text.
class Kinetics {
 public:
  Kinetics() = default;
  /// species: how many there are. of: index of conversion_of. c_of_feed: its concentration in the mixed feed (mol/m3).
  /// fed: for every species whether it is fed; where given, moles_needed is worked out here, once for all.
  Kinetics(std::vector<Reaction> reactions, int species, int of, double c_of_feed_mol_m3, std::vector<bool> fed = {});

  [[nodiscard]] int reactions() const { return static_cast<int>(reactions_.size()); }
  [[nodiscard]] int species() const { return species_; }
  [[nodiscard]] int of() const { return of_; }  ///< index of conversion_of
  [[nodiscard]] double c_of_feed() const { return c_of_feed_; }
  [[nodiscard]] const Reaction& reaction(int j) const { return reactions_[static_cast<std::size_t>(j)]; }
  /// Net coefficient nu_ij.
  [[nodiscard]] double nu(int species, int reaction) const {
    return nu_[static_cast<std::size_t>(species) * reactions_.size() + static_cast<std::size_t>(reaction)];
  }
  [[nodiscard]] bool has_table() const;  ///< a measured table (then there is one reaction)
  /// Rank of the matrix nu: the number of independent reactions.
  [[nodiscard]] int independent() const { return independent_; }
  /// Change of moles by reaction j, sum_i nu_ij.
  [[nodiscard]] double mole_change(int j) const;

  /// X = 1 - F_A/F_A,feed of conversion_of for extents xi (mol per m3 of mixed feed): -sum_j nu_Aj xi_j / c_A,feed.
  [[nodiscard]] double conversion(std::span<const double> xi) const;
  /// c_i = c_feed,i + sum_j nu_ij xi_j, per m3 of mixed feed. c: one per species.
  void amounts(std::span<const double> c_feed, std::span<const double> xi, std::span<double> c) const;

  /// The extent that reaction j can still run forward from amounts c, until its limiting reactant is gone: 0 where one is
  /// missing, or where it has no reactant. In the unit of c, one per species.
  [[nodiscard]] double left_to_run(int j, std::span<const double> c) const;

  /// The first (reaction, species) whose rate has no value at these concentrations: a species with a negative order in
  /// a part that runs there (its reactants, or products, all above zero), itself at or below zero. Empty: all have one.
  [[nodiscard]] std::optional<std::pair<int, int>> absent_with_negative_order(std::span<const double> C) const;

 private:
  friend class RateEvaluator;
  friend std::optional<double> moles_needed(const Kinetics&, const std::vector<bool>&, int);
  std::vector<Reaction> reactions_;
  std::vector<double> nu_;  // species x reactions, row by species
  int species_ = 0, of_ = -1, independent_ = 0;
  double c_of_feed_ = 0;
  std::vector<bool> fed_;  // as `needed_` was worked out for; empty: not
  std::vector<std::optional<double>> needed_;
  std::shared_ptr<const RateEvaluator> compiled_;  // copied by every evaluator; absent: no reactions
};

/// Evaluates all rates at one state. Keeps the rate constants of the last temperature, so a held vessel pays no
/// exponential; allocates only when made. One per thread; it keeps its own copy of all that it needs.
///
///   power law    r = k prod C_i^n_i / of_coefficient / (1 + sum K_i C_i)^m
///   saturating   r = most prod C_i/(half_i + C_i) / of_coefficient / (1 + sum K_i C_i)^m
///   reversible   r = forward (1 - Q/K), Q = prod C_i^nu_i; expanded, so that an absent reactant does not hide the
///                reverse part: species i has the order n_i + nu_i in it
///   pressure     every C_i above is C_i R T (half-saturation and adsorption constants are then in Pa and 1/Pa)
///   table        r = consumption(X) / |nu_A|
class RateEvaluator {
 public:
  explicit RateEvaluator(const Kinetics& kinetics);
  ~RateEvaluator();
  RateEvaluator(const RateEvaluator&);
  RateEvaluator& operator=(const RateEvaluator&);
  RateEvaluator(RateEvaluator&&) noexcept;
  RateEvaluator& operator=(RateEvaluator&&) noexcept;

  /// r_j of the reactions as written, mol per (m3 of fluid | m3 of bed | kg of catalyst, as the reaction's `per` says)
  /// per s.
  ///   C: true concentrations, mol per m3 of fluid at T; T in K; X: conversion of conversion_of (read by tables only).
  /// A reaction's forward part is zero where any of its reactants (net coefficient below zero) is at or below zero, its
  /// reverse part where any product is; C^0 is 1, other species below zero count as zero. A part without a finite value
  /// (a negative order on a species that is absent; overflow) counts as zero and is noted, see `no_value`: whoever
  /// gives out an answer asks that first. Apart from tables r is always finite. A table outside its range gives NaN
  /// (callers keep inside `table_range`).
  void operator()(std::span<const double> C, double T_K, double X, std::span<double> r);

  /// How often a part of a rate had no finite value so far: above zero, what was reckoned with these rates is no answer
  /// unless Kinetics::absent_with_negative_order is empty at every state that counts.
  [[nodiscard]] long no_value() const { return no_value_; }
  /// How often it was called: cost is tested by counting.
  [[nodiscard]] long calls() const { return calls_; }

 private:
  struct Compiled;
  std::vector<Compiled> laws_;
  double T_K_ = -1;
  long calls_ = 0, no_value_ = 0;
  void set_temperature(double T_K);
};

/// Range of conversion of a measured table, where there is one.
std::optional<std::pair<double, double>> table_range(const Kinetics& kinetics);

/// n of a species S: the least moles of conversion_of that must be consumed to make one mole of S through the equations
/// as written, forward, other fed species free (ruling: 2 A -> D gives 2; 2 B -> D + H, B + D -> T + H gives 3 for T).
/// nullopt where S is made without conversion_of or not made. fed: for every species whether it is fed.
std::optional<double> moles_needed(const Kinetics& kinetics, const std::vector<bool>& fed, int species);

}  // namespace vatwright
