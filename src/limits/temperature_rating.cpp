#include "build.hpp"
#include "checks.hpp"
#include "vatwright/quantity/show.hpp"

namespace vatwright {

std::optional<Limit> check_temperature_rating(const LimitInput& input) {
  if (!input.vessel.temperature_K) return std::nullopt;
  const double coldest = input.vessel.temperature_K->first, hottest = input.vessel.temperature_K->second;
  const VesselOutcome& o = input.outcome;
  const auto limit = tighter(limit_of(limit_name::temperature_rating, o.hottest_K, hottest, Side::most, "K"),
                             limit_of(limit_name::temperature_rating, o.coldest_K, coldest, Side::least, "K"));
  return explained(limit, [&] {
    return show(*limit.value, Shown::temperature) + " inside, rated for " + show(coldest, Shown::temperature) + " to " +
           show(hottest, Shown::temperature);
  });
}

}  // namespace vatwright
