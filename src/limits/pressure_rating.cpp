#include "build.hpp"
#include "checks.hpp"
#include "vatwright/quantity/show.hpp"

namespace vatwright {

std::optional<Limit> check_pressure_rating(const LimitInput& input) {
  if (!input.vessel.pressure_Pa) return std::nullopt;
  const double least = input.vessel.pressure_Pa->first, most = input.vessel.pressure_Pa->second;
  const VesselOutcome& o = input.outcome;
  const auto limit = tighter(limit_of(limit_name::pressure_rating, o.highest_Pa, most, Side::most, "Pa"),
                             limit_of(limit_name::pressure_rating, o.lowest_Pa, least, Side::least, "Pa"));
  return explained(limit, [&] {
    return show(*limit.value, Shown::pressure) + " inside, rated for " + show(least, Shown::pressure) + " to " +
           show(most, Shown::pressure);
  });
}

}  // namespace vatwright
