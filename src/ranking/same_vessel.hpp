#pragma once
#include "vatwright/rating/duty.hpp"

namespace vatwright {

/// Whether two vessels are equal in all but tag, note and source, and are run alike.
bool same_but_name(const Duty& duty, const Vessel& a, const Vessel& b);

}  // namespace vatwright
