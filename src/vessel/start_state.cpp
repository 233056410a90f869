#include "start_state.hpp"

#include <algorithm>

namespace vatwright {
namespace {

std::vector<double> extents_of_product(const Chemistry& chemistry) {
  const Kinetics& kinetics = chemistry.kinetics;
  std::vector<double> xi(static_cast<std::size_t>(kinetics.reactions()));
  for (int j = 0; j < kinetics.reactions(); ++j) {
    if (!(kinetics.nu(kinetics.of(), j) < 0)) continue;
    xi[static_cast<std::size_t>(j)] = kinetics.left_to_run(j, chemistry.feed.c_mol_m3);
    break;
  }
  return xi;
}

}  // namespace

StartState start_state(const Setup& setup) {
  const Chemistry& chemistry = setup.chemistry;
  const Kinetics& kinetics = chemistry.kinetics;
  StartState start;
  start.temperature_K =
      setup.is_held ? setup.inlet_K : setup.start.temperature_K.value_or(chemistry.feed.temperature_K);
  start.C.resize(static_cast<std::size_t>(kinetics.species()));
  start.xi_all.assign(static_cast<std::size_t>(kinetics.reactions()), 0.0);
  if (setup.start.filled_with == Start::Filled::product) start.xi_all = extents_of_product(chemistry);
  start.xi = start.xi_all[0];
  kinetics.amounts(chemistry.feed.c_mol_m3, start.xi_all, start.C);
  for (double& c : start.C) c = std::max(c, 0.0);
  if (setup.start.filled_with == Start::Filled::solvent) {
    start.on_extents = false;
    for (int i = 0; i < kinetics.species(); ++i)
      for (int j = 0; j < kinetics.reactions(); ++j)
        if (kinetics.nu(i, j) < 0) start.C[static_cast<std::size_t>(i)] = 0;
  }
  chemistry.concentrations_of_amounts(start.C, start.temperature_K, setup.inlet_Pa, start.C);
  return start;
}

}  // namespace vatwright
