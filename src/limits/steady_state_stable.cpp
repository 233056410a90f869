#include "build.hpp"
#include "checks.hpp"

namespace vatwright {

std::optional<Limit> check_steady_state_stable(const LimitInput& input) {
  if (!std::holds_alternative<StirredTank>(input.vessel.kind)) return std::nullopt;
  if (input.outcome.cycle) {
    return broken(limit_name::steady_state_stable, "brought on line as the duty says, the vessel ends in a cycle");
  }
  return held(limit_name::steady_state_stable);
}

}  // namespace vatwright
