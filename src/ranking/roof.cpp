#include "roof.hpp"

#include <cmath>

namespace vatwright {

Roof straight(double a, double b, double at_a, double at_b) {
  const double slope = (at_b - at_a) / (b - a);
  return {a, b, at_a, at_b, slope, slope, b};
}

Roof roof(double a, double b, const Side& at_a, const Side& at_b, const Roof& monotone, int bends) {
  const double chord = (at_b.value - at_a.value) / (b - a);
  const double noise = 1e-9 * (std::abs(at_a.slope) + std::abs(at_b.slope));
  if (bends < 0 && at_a.slope >= chord - noise && chord >= at_b.slope - noise) {
    const double bend = at_a.slope - at_b.slope;
    double ridge = bend > noise ? (at_b.value - at_a.value + at_a.slope * a - at_b.slope * b) / bend : (a + b) / 2;
    ridge = std::clamp(ridge, a, b);
    return {a, b, at_a.value, at_b.value, at_a.slope, at_b.slope, ridge};
  }
  if (bends > 0 && at_a.slope <= chord + noise && chord <= at_b.slope + noise)
    return straight(a, b, at_a.value, at_b.value);
  return monotone;
}

}  // namespace vatwright
