#include <algorithm>

#include "build.hpp"
#include "checks.hpp"

namespace vatwright {

std::optional<Limit> check_steady_state_stable(const LimitInput& input) {
  const auto& states = input.outcome.states;
  if (!std::holds_alternative<StirredTank>(input.vessel.kind)) {
    if (states.size() < 2) return std::nullopt;
    return cannot_tell(limit_name::steady_state_stable,
                       "against this medium " + std::to_string(states.size()) +
                           " steady states are possible, and which one comes about is not known");
  }
  if (input.outcome.cycle) {
    return broken(limit_name::steady_state_stable, "brought on line as the duty says, the vessel ends in a cycle");
  }
  const auto reached =
      std::find_if(states.begin(), states.end(), [](const SteadyState& s) { return s.reached == true; });
  if (reached != states.end() && reached->stable == false) {
    return broken(limit_name::steady_state_stable, "the start lies on a state that is not stable");
  }
  return held(limit_name::steady_state_stable);
}

}  // namespace vatwright
