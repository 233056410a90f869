#pragma once
#include "ranked_set.hpp"
#include "rater.hpp"

namespace vatwright {

/// Rates every hookup of up to `most` of the offered, those that differ only in name once; a size that would go beyond
/// most_rated is left out whole. Claims "visited", or "partly" with the reason.
RankedSet visit_all(const Rater& rater, const std::vector<int>& offered);

}  // namespace vatwright
