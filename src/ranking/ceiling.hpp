#pragma once
#include <optional>
#include <string>

#include "vatwright/hookup/chooser.hpp"

namespace vatwright {

/// The upper end of the uppermost window, found without the whole window.
struct Ceiling {
  bool open = false;                ///< the window runs to the end of the search: higher than any figure
  std::optional<double> feed_m3_s;  ///< absent: no window, or open
  bool unsolved = false;
  bool certain = false;  ///< no other shares do better: there are none to choose, or they are known
};

/// The ceiling of a hookup, as find_windows over the whole search would give it (1e-6 relative).
///   from_m3_s: where to begin, a feed rate inside the search range; start: shares good there.
/// One reaction and a target of conversion: conversion falls as the feed rises, so the rate at which the best shares
/// just meet the target is found by turns (root at fixed shares, shares at that rate); where a limit is broken there,
/// feed rates are tried downwards, 8 to a decade, and the end is refined. Else the whole window is searched.
/// The most that feed lines pass: of a vessel its own, in series the least, in parallel the sum; infinite where none is
/// stated.
double flow_cap(const Problem& problem, const Hookup& hookup);
/// false: the ceiling is surely below this rate, by the feed lines, or because conversion falls with the rate and no
/// shares meet the target here. One choice of shares in place of a search.
bool may_reach(Chooser& chooser, double feed_m3_s);
///   near: known where the target is missed above from_m3_s, and that is where the ceiling is but for limits.
enum class Near { guessed, known };
Ceiling find_ceiling(Chooser& chooser, double from_m3_s, std::vector<double> start, Near near = Near::guessed);

}  // namespace vatwright
