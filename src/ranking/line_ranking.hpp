#pragma once
#include <optional>

#include "on_one_line.hpp"
#include "ranked_set.hpp"
#include "rater.hpp"

namespace vatwright {

/// The ranking of a duty on one line: searched with bounds, so that what is not rated is proved to be no better. Values
/// that are shown come from the full models.
/// Absent: too few hookups keep every limit for the places asked, limits bite on more than can be rated, or a vessel
/// gave no number; all must be visited.
std::optional<RankedSet> rank_on_line(const OnOneLine& on, const Rater& rater);

}  // namespace vatwright
