#include "broken_order.hpp"

namespace vatwright {
namespace {

double order_of(const RateLaw& law, int species) {
  double order = 0;
  if (const auto* power = std::get_if<PowerLaw>(&law.law)) {
    for (const SpeciesFigure& n : power->orders)
      if (n.species == species) order += n.value;
  } else {
    for (const SpeciesFigure& half : std::get<Saturating>(law.law).half)
      if (half.species == species) order += 1;
  }
  return order;
}

}  // namespace

std::vector<BrokenOrder> broken_orders(const Kinetics& kinetics) {
  std::vector<BrokenOrder> all;
  for (int j = 0; j < kinetics.reactions(); ++j) {
    const Reaction& reaction = kinetics.reaction(j);
    const auto* forward = std::get_if<RateLaw>(&reaction.forward);
    if (forward == nullptr) continue;
    for (int i = 0; i < kinetics.species(); ++i) {
      const double nu = kinetics.nu(i, j);
      double order = 1;
      if (nu < 0) order = order_of(*forward, i);
      if (nu > 0 && reaction.reverse) order = order_of(*reaction.reverse, i);
      if (nu > 0 && reaction.equilibrium) order = order_of(*forward, i) + nu;  // forward Q/K
      if (order < 1) all.push_back({static_cast<std::size_t>(j), static_cast<std::size_t>(i)});
    }
  }
  return all;
}

}  // namespace vatwright
