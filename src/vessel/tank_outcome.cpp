#include "tank_outcome.hpp"

#include <algorithm>

#include "start_state.hpp"
#include "uncooled.hpp"

namespace vatwright {

namespace {

/// The start's fill and the reached state, besides what the start-up came through.
void tell_uncooled(const Setup& setup, const Stream& reached, VesselOutcome& outcome) {
  std::vector<double> C(static_cast<std::size_t>(setup.chemistry.kinetics.species()));
  setup.chemistry.concentrations(reached.xi_mol_m3, reached.temperature_K, reached.pressure_Pa, C);
  const StartState start = start_state(setup);
  const double worst = std::max(warmest_uncooled(setup, C, reached.temperature_K),
                                warmest_uncooled(setup, start.C, start.temperature_K));
  outcome.uncooled_K = std::max(worst, outcome.uncooled_K.value_or(worst));
}

/// Q/(U A) against 1/(d ln q/dT), where heat goes out through a jacket.
void tell_driving(const Setup& setup, RateEvaluator& evaluator, VesselOutcome& outcome) {
  if (!setup.vessel.jacket || !outcome.heat || !(outcome.heat->cooling_W > 0)) return;
  const double UA = setup.vessel.jacket->U_fouled() * jacket_area(setup.vessel, setup.operation.fill);
  if (!(UA > 0)) return;
  if (const auto most = most_driving_K(setup, evaluator, outcome.outlet))
    outcome.driving = DrivingDifference{outcome.heat->cooling_W / UA, *most};
}

}  // namespace

void tell_of_tank(const Setup& setup, double feed_m3_s, VesselOutcome& outcome, Detail detail,
                  RateEvaluator& evaluator) {
  const auto reached = std::ranges::find(outcome.states, std::optional(true), &SteadyState::reached);
  if (reached == outcome.states.end()) return;
  const auto& xi_in = setup.arrives.xi_mol_m3;
  outcome.outlet = {feed_m3_s, reached->xi_mol_m3, reached->temperature_K, setup.inlet_Pa};
  outcome.enters_K = setup.arrives.temperature_K;
  outcome.conversion = reached->conversion;
  outcome.coldest_K = outcome.hottest_K = reached->temperature_K;
  outcome.lowest_Pa = outcome.highest_Pa = setup.inlet_Pa;
  outcome.isothermal = setup.is_held;
  outcome.let_down_above_Pa = setup.let_down_above_Pa;
  if (detail == Detail::map) return;
  outcome.inside = {outcome.outlet};
  if (setup.is_jacketed()) {
    const JacketSide& jacket = setup.jacket;
    outcome.heat = HeatNeed{jacket.mixed_W_K() * (reached->temperature_K - jacket.supply_K), 0, 0, 0};
  } else if (setup.is_held && setup.heat_known()) {
    const double warming = sensible_heat(setup.chemistry, xi_in, setup.arrives.temperature_K, setup.inlet_K);
    const double released = released_heat(setup.chemistry, xi_in, reached->xi_mol_m3, setup.inlet_K);
    outcome.heat = HeatNeed{feed_m3_s * (released - warming) + setup.agitator_W, 0, 0, 0};
  }
  if (cooling_can_fail(setup)) tell_uncooled(setup, outcome.outlet, outcome);
  tell_driving(setup, evaluator, outcome);
}

}  // namespace vatwright
