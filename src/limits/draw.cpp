#include <cmath>

#include "build.hpp"
#include "heat.hpp"

namespace vatwright {

namespace {
/// A tube's medium, at one temperature Tm, must stay cold enough for the worst place: U (T - Tm) >= q_worst, and it
/// warms up to Tm = supply + Q/(m cp). Both together: m cp >= Q/((T - supply) - q_worst/U); heating with all signs
/// turned.
std::optional<double> least_draw_of_tube(double T_K, double U_W_m2_K, const HeatNeed& heat, const Utility& medium) {
  const double Q = heat.cooling_W;
  const double way = Q > 0 ? 1 : -1;
  const double worst = Q > 0 ? heat.most_flux_W_m2 : -heat.least_flux_W_m2;
  if (Q == 0) return 0;
  if (!(U_W_m2_K > 0)) return std::nullopt;
  const double warms_K =
      way * (T_K - medium.supply_K) - worst / U_W_m2_K;  // room for the medium to warm up (or cool down)
  if (!(warms_K > 0)) return std::nullopt;
  return std::abs(Q) / warms_K / (medium.density_kg_m3 * medium.heat_capacity_J_kg_K);
}
}  // namespace

std::optional<double> least_draw(const Vessel& vessel, const Operation& operation, const Utility& medium,
                                 const VesselOutcome& outcome) {
  if (!vessel.jacket || !outcome.heat) return std::nullopt;
  if (medium.condensing) return 0;
  const double U = vessel.jacket->U_fouled();
  if (!std::holds_alternative<StirredTank>(vessel.kind)) {
    return least_draw_of_tube(operation.hold_K, U, *outcome.heat, medium);
  }
  const double Q = outcome.heat->cooling_W;
  if (Q == 0) return 0;
  const double UA = U * jacket_area(vessel, operation.fill);
  return UA > 0 ? least_flow(Q, operation.hold_K, medium, UA) : std::nullopt;
}

std::optional<Draw> draw_of(const LimitInput& input) {
  const Utility* medium = input.medium;
  if (!medium || medium->condensing) return std::nullopt;
  switch (input.operation.thermal) {
    case Thermal::adiabatic:
      return std::nullopt;
    case Thermal::jacketed:
      if (!input.operation.medium_flow_m3_s) return std::nullopt;  // nothing limits it
      return Draw{medium, input.operation.medium_flow_m3_s, true};
    case Thermal::hold:
      break;
  }
  if (!heat_is_asked(input)) return std::nullopt;
  if (!input.outcome.heat) return Draw{medium, std::nullopt, false};
  return Draw{medium, least_draw(input.vessel, input.operation, *medium, input.outcome), true};
}

}  // namespace vatwright
