#pragma once
#include <map>

#include "setup.hpp"

namespace vatwright {

/// How near a tube on its jacket is to running away: the share of its U at which its hot spot answers most to it,
///   largest d ln(T_hottest - T_medium)/d ln(1/U) over shares 0.1 to 2 of the U that there is.
/// Above that share a hot spot grows slowly as U falls; at it, the tube runs away. 0: nowhere does it answer more than
/// twice as strongly as that of a tube far from it, whose answer is 1.
/// The medium is taken at one temperature all along, the one it has beside the hot spot, and the pressure as that of
/// the inlet, so that the share depends on that temperature alone: where it moves it is worked out every five
/// kelvins, and read between them by a straight line. M. Morbidelli, A. Varma, Chem. Eng. Sci. 43 (1988) 91 (the
/// criterion of greatest sensitivity, from memory).
class Runaway {
 public:
  explicit Runaway(const Setup& setup) : setup_(setup) {}
  double share(double medium_K);

 private:
  double share_at(double medium_K);

  const Setup& setup_;
  static constexpr double step_K = 5;
  std::map<int, double> at_step_;
};

}  // namespace vatwright
