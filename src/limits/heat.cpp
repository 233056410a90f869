#include "heat.hpp"

#include <algorithm>
#include <cmath>

#include "build.hpp"
#include "checks.hpp"
#include "vatwright/quantity/show.hpp"

namespace vatwright {

namespace {
/// Below this need a held vessel without a jacket is taken to hold itself (losses, feed trim).
constexpr double nothing_W = 1;

double at_least_0(double x) { return std::max(x, 0.0); }

HeatBalance balance_tank(const Vessel& vessel, const Operation& operation, const Utility* medium, double Q_W) {
  HeatBalance b{.unit = "W"};
  b.removal = {.need = at_least_0(Q_W), .signed_need = Q_W};
  b.heating = {.need = at_least_0(-Q_W), .signed_need = -Q_W};
  if (!vessel.jacket || !medium) return b;
  b.area_m2 = jacket_area(vessel, operation.fill);
  const double UA = vessel.jacket->U_fouled() * b.area_m2;
  const double most_W = UA > 0 ? most_heat_of_jacket(operation.hold_K, *medium, UA, medium->flow_m3_s) : 0;
  b.removal.takes = at_least_0(most_W);
  b.heating.takes = at_least_0(-most_W);
  return b;
}

HeatBalance balance_tube(const Vessel& vessel, const Operation& operation, const Utility* medium,
                         const HeatNeed& heat) {
  HeatBalance b{.unit = "W/m2", .area_m2 = jacket_area(vessel, operation.fill)};
  b.removal.need = at_least_0(heat.most_flux_W_m2);
  b.heating.need = at_least_0(-heat.least_flux_W_m2);
  if (!vessel.jacket || !medium) return b;
  const double flux = vessel.jacket->U_fouled() * (operation.hold_K - medium->supply_K);
  b.removal.takes = at_least_0(flux);
  b.heating.takes = at_least_0(-flux);
  return b;
}

Shown shown_of(std::string_view unit) { return unit == "W" ? Shown::heat : Shown::heat_flux; }

std::string explain(const LimitInput& input, const OneWay& way, std::string_view unit, bool removal) {
  std::string text = show(way.need, shown_of(unit)) + " needed" + (unit == "W" ? "" : " at the worst place");
  if (!input.vessel.jacket) return text + ", there is no jacket";
  if (const auto lacking = lacking_utility(input.vessel, input.operation); !lacking.empty())
    return text + ", " + lacking;
  if (!input.medium) return text + ", the jacket has no medium";
  if (way.takes == 0) {
    return text + ", " + input.medium->name + " at " + show(input.medium->supply_K, Shown::temperature) + " can not " +
           (removal ? "cool" : "heat") + " a vessel at " + show(input.operation.hold_K, Shown::temperature);
  }
  text += ", " + input.medium->name + (removal ? " takes " : " gives ") + show(way.takes, shown_of(unit));
  const auto& flow = input.medium->flow_m3_s;
  return unit == "W" && flow && !input.medium->condensing ? text + " at " + show(*flow, Shown::feed)
                                                          : text + " at most";
}
}  // namespace

HeatBalance balance_heat(const Vessel& vessel, const Operation& operation, const Utility* medium,
                         const VesselOutcome& outcome) {
  return std::holds_alternative<StirredTank>(vessel.kind)
             ? balance_tank(vessel, operation, medium, outcome.heat->cooling_W)
             : balance_tube(vessel, operation, medium, *outcome.heat);
}

bool heat_is_asked(const LimitInput& input) {
  return input.operation.thermal == Thermal::hold &&
         heat_knowledge(input.chemistry).state != HeatKnowledge::State::not_asked;
}

std::optional<Limit> check_heat(const LimitInput& input, std::string_view name) {
  if (!heat_is_asked(input)) return std::nullopt;
  if (!input.outcome.heat) {
    const auto why = heat_knowledge(input.chemistry).why;
    return cannot_tell(name, why.empty() ? "the heat of this vessel is not known" : why);
  }
  const HeatBalance b = balance_heat(input.vessel, input.operation, input.medium, input.outcome);
  const bool removal = name == limit_name::heat_removal;
  const OneWay& way = removal ? b.removal : b.heating;
  Limit limit = limit_of(name, way.need, way.takes, Side::most, b.unit);
  const double scale = way.takes == 0 ? 1 : way.takes;
  if (way.signed_need) {
    limit.search_margin = (way.takes - *way.signed_need) / scale;
  } else if (way.need == 0) {
    limit.search_margin.reset();  // the direction is not needed anywhere along the tube
  }
  if (!input.vessel.jacket) {
    const double area = b.unit == "W" ? 1 : b.area_m2;
    limit.search_margin = nothing_W - (way.signed_need ? *way.signed_need : way.need * area);
    limit.state = *limit.search_margin >= -holds_within ? Limit::State::holds : Limit::State::broken;
  }
  return explained(limit, [&] { return explain(input, way, b.unit, removal); });
}

}  // namespace vatwright
