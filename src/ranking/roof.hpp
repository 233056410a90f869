#pragma once
#include <algorithm>

namespace vatwright {

/// A concave or straight piece above a function between two places.
struct Roof {
  double a = 0, b = 0;              // from, to
  double at_a = 0, at_b = 0;        // values
  double slope_a = 0, slope_b = 0;  // of the pieces that pass through them
  double ridge = 0;                 // where they meet
  [[nodiscard]] double over(double f) const { return std::min(at_a + slope_a * (f - a), at_b + slope_b * (f - b)); }
};

/// What is known of the moles that one side converts, at the ends of a cell.
struct Side {
  double value, slope;
};

/// The line through both ends.
Roof straight(double a, double b, double at_a, double at_b);

/// What a function can not exceed from a to b.
///   bends: it is concave (-1, then both tangents meet above it), convex (1, the chord), or not known (0).
///   monotone: what serves where it is not known, or where slopes and chord do not bear it out.
Roof roof(double a, double b, const Side& at_a, const Side& at_b, const Roof& monotone, int bends);

}  // namespace vatwright
