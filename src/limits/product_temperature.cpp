#include "build.hpp"
#include "checks.hpp"
#include "vatwright/quantity/show.hpp"

namespace vatwright {

std::optional<Limit> check_product_temperature(const LimitInput& input) {
  const auto& coldest = input.product.coldest_K;
  const auto& hottest = input.product.hottest_K;
  const VesselOutcome& o = input.outcome;
  std::optional<Limit> limit;
  if (hottest) limit = limit_of(limit_name::product_temperature, o.hottest_K, *hottest, Side::most, "K");
  if (coldest) {
    const auto low = limit_of(limit_name::product_temperature, o.coldest_K, *coldest, Side::least, "K");
    limit = limit ? tighter(*limit, low) : low;
  }
  if (!limit) return std::nullopt;
  const bool above = hottest && limit->bound == hottest && *limit->value > *hottest;
  return explained(*limit, [&] {
    return show(*limit->value, Shown::temperature) + " inside, the product is to stay " +
           (above ? "below " : "above ") + show(*limit->bound, Shown::temperature);
  });
}

}  // namespace vatwright
