#include "build.hpp"
#include "checks.hpp"
#include "vatwright/quantity/show.hpp"

namespace vatwright {

std::optional<Limit> check_runaway_sensitivity(const LimitInput& input) {
  if (!input.outcome.runaway_share) return std::nullopt;
  const auto limit = limit_of(limit_name::runaway_sensitivity, *input.outcome.runaway_share, 1, Side::most, "1");
  return explained(limit, [&] {
    return "the hot spot runs away below " + show(*limit.value, Shown::percent) + " of the U that there is";
  });
}

}  // namespace vatwright
