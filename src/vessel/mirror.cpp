#include "mirror.hpp"

#include <algorithm>

namespace vatwright {

Mirror::Mirror(const Kinetics& kinetics)
    : reactants_(static_cast<std::size_t>(kinetics.reactions())),
      one_way_(static_cast<std::size_t>(kinetics.species()), true),
      below_(one_way_.size()) {
  for (int j = 0; j < kinetics.reactions(); ++j) {
    const Reaction& reaction = kinetics.reaction(j);
    const bool both_ways = reaction.equilibrium || reaction.reverse;
    for (int i = 0; i < kinetics.species(); ++i) {
      if (both_ways && kinetics.nu(i, j) != 0) one_way_[static_cast<std::size_t>(i)] = false;
      if (kinetics.nu(i, j) < 0) reactants_[static_cast<std::size_t>(j)].push_back(static_cast<std::size_t>(i));
    }
  }
}

void Mirror::note(std::span<double> c, std::size_t i) {
  if (!any_) std::fill(below_.begin(), below_.end(), false);
  any_ = true;
  below_[i] = true;
  c[i] = -c[i];
}

void Mirror::turn(std::span<double> r) const {
  for (std::size_t j = 0; j < r.size(); ++j)
    if (std::ranges::any_of(reactants_[j], [&](std::size_t i) { return below_[i]; })) r[j] = -r[j];
}

}  // namespace vatwright
