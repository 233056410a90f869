#include <algorithm>
#include <cmath>
#include <limits>

#include "heat.hpp"

namespace vatwright {

namespace {
const Utility* find_utility(const std::vector<Utility>& utilities, const std::string& name) {
  const auto at = std::find_if(utilities.begin(), utilities.end(), [&](const Utility& u) { return u.name == name; });
  return at == utilities.end() ? nullptr : &*at;
}

double relative_room(const OneWay& way) {
  if (way.need == 0) return std::numeric_limits<double>::max();  // not needed: no reason to choose by it
  return (way.takes - way.need) / (way.takes == 0 ? 1 : way.takes);
}

/// Room of a medium in the directions that are needed.
double room_of(const Vessel& vessel, const Operation& operation, const Utility& medium, const VesselOutcome& outcome) {
  const HeatBalance b = balance_heat(vessel, operation, &medium, outcome);
  return std::min(relative_room(b.removal), relative_room(b.heating));
}

const Utility* most_room(const Vessel& vessel, const Operation& operation, const std::vector<Utility>& utilities,
                         const VesselOutcome& outcome) {
  const Utility* best = nullptr;
  double most = 0;
  for (const auto& name : vessel.jacket->utilities) {
    const Utility* medium = find_utility(utilities, name);
    if (!medium) continue;
    const double room = room_of(vessel, operation, *medium, outcome);
    if (!best || room > most) best = medium, most = room;
  }
  return best;
}
}  // namespace

std::string lacking_utility(const Vessel& vessel, const Operation& operation) {
  if (!operation.utility) return {};
  if (!vessel.jacket) return *operation.utility + " is asked for, there is no jacket";
  const auto& has = vessel.jacket->utilities;
  if (std::find(has.begin(), has.end(), *operation.utility) != has.end()) return {};
  return *operation.utility + " is asked for, the jacket has not got it";
}

const Utility* choose_medium(const Vessel& vessel, const Operation& operation, const std::vector<Utility>& utilities,
                             const VesselOutcome& outcome) {
  if (!vessel.jacket || vessel.jacket->utilities.empty() || operation.thermal == Thermal::adiabatic) return nullptr;
  if (operation.utility) {
    return lacking_utility(vessel, operation).empty() ? find_utility(utilities, *operation.utility) : nullptr;
  }
  if (operation.thermal == Thermal::jacketed) return find_utility(utilities, vessel.jacket->utilities.front());
  return outcome.heat ? most_room(vessel, operation, utilities, outcome) : nullptr;
}

}  // namespace vatwright
