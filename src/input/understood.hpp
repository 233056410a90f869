#pragma once
#include <string>
#include <vector>

#include "vatwright/rating/duty.hpp"

namespace vatwright {

/// What was read of a site, one sentence a vessel and utility, in trade units.
std::vector<std::string> tell_site(const Site& site);
/// What was read of a duty: feed, reactions, operation, target, limits, cases.
std::vector<std::string> tell_duty(const Problems& problems);

}  // namespace vatwright
