#include "rate_part.hpp"

#include <algorithm>

namespace vatwright {
namespace {

void add_order(RatePart& part, int species, double order) {
  const auto same = std::ranges::find(part.orders, species, &std::pair<int, double>::first);
  if (same == part.orders.end())
    part.orders.emplace_back(species, order);
  else
    same->second += order;
}

void take_law(RatePart& part, const PowerLaw& law) {
  part.k = law.k;
  for (const SpeciesFigure& n : law.orders) add_order(part, n.species, n.value);
}

void take_law(RatePart& part, const Saturating& law) {
  part.k = law.most;
  part.half = law.half;
  for (const SpeciesFigure& half : law.half) add_order(part, half.species, 1);
}

RatePart part_of(const RateLaw& law) {
  RatePart part;
  std::visit([&](const auto& form) { take_law(part, form); }, law.law);
  part.divisor = law.of_coefficient;
  part.basis = law.basis;
  part.adsorption = law.adsorption;
  part.adsorption_power = law.adsorption_power;
  return part;
}

/// sign -1: the reactants; +1: the products.
std::vector<int> side(const Kinetics& kinetics, int j, double sign) {
  std::vector<int> all;
  for (int i = 0; i < kinetics.species(); ++i)
    if (sign * kinetics.nu(i, j) > 0) all.push_back(i);
  return all;
}

void drop_zero_orders(RatePart& part) {
  std::erase_if(part.orders, [](const auto& n) { return n.second == 0; });
}

}  // namespace

bool RatePart::runs(std::span<const double> C) const {
  return std::ranges::all_of(needs, [&](int i) { return C[static_cast<std::size_t>(i)] > 0; });
}

std::vector<RatePart> parts_of(const Kinetics& kinetics, int j) {
  const Reaction& reaction = kinetics.reaction(j);
  const auto* law = std::get_if<RateLaw>(&reaction.forward);
  if (law == nullptr) return {};
  std::vector<RatePart> parts{part_of(*law)};
  parts.front().needs = side(kinetics, j, -1);
  if (reaction.reverse) {
    parts.push_back(part_of(*reaction.reverse));
  } else if (reaction.equilibrium) {
    parts.push_back(parts.front());  // forward Q/K, Q = prod C_i^nu_i
    for (int i = 0; i < kinetics.species(); ++i) add_order(parts.back(), i, kinetics.nu(i, j));
    parts.back().over = reaction.equilibrium;
  }
  if (parts.size() == 2) parts.back().needs = side(kinetics, j, +1);
  std::ranges::for_each(parts, drop_zero_orders);
  return parts;
}

}  // namespace vatwright
