#include "tank_outcome.hpp"

#include <algorithm>

namespace vatwright {

void tell_of_tank(const Setup& setup, double feed_m3_s, VesselOutcome& outcome, Detail detail) {
  const auto reached = std::ranges::find(outcome.states, true, &SteadyState::reached);
  if (reached == outcome.states.end()) return;
  const auto& xi_in = setup.arrives.xi_mol_m3;
  outcome.outlet = {feed_m3_s, reached->xi_mol_m3, reached->temperature_K, setup.inlet_Pa};
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
  }
  if (!setup.is_held || !setup.heat_known()) return;
  const double warming = sensible_heat(setup.chemistry, xi_in, setup.arrives.temperature_K, setup.inlet_K);
  const double released = released_heat(setup.chemistry, xi_in, reached->xi_mol_m3, setup.inlet_K);
  outcome.heat = HeatNeed{feed_m3_s * (released - warming) + setup.agitator_W, 0, 0, 0};
}

}  // namespace vatwright
