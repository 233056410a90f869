#include "build.hpp"
#include "checks.hpp"
#include "vatwright/quantity/show.hpp"

namespace vatwright {

std::optional<Limit> check_feed_line(const LimitInput& input) {
  if (!input.vessel.feed_line_m3_s) return std::nullopt;
  const double most = *input.vessel.feed_line_m3_s;
  return explained(limit_of(limit_name::feed_line, input.feed_m3_s, most, Side::most, "m3/s"), [&] {
    return show(input.feed_m3_s, Shown::feed) + " needed, the line passes " + show(most, Shown::feed);
  });
}

}  // namespace vatwright
