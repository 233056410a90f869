#include <algorithm>

#include "build.hpp"
#include "checks.hpp"
#include "vatwright/quantity/show.hpp"

namespace vatwright {

std::optional<Limit> check_start_up_peak(const LimitInput& input) {
  if (input.operation.thermal == Thermal::hold || !std::holds_alternative<StirredTank>(input.vessel.kind))
    return std::nullopt;
  std::optional<double> bound = input.product.hottest_K;
  if (const auto& rating = input.vessel.temperature_K) bound = std::min(bound.value_or(rating->second), rating->second);
  if (!bound) return std::nullopt;
  if (!input.outcome.start_peak_K) return cannot_tell(limit_name::start_up_peak, "the start-up was not followed");
  const auto limit = limit_of(limit_name::start_up_peak, *input.outcome.start_peak_K, *bound, Side::most, "K");
  return explained(limit, [&] {
    return show(*limit.value, Shown::temperature) + " while it comes on line, at most " +
           show(*limit.bound, Shown::temperature) + " is allowed";
  });
}

}  // namespace vatwright
