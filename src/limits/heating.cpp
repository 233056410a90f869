#include "checks.hpp"
#include "heat.hpp"

namespace vatwright {

std::optional<Limit> check_heating(const LimitInput& input) { return check_heat(input, limit_name::heating); }

}  // namespace vatwright
