#include "checks.hpp"
#include "heat.hpp"

namespace vatwright {

std::optional<Limit> check_heat_removal(const LimitInput& input) { return check_heat(input, limit_name::heat_removal); }

}  // namespace vatwright
