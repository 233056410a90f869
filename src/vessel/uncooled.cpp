#include "uncooled.hpp"

#include <algorithm>

#include "vatwright/thermal/adiabatic.hpp"

namespace vatwright {

bool cooling_can_fail(const Setup& setup) { return setup.heat_known() && (setup.is_held || setup.is_jacketed()); }

double warmest_uncooled(const Setup& setup, std::span<const double> C, double T_K) {
  Chemistry contents = setup.chemistry;
  double scale = 1;  // to the volume that the mixture's heat capacity counts for
  if (setup.is_gas) {
    double fed = 0, held = 0;
    for (std::size_t i = 0; i < C.size(); ++i) fed += contents.feed.c_mol_m3[i], held += C[i];
    if (held > 0) scale = fed / held;
  }
  for (std::size_t i = 0; i < C.size(); ++i) contents.feed.c_mol_m3[i] = scale * std::max(0.0, C[i]);
  return adiabatic_range(contents, std::vector<double>(setup.capacity.size(), 0.0), T_K).warmest_K;
}

double potential_K(const Setup& setup, std::span<const double> C, double T_K) {
  double heat = 0;
  for (std::size_t j = 0; j < setup.capacity.size(); ++j)
    heat += std::max(0.0, -setup.dH(j, T_K)) * setup.chemistry.kinetics.left_to_run(static_cast<int>(j), C);
  const std::vector<double> none(setup.capacity.size(), 0.0);
  return T_K + heat / setup.capacity_at(none, T_K);
}

std::optional<double> most_driving_K(const Setup& setup, RateEvaluator& evaluator, const Stream& there) {
  const Chemistry& chemistry = setup.chemistry;
  std::vector<double> C(static_cast<std::size_t>(chemistry.kinetics.species())), r(setup.capacity.size());
  const auto heat_at = [&](double T_K) {
    chemistry.concentrations(there.xi_mol_m3, there.temperature_K, there.pressure_Pa, C);
    evaluator(C, T_K, chemistry.kinetics.conversion(there.xi_mol_m3), r);
    double heat = 0;
    for (std::size_t j = 0; j < r.size(); ++j) heat -= setup.capacity[j] * r[j] * setup.dH(j, T_K);
    return heat;
  };
  const double T = there.temperature_K, h = 1e-4 * T;
  const double q = heat_at(T), slope = (heat_at(T + h) - heat_at(T - h)) / (2 * h);
  if (!(q > 0) || !(slope > 0)) return std::nullopt;
  return q / slope;
}

}  // namespace vatwright
