#include "heat_curve.hpp"

#include <algorithm>

#include "start_state.hpp"

namespace vatwright {

HeatCurve heat_curve(const Setup& setup, double feed_m3_s, const std::vector<SteadyState>& states) {
  constexpr int places = 120;
  constexpr double margin = 0.1;  // of the span, beyond both ends
  double low = setup.arrives.temperature_K, high = low;
  const auto widen = [&](double T_K) { low = std::min(low, T_K), high = std::max(high, T_K); };
  for (const SteadyState& state : states) widen(state.temperature_K);
  widen(start_state(setup).temperature_K);
  if (setup.is_jacketed()) widen(setup.jacket.supply_K);
  const double room = margin * std::max(high - low, 10.0);

  HeatCurve curve;
  Operation held = setup.operation;
  held.thermal = Thermal::hold;
  const Exchange exchange = setup.exchange(feed_m3_s);
  for (int k = 0; k <= places; ++k) {
    held.hold_K = low - room + (high - low + 2 * room) * k / places;
    VesselRun run(setup.vessel, setup.chemistry, held, setup.start, setup.arrives);
    const auto outcome = run.at(feed_m3_s, Detail::map);
    const auto* there = answer(outcome);
    if (there == nullptr || there->cycle) continue;
    const auto& xi_in = setup.arrives.xi_mol_m3;
    const double T = held.hold_K;
    curve.temperature_K.push_back(T);
    curve.made_W.push_back(feed_m3_s *
                           (released_heat(setup.chemistry, xi_in, there->outlet.xi_mol_m3, T) + exchange.added_J_m3));
    curve.removed_W.push_back(feed_m3_s * (sensible_heat(setup.chemistry, xi_in, setup.arrives.temperature_K, T) +
                                           exchange.per_K_J_m3_K * (T - exchange.medium_K)));
  }
  return curve;
}

}  // namespace vatwright
