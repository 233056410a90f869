#pragma once
#include <vector>

#include "way.hpp"

namespace vatwright {

/// The space time that a stirred tank needs to sit at each extent along a way,
///   tau = h(xi) = |xi - xi_in| / R(xi),
/// which does not depend on the feed rate: sampled once, with every extremum (fold) put in, it gives all steady states
/// at any feed rate. State at tau: h = tau; stable where h rises along the way: g = d (1 - tau/h), g' = d h'/h.
class TankCurve {
 public:
  explicit TankCurve(Way way);

  struct State {
    Place place;
    bool stable = false;
    bool at_end = false;  ///< sits at the end itself (depleted, or equilibrium to rounding)
  };
  struct Answer {
    std::vector<State> states;  ///< rising d; without the state at the inlet itself that a rate of zero there makes
    bool confined_hit = false;  ///< beyond the last state the rate still runs, and the model ends
    bool failed = false;
  };
  Answer states(double tau);
  /// ln h at a place.
  double log_time(double y);
  double log_time(Place place);
  Way& way() { return way_; }
  /// Local extrema of h by their extents' distances and values, rising d.
  struct Fold {
    double d = 0, tau = 0;
  };
  [[nodiscard]] std::vector<Fold> folds() const;

 private:
  void sample();
  void refine_extrema();
  void look_closer(std::size_t i);
  bool add_state(std::size_t i, double log_tau, Answer& answer);

  Way way_;
  std::vector<double> y_, f_;  // samples of ln h, rising y
  std::vector<double> fold_y_;
};

}  // namespace vatwright
