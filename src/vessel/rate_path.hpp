#pragma once
#include <string>
#include <vector>

#include "setup.hpp"

namespace vatwright {

/// Where a way along the one reaction ends.
enum class EndKind {
  depleted,     ///< a reactant (backward: a product) is gone
  equilibrium,  ///< the rate passes zero
  confined      ///< the model says nothing beyond (a measured table, no temperature)
};

/// A composition on the line of the one reaction, c(xi) = c(anchor) + nu (xi - xi(anchor)). Two anchors, at the inlet
/// and at the end, keep the amounts exact to rounding where they are small: a reactant nearly gone, a seed of a
/// product.
struct Anchor {
  double xi = 0;
  std::vector<double> c;
};

/// One reaction, held, adiabatic or in a tank on its jacket, at constant pressure: T is a function of the extent, so
/// there is one scalar rate
///   R(xi) = capacity r(C(xi), T(xi)),   mol per m3 of the coordinate volume per s
class RatePath {
 public:
  /// exchange: of a tank with agitator and jacket, at one feed rate.
  RatePath(const Setup& setup, const Exchange& exchange);

  [[nodiscard]] const Anchor& inlet() const { return inlet_; }
  [[nodiscard]] double temperature(double xi) const;
  /// R at the anchor's extent + offset.
  double rate(const Anchor& from, double offset);
  /// The end by stoichiometry or confinement in the direction sign (+1, -1): its distance from the inlet, >= 0.
  struct Reach {
    double distance = 0;
    EndKind kind = EndKind::depleted;
    std::string why;  ///< of confined
    Anchor end;
  };
  [[nodiscard]] Reach reach(double sign) const;
  /// The anchor at a distance from `from`.
  [[nodiscard]] Anchor at(const Anchor& from, double offset) const;

  [[nodiscard]] bool reversible() const { return reversible_; }
  /// The rate falls (or stays) all the way forward, known without looking: held liquid, one way, orders of reactants >=
  /// 0, of products <= 0, no adsorption.
  [[nodiscard]] bool falls() const { return falls_; }
  [[nodiscard]] const Setup& setup() const { return setup_; }
  [[nodiscard]] double nu(std::size_t i) const { return nu_[i]; }
  RateEvaluator& evaluator() { return evaluator_; }
  [[nodiscard]] long calls() const { return evaluator_.calls(); }
  [[nodiscard]] long no_value() const { return evaluator_.no_value(); }
  /// Distances from the inlet (in the direction sign) where the rate is not smooth: nodes of a measured table.
  [[nodiscard]] std::vector<double> kinks(double sign) const;

 private:
  void confine_to_table(Reach& reach, double sign) const;
  void confine_to_temperature(Reach& reach, double sign) const;

  const Setup& setup_;
  RateEvaluator evaluator_;
  std::vector<double> nu_, C_;
  Anchor inlet_;
  Exchange exchange_;
  double dT_dxi_ = 0, T_at_inlet_ = 0;  // where T is linear in xi
  bool linear_ = true, reversible_ = false, falls_ = false, table_ = false;
  double X_per_xi_ = 0;
  std::pair<double, double> table_X_{0, 0};
};

}  // namespace vatwright
