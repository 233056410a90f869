#include <algorithm>

#include "build.hpp"
#include "checks.hpp"
#include "vatwright/quantity/show.hpp"

namespace vatwright {

std::optional<Limit> check_temperature_if_cooling_fails(const LimitInput& input) {
  if (input.operation.thermal == Thermal::adiabatic) return std::nullopt;  // there is no cooling to fail
  const HeatKnowledge heat = heat_knowledge(input.chemistry);
  if (heat.state == HeatKnowledge::State::not_asked) return std::nullopt;
  const auto& onset = input.product.decomposition_K;
  std::optional<double> bound = onset;
  if (const auto& rating = input.vessel.temperature_K) bound = std::min(bound.value_or(rating->second), rating->second);
  if (!bound) return std::nullopt;
  constexpr auto name = limit_name::temperature_if_cooling_fails;
  if (heat.state == HeatKnowledge::State::unknown) return cannot_tell(name, heat.why);
  if (!input.outcome.uncooled_K) return std::nullopt;  // no jacket acts
  const auto limit = limit_of(name, *input.outcome.uncooled_K, *bound, Side::most, "K");
  return explained(limit, [&] {
    return "what is inside can come to " + show(*limit.value, Shown::temperature) + ", " +
           (onset && *bound == *onset ? "decomposition begins at " : "the vessel is rated for ") +
           show(*bound, Shown::temperature);
  });
}

}  // namespace vatwright
