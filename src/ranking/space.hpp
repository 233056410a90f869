#pragma once
#include <vector>

#include "vatwright/ranking/rank.hpp"
#include "vatwright/ranking/twins.hpp"

namespace vatwright {

/// The hookups to be rated, one for all that differ only in name, by number of vessels.
struct Space {
  std::vector<Hookup> hookups;
  int sizes = 0;      ///< every hookup of up to so many vessels is there
  bool whole = true;  ///< nothing was left out
};
/// All hookups of up to `most` of the offered; a size that would bring the list beyond most_rated is left out, with all
/// after.
Space list_space(const Twins& twins, const std::vector<int>& offered, int most, long long most_rated);

}  // namespace vatwright
