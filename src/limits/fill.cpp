#include "build.hpp"
#include "checks.hpp"
#include "vatwright/quantity/show.hpp"

namespace vatwright {

std::optional<Limit> check_fill(const LimitInput& input) {
  const auto* tank = std::get_if<StirredTank>(&input.vessel.kind);
  if (!tank || input.chemistry.feed.phase != Phase::liquid) return std::nullopt;
  const double fill = input.operation.fill;
  const double least = tank->fill.first, most = tank->fill.second;
  return explained(tighter(limit_of(limit_name::fill, fill, most, Side::most, "1"),
                           limit_of(limit_name::fill, fill, least, Side::least, "1")),
                   [&] {
                     return show(fill, Shown::number) + " asked, the vessel works between " +
                            show(least, Shown::number) + " and " + show(most, Shown::number);
                   });
}

}  // namespace vatwright
