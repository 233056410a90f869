#include "vatwright/rating/duty.hpp"

#include <algorithm>

#include "vatwright/rating/rating.hpp"

namespace vatwright {

const Vessel* Site::find(const std::string& tag) const {
  const auto at = std::find_if(vessels.begin(), vessels.end(), [&](const Vessel& v) { return v.tag == tag; });
  return at == vessels.end() ? nullptr : &*at;
}

namespace {
/// Of a tank with liquid what is asked, else the most working fill; a gas fills all, so the whole jacket counts: the
/// most fill too.
double working_fill(const Duty& duty, const Vessel& vessel, const OperationChoice& own) {
  const auto* tank = std::get_if<StirredTank>(&vessel.kind);
  if (!tank) return 1;
  const bool liquid = duty.chemistry.feed.phase == Phase::liquid;
  const auto asked = own.fill ? own.fill : duty.operation.fill;
  return liquid ? asked.value_or(tank->fill.second) : tank->fill.second;
}
}  // namespace

Operation operation_of(const Duty& duty, const Vessel& vessel) {
  const auto at = duty.operation_of.find(vessel.tag);
  const OperationChoice own = at == duty.operation_of.end() ? OperationChoice{} : at->second;
  Operation operation;
  operation.thermal = own.thermal.value_or(duty.thermal);
  operation.hold_K = own.temperature_K.value_or(duty.hold_K);
  operation.pressure_Pa = own.pressure_Pa;
  operation.fill = working_fill(duty, vessel, own);
  operation.catalyst_kg_m3 = own.catalyst_kg_m3.value_or(duty.catalyst_kg_m3);
  operation.utility = own.utility ? own.utility : duty.operation.utility;
  return operation;
}

Operation operation_of(const Problem& problem, const Vessel& vessel) {
  Operation operation = operation_of(problem.duty, vessel);
  if (operation.thermal != Thermal::jacketed) return operation;
  operation.medium = choose_medium(vessel, operation, problem.site.utilities, {});
  if (operation.medium == nullptr) return operation;
  const Utility& medium = *operation.medium;
  operation.medium_flow_m3_s = medium.flow_m3_s ? medium.flow_m3_s : medium.total_m3_s;
  return operation;
}

Stream whole_feed(const Duty& duty) {
  const auto n = static_cast<std::size_t>(duty.chemistry.kinetics.reactions());
  return {duty.target.feed_m3_s, std::vector<double>(n, 0.0), duty.chemistry.feed.temperature_K,
          duty.inlet_pressure_Pa};
}

}  // namespace vatwright
