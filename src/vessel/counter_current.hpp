#pragma once
#include <list>

#include "tube_march.hpp"

namespace vatwright {

/// A tube whose medium flows against the feed: a boundary-value problem, the medium being known where it comes in, at
/// the far end.
struct CounterCurrent {
  struct Solution {
    TubeMarch march;  ///< from the feed's end to the far one
    double mismatch;  ///< of the medium at the far end against its supply, relative
  };
  std::list<Solution> solutions;  ///< by rising conversion, at least one
  long calls = 0;                 ///< evaluations of the rates
};

/// All solutions with the medium leaving between the coldest and the hottest that feed, supply and reactions allow: the
/// marches from the feed's end are sampled over that range, and every change of sign of the mismatch at the far end is
/// closed. Well conditioned where the medium carries more heat than the fluid; a mismatch above 1e-8 is no solution.
/// NoAnswer: none found (unsolved), or what any march says of itself.
Outcome<CounterCurrent> find_counter_current(const Setup& setup, double feed_m3_s);

}  // namespace vatwright
