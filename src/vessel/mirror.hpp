#pragma once
#include <span>
#include <vector>

#include "vatwright/kinetics/kinetics.hpp"

namespace vatwright {

/// Rates a little below zero, where a march may take an amount within its tolerance: what one-way reactions alone use
/// or make counts as its mirror image, and a reaction that uses it up runs backward there. Rates stay smooth through
/// zero and push back, where a rate that stops at zero has a bend that an implicit step can not get over.
class Mirror {
 public:
  explicit Mirror(const Kinetics& kinetics);
  /// Turns amounts below zero up, and remembers which.
  void turn_up(std::span<double> c) {
    any_ = false;
    for (std::size_t i = 0; i < c.size(); ++i)
      if (c[i] < 0 && one_way_[i]) note(c, i);
  }
  /// Turns the rates that belong to them.
  void turn_rates(std::span<double> r) const {
    if (any_) turn(r);
  }

 private:
  void note(std::span<double> c, std::size_t i);
  void turn(std::span<double> r) const;

  std::vector<std::vector<std::size_t>> reactants_;  // per reaction
  std::vector<bool> one_way_, below_;                // per species
  bool any_ = false;
};

}  // namespace vatwright
