#include "setup.hpp"

#include <algorithm>
#include <cmath>

namespace vatwright {

NoAnswer cannot_tell(std::string why) { return {NoAnswer::Kind::cannot_tell, std::move(why)}; }
NoAnswer unsolved(std::string why) { return {NoAnswer::Kind::unsolved, std::move(why)}; }

namespace {

Per per_of(const Reaction& reaction) {
  const auto* law = std::get_if<RateLaw>(&reaction.forward);
  return law != nullptr ? law->per : Per::fluid;  // a measured table counts per fluid
}

/// m'_j: what the rate law of a reaction counts, per m3 of the coordinate volume; or why it can not be had.
struct CapacityOf {
  Per per;
  const Operation& operation;
  Outcome<double> operator()(const StirredTank&) const {
    if (per == Per::bed) return cannot_tell("its rate counts per bed, and a stirred tank has none");
    if (per != Per::catalyst) return 1.0;
    if (operation.catalyst_kg_m3 > 0) return operation.catalyst_kg_m3;
    return cannot_tell("its rate counts per catalyst, and no loading is given for stirred tanks");
  }
  Outcome<double> operator()(const Tube&) const {
    if (per == Per::bed) return cannot_tell("its rate counts per bed, and a plain tube has none");
    if (per == Per::catalyst) return cannot_tell("its rate counts per catalyst, and a plain tube holds none");
    return 1.0;
  }
  Outcome<double> operator()(const PackedTube& tube) const {
    switch (per) {
      case Per::fluid:
        return tube.voidage;
      case Per::bed:
        return 1.0;
      case Per::catalyst:
        return tube.bulk_density_kg_m3;
      case Per::unsaid:
        break;
    }
    return cannot_tell("what its rate counts per (fluid, bed, catalyst) must be said for a packed tube");
  }
};

std::optional<NoAnswer> add_capacities(Setup& setup) {
  for (int j = 0; j < setup.chemistry.kinetics.reactions(); ++j) {
    const Reaction& reaction = setup.chemistry.kinetics.reaction(j);
    auto capacity = std::visit(CapacityOf{per_of(reaction), setup.operation}, setup.vessel.kind);
    const double* value = answer(capacity);
    if (value == nullptr) return cannot_tell("reaction " + reaction.name + ": " + std::get<NoAnswer>(capacity).why);
    setup.capacity.push_back(*value);
    if (const auto& law = std::get_if<RateLaw>(&reaction.forward); law && reaction.reverse)
      if (per_of(reaction) != reaction.reverse->per && reaction.reverse->per != Per::unsaid)
        return cannot_tell("reaction " + reaction.name + ": forward and reverse rate count per different things");
  }
  return std::nullopt;
}

/// A measured table is for one temperature (and the feed's composition).
std::optional<NoAnswer> table_does_not_serve(const Setup& setup) {
  if (!setup.chemistry.kinetics.has_table()) return std::nullopt;
  if (!setup.is_held) return cannot_tell("a table of measured rates holds at one temperature, here it moves");
  const auto* table = std::get_if<RateTable>(&setup.chemistry.kinetics.reaction(0).forward);
  if (table != nullptr && table->at_K && std::abs(*table->at_K - setup.operation.hold_K) > 1e-6)
    return cannot_tell("the table of measured rates holds at another temperature than the vessel");
  return std::nullopt;
}

void add_sizes(Setup& setup) {
  const auto* tank = std::get_if<StirredTank>(&setup.vessel.kind);
  setup.is_tank = tank != nullptr;
  setup.is_gas = setup.chemistry.feed.phase == Phase::gas;
  setup.is_held = setup.operation.thermal == Thermal::hold;
  setup.inlet_K = setup.is_held ? setup.operation.hold_K : setup.arrives.temperature_K;
  setup.volume_m3 =
      tank != nullptr ? fluid_volume(*tank, setup.is_gas ? 1 : setup.operation.fill) : inner_volume(setup.vessel.kind);
  setup.agitator_W = tank != nullptr ? tank->agitator_W : 0;
  setup.inlet_Pa = setup.arrives.pressure_Pa;
  if (const auto asked = setup.operation.pressure_Pa) {
    if (*asked > setup.arrives.pressure_Pa * (1 + 1e-12)) setup.let_down_above_Pa = *asked;
    setup.inlet_Pa = std::min(*asked, setup.arrives.pressure_Pa);
  }
}

void add_jacket(Setup& setup) {
  const Operation& operation = setup.operation;
  if (operation.thermal != Thermal::jacketed || !setup.vessel.jacket || operation.medium == nullptr) return;
  JacketSide& side = setup.jacket;
  side.UA_W_K = setup.vessel.jacket->U_fouled() * jacket_area(setup.vessel, operation.fill);
  side.supply_K = operation.medium->supply_K;
  side.capacity_W_K = capacity_rate(*operation.medium, operation.medium_flow_m3_s);
  side.passage = setup.vessel.jacket->passage;
  if (setup.is_tank && !(side.mixed_W_K() > 0)) side.UA_W_K = 0;  // no flow of medium
}

}  // namespace

double JacketSide::mixed_W_K() const {
  return UA_W_K > 0 && capacity_W_K > 0 ? 1 / (1 / UA_W_K + 1 / capacity_W_K) : 0;
}

Outcome<Setup> make_setup(const Vessel& vessel, const Chemistry& chemistry, const Operation& operation,
                          const Start& start, const Stream& arrives) {
  Setup setup{vessel, chemistry, operation, start, arrives};
  add_sizes(setup);
  add_jacket(setup);
  setup.heat = heat_knowledge(chemistry);
  if (!(setup.volume_m3 > 0)) return cannot_tell("the vessel holds no fluid at this fill");
  if (!setup.is_held && setup.heat.state == HeatKnowledge::State::unknown)
    return cannot_tell("a temperature that moves needs heat: " + setup.heat.why);
  if (setup.is_jacketed() && !setup.heat_known())
    if (const auto missing = missing_heat_capacity(chemistry); !missing.empty())
      return cannot_tell("a vessel run on its jacket needs a heat capacity: " + missing);
  if (setup.T_moves() && heat_is_constant(chemistry)) {
    std::vector<double> dH;
    for (int j = 0; j < chemistry.kinetics.reactions(); ++j)
      dH.push_back(setup.dH(static_cast<std::size_t>(j), setup.inlet_K));
    setup.constant_heat = {heat_capacity(chemistry, arrives.xi_mol_m3, setup.inlet_K), std::move(dH)};
  }
  if (auto refused = add_capacities(setup)) return *refused;
  if (auto refused = table_does_not_serve(setup)) return *refused;
  return setup;
}

}  // namespace vatwright
