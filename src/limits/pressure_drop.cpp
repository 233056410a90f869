#include "build.hpp"
#include "checks.hpp"
#include "vatwright/quantity/show.hpp"

namespace vatwright {

namespace {
/// What the vessel states as the most that may be spent in it.
std::optional<Limit> drop_inside(const LimitInput& input) {
  if (!input.vessel.pressure_drop_Pa || std::holds_alternative<StirredTank>(input.vessel.kind)) return std::nullopt;
  const auto& drop = input.outcome.pressure_drop_Pa;
  if (!drop) {
    return cannot_tell(limit_name::pressure_drop, input.chemistry.feed.viscosity_Pa_s
                                                      ? "the density is not known (a molar mass is missing)"
                                                      : "the feed has no viscosity");
  }
  const double most = *input.vessel.pressure_drop_Pa;
  return explained(limit_of(limit_name::pressure_drop, *drop, most, Side::most, "Pa"), [&] {
    return show(*drop, Shown::pressure_drop) + " spent, at most " + show(most, Shown::pressure_drop);
  });
}

/// A pressure asked for this vessel can not be above what arrives from the one before it.
std::optional<Limit> let_down(const LimitInput& input) {
  if (!input.arrives_Pa || !input.operation.pressure_Pa) return std::nullopt;
  const double asked = *input.operation.pressure_Pa;
  return explained(limit_of(limit_name::pressure_drop, asked, *input.arrives_Pa, Side::most, "Pa"), [&] {
    return show(asked, Shown::pressure) + " asked, " + show(*input.arrives_Pa, Shown::pressure) + " arrives";
  });
}
}  // namespace

std::optional<Limit> check_pressure_drop(const LimitInput& input) {
  const auto inside = drop_inside(input);
  const auto before = let_down(input);
  if (!inside || !before) return inside ? inside : before;
  if (before->state == Limit::State::broken) return before;
  if (inside->state == Limit::State::cannot_tell) return inside;
  return tighter(*inside, *before);
}

}  // namespace vatwright
