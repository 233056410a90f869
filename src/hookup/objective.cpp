#include "vatwright/hookup/objective.hpp"

#include <algorithm>

namespace vatwright {

std::optional<int> yield_asked(const Duty& duty) {
  for (const Demand& d : duty.target.demands) {
    if (d.on == Demand::On::yield) return d.species;
  }
  return std::nullopt;
}

std::optional<Objective> yield_objective(const Duty& duty, int species) {
  std::vector<bool> fed;
  for (const double c : duty.chemistry.feed.c_mol_m3) fed.push_back(c > 0);
  const auto n = moles_needed(duty.chemistry.kinetics, fed, species);
  if (!n || !(duty.chemistry.kinetics.c_of_feed() > 0)) return std::nullopt;
  return Objective{Objective::Of::yield, species, *n};
}

Objective objective_of(const Duty& duty) {
  if (const auto species = yield_asked(duty)) {
    if (const auto yield = yield_objective(duty, *species)) return *yield;
  }
  if (duty.target.conversion || duty.target.demands.empty()) return {};
  return {Objective::Of::demand, 0, 0};
}

std::optional<double> value_of(const Objective& objective, const Duty& duty, const Stream& outlet) {
  const Kinetics& k = duty.chemistry.kinetics;
  switch (objective.of) {
    case Objective::Of::conversion:
      return k.conversion(outlet.xi_mol_m3);
    case Objective::Of::yield: {
      double made = 0;
      for (int j = 0; j < k.reactions(); ++j)
        made += k.nu(objective.index, j) * outlet.xi_mol_m3[static_cast<std::size_t>(j)];
      return objective.moles_needed * made / k.c_of_feed();
    }
    case Objective::Of::demand:
      break;
  }
  const auto items = check_target(duty, outlet);
  const std::size_t before = duty.target.conversion ? 1 : 0;
  const TargetItem& item = items[before + static_cast<std::size_t>(objective.index)];
  return item.value ? std::optional(item.margin) : std::nullopt;
}

bool is_all_of_target(const Objective& objective, const Duty& duty) {
  const auto& demands = duty.target.demands;
  if (objective.of == Objective::Of::conversion) return duty.target.conversion && demands.empty();
  if (duty.target.conversion || demands.size() != 1) return false;
  if (objective.of == Objective::Of::demand) return true;
  return demands[0].on == Demand::On::yield && demands[0].species == objective.index && demands[0].at_least;
}

}  // namespace vatwright
