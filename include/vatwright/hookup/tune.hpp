#pragma once
#include <optional>
#include <span>
#include <vector>

#include "vatwright/numeric/rhs.hpp"

namespace vatwright {

/// How good a set of shares is: first whether (and by how much) limits are broken, then the objective.
struct Score {
  double margin = 0;  ///< the least margin of all limits, + = inside; what counts is only how far it is below zero
  double objective = 0;
  bool rated = true;  ///< false: no answer there; worse than anything
};
/// Whether a is better than b: rated, then limits held (or less broken), then the objective.
bool better(const Score& a, const Score& b);

/// Shares as coordinates in the unit box, and how good they are.
struct Tuned {
  std::vector<double> x;
  Score score;
};

/// f at x; absent: no answer there.
using ObjectiveOf = FunctionRef<std::optional<double>(std::span<const double> x)>;
using ScoreOf = FunctionRef<Score(std::span<const double> x)>;

/// The greatest objective over the unit box of 1 or more dimensions, limits not asked; absent where f has no answer
/// anywhere tried. One dimension: 13 even places, both near ends and the start, then Brent's method at the two best
/// peaks. More: Nelder and Mead's method (Comput. J. 7 (1965) 308) from the start and from near every closed end, the
/// best polished. To about 1e-9 in the objective where f is smooth there; best found, not proved. start: in the box.
std::optional<Tuned> tune_free(ObjectiveOf f, const std::vector<double>& start);

/// The best score over the unit box: the greatest objective where no limit is broken, else the least broken. One
/// dimension: feasible stretches between the sampled places are bounded by root finding, a stretch too short to be seen
/// is looked for at the greatest margin.
///   seeds: places to try besides.
std::optional<Tuned> tune_within(ScoreOf f, const std::vector<double>& start,
                                 const std::vector<std::vector<double>>& seeds);

}  // namespace vatwright
