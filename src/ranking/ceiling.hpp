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

/// The most that the feed lines of a hookup pass; infinite where none is stated.
double flow_cap(const Problem& problem, const Hookup& hookup);
/// false: the ceiling is surely below this rate, by the feed lines, or because conversion falls with the rate and no
/// shares meet the target here. One choice of shares in place of a search.
bool may_reach(Chooser& chooser, double feed_m3_s);

/// What is known of a ceiling before it is looked for: nothing, or that above from_m3_s the target is missed or a limit
/// on flow broken at any shares, so that it is there but for other limits.
enum class Near { guessed, known };
/// The ceiling of a hookup, as find_windows over the whole search would give it (1e-6 relative).
///   from_m3_s: where to begin, a feed rate inside the search range; start: shares good there.
/// One reaction and a target of conversion: conversion falls as the feed rises, so the rate at which the best shares
/// just meet the target is found by turns (root at fixed shares, shares at that rate); where a limit is broken there,
/// feed rates are tried downwards, 8 to a decade, and the end is refined. Else the whole window is searched.
Ceiling find_ceiling(Chooser& chooser, double from_m3_s, std::vector<double> start, Near near = Near::guessed);

}  // namespace vatwright
