#pragma once
#include <vector>

#include "vatwright/hookup/objective.hpp"
#include "vatwright/ranking/rank.hpp"

namespace vatwright {

/// What other shares than the best cost at every joint whose shares are free, see SplitCost.
///   best: in the order of the text.
std::vector<SplitCost> split_costs(const Problem& problem, const Hookup& hookup, const Objective& serves,
                                   const std::vector<double>& best);

}  // namespace vatwright
