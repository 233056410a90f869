#pragma once
// What ranking must agree with, by other means: tubes by closed integrals of 1/r turned round by bisection, tanks by
// the first root found on a fine scan, every hookup written out by plain recursion, every split by scans and golden
// sections.
#include <functional>
#include <string>
#include <vector>

#include "vatwright/hookup/expression.hpp"

namespace vatwright::test {

/// Rates over conversion X, k C0^(n-1) = 1 per s.
enum class Shape { half, first, second, autocatalytic, hindered };
inline constexpr double seed_of_product = 0.02;  ///< autocatalytic: r = (1 - X)(X + seed)
inline constexpr double hindrance = 6;           ///< hindered: r = (1 - X)/(1 + K (1 - X))^2

struct PlantVessel {
  bool is_tank = false;
  double volume = 1, feed_line = 1e300;
};
struct Plant {
  Shape shape = Shape::first;
  std::vector<PlantVessel> vessels;
};

/// Every hookup of 1 .. most vessels out of n, each once, all shares free.
std::vector<Hookup> every_hookup(int n, int most);

/// The most that a hookup converts of what comes in at X_in, shares of a joint at least 1e-4 each and within the feed
/// lines; below zero: no shares keep within them.
double brute_conversion(const Plant& plant, const Hookup& hookup, double X_in, double feed);
/// The highest feed rate at which it reaches X, by bisection between 1e-3 and 1e3 times `near`; 0: at none.
double brute_ceiling(const Plant& plant, const Hookup& hookup, double X, double near);

}  // namespace vatwright::test
