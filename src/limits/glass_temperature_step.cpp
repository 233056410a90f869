#include <algorithm>
#include <cctype>
#include <cmath>
#include <string>

#include "build.hpp"
#include "checks.hpp"
#include "vatwright/quantity/show.hpp"

namespace vatwright {

namespace {
/// What suppliers of glass-lined vessels allow at once across the lining (from memory).
constexpr double most_chill_K = 110, most_heat_K = 120;

bool is_glass(const std::string& material) {
  std::string lower = material;
  std::transform(lower.begin(), lower.end(), lower.begin(), [](unsigned char c) { return std::tolower(c); });
  return lower.find("glass") != std::string::npos;
}

/// Something at `other_K` meets glass at the temperature of the contents.
Limit step(double contents_K, double other_K) {
  const double apart = other_K - contents_K;
  return limit_of(limit_name::glass_temperature_step, std::abs(apart), apart > 0 ? most_heat_K : most_chill_K,
                  Side::most, "K");
}
}  // namespace

std::optional<Limit> check_glass_temperature_step(const LimitInput& input) {
  const auto& wetted = input.vessel.wetted;
  if (std::none_of(wetted.begin(), wetted.end(), is_glass)) return std::nullopt;
  const VesselOutcome& o = input.outcome;
  Limit limit = step(o.hottest_K, std::min(o.hottest_K, o.enters_K));
  limit = tighter(limit, step(o.coldest_K, std::max(o.coldest_K, o.enters_K)));
  if (input.medium) {
    limit = tighter(limit, step(o.hottest_K, std::min(o.hottest_K, input.medium->supply_K)));
    limit = tighter(limit, step(o.coldest_K, std::max(o.coldest_K, input.medium->supply_K)));
  }
  limit.of_difference = true;
  return explained(limit, [&] {
    return show(*limit.value, Shown::difference) + " across the glass, at most " +
           show(*limit.bound, Shown::difference) + " at once";
  });
}

}  // namespace vatwright
