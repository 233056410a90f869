#pragma once
#include <vector>

#include "setup.hpp"

namespace vatwright {

/// A reactant that a reaction can use up in finite time, because its order there is below 1.
struct BrokenOrder {
  std::size_t reaction = 0, species = 0;
};
/// Every such pair, reverse parts (whose reactants are the products) included.
std::vector<BrokenOrder> broken_orders(const Kinetics& kinetics);

}  // namespace vatwright
