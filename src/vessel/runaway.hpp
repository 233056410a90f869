#pragma once
#include "setup.hpp"

namespace vatwright {

/// The share of its U at which the hot spot of a tube on its jacket answers most to it:
///   largest d ln(T_hottest - T_medium)/d ln(1/U) over shares 0.1 to 2 of the U that there is.
/// Above that share a hot spot grows slowly as U falls; at it, the tube runs away. 0: nowhere does it answer more than
/// twice as strongly as that of a tube far from it, whose answer is 1.
///   medium_K: of the medium beside the hot spot, taken as the same all along (and the pressure as that of the inlet).
///   hot_spot_s: space time V/v at which the hot spot is; looked at up to four times that.
/// M. Morbidelli, A. Varma, Chem. Eng. Sci. 43 (1988) 91 (the criterion of greatest sensitivity, from memory).
double runaway_share(const Setup& setup, double medium_K, double hot_spot_s);

}  // namespace vatwright
