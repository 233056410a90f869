#include "target_on_line.hpp"

#include <algorithm>

#include "vatwright/rating/rating.hpp"

namespace vatwright {

std::optional<double> yield_at_end(const Objective& yield, const Duty& duty, const Line& line) {
  Stream one = whole_feed(duty);
  one.xi_mol_m3[0] += 1;
  const double X = duty.chemistry.kinetics.conversion(one.xi_mol_m3);
  const auto made = value_of(yield, duty, one);
  if (!made || !(*made > 0) || !(X > 0)) return std::nullopt;
  return *made / line.place(X);
}

std::optional<double> place_of_target(const Duty& duty, const Line& line) {
  const Objective objective = objective_of(duty);
  if (is_all_of_target(objective, duty)) {  // one figure that is linear in z
    if (objective.of == Objective::Of::conversion) return std::min(1.0, line.place(*duty.target.conversion));
    if (objective.of != Objective::Of::yield) return std::nullopt;
    const auto yield = yield_at_end(objective, duty, line);
    return yield ? std::optional(std::min(1.0, duty.target.demands[0].bound / *yield)) : std::nullopt;
  }
  if (duty.chemistry.feed.phase == Phase::gas) return std::nullopt;  // concentrations there depend on more
  const auto met = [&](double z) {
    Stream there = whole_feed(duty);
    there.xi_mol_m3[0] = line.extent(z);
    return std::ranges::all_of(check_target(duty, there), [](const TargetItem& item) { return item.met; });
  };
  constexpr int places = 400;
  double lo = 0, hi = 1;
  bool any = false;
  for (int i = 1; i < places; ++i) {
    const double z = i == places - 1 ? at_the_end : static_cast<double>(i) / places;
    const bool here = met(z);
    if (any && !here) return std::nullopt;
    if (!here) lo = z;
    if (here && !any) hi = z;
    any = any || here;
  }
  if (!any) return 1.0;
  if (met(0)) return std::nullopt;
  for (int i = 0; i < 60; ++i) (met((lo + hi) / 2) ? hi : lo) = (lo + hi) / 2;
  return hi;
}

}  // namespace vatwright
