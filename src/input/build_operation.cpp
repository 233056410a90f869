#include "build_duty.hpp"
#include "vatwright/quantity/show.hpp"

namespace vatwright {
namespace {

OperationChoice choice_of(const VesselOperationDraft& d) {
  OperationChoice c;
  c.temperature_K = d.temperature.value;
  c.pressure_Pa = d.pressure.value;
  c.fill = d.fill.value;
  c.utility = d.utility.value;
  c.thermal = d.thermal.value;
  c.catalyst_kg_m3 = d.catalyst.value;
  return c;
}

void check_choice(const VesselOperationDraft& d, Thermal thermal, const Site& site, const Scope& scope) {
  if (d.temperature && thermal == Thermal::adiabatic)
    scope.error(d.temperature.place, "temperature", "found a temperature where vessels are adiabatic",
                "expected none; feed.temperature meant?");
  if (d.temperature && thermal == Thermal::jacketed)
    scope.warning(d.temperature.place, "temperature", "holds nothing where vessels run on their jackets alone",
                  "left unused; thermal = \"hold\" meant?");
  if (d.utility) {
    std::vector<std::string> names;
    bool known = false;
    for (const Utility& u : site.utilities) names.push_back(u.name), known = known || u.name == *d.utility;
    if (!known)
      scope.error(d.utility.place, "utility", "no utility " + quoted(*d.utility),
                  "expected one of the site; " + hint(*d.utility, names));
  }
}

/// Vessels on their jackets alone need heat: all that is missing is named at once.
void check_heat(const Given<Thermal>& thermal, const Chemistry& chemistry, const Scope& scope) {
  if (!thermal || *thermal != Thermal::jacketed) return;
  if (heat_knowledge(chemistry).state != HeatKnowledge::State::not_asked) return;
  std::string missing = "no heat of reaction (releases or absorbs)";
  if (const auto capacity = missing_heat_capacity(chemistry); !capacity.empty()) missing += "; " + capacity;
  scope.error(thermal.place, "thermal", "\"jacketed\" with " + missing,
              "expected a heat of reaction, and in the feed density and heat_capacity (or the heat_capacity of every "
              "species)");
}

void check_mode(const OperationDraft& d, const Scope& scope) {
  if (!d.mode || *d.mode == Mode::continuous) return;
  scope.error(d.mode.place, "mode",
              std::string(*d.mode == Mode::batch ? "\"batch\"" : "\"dosed\"") +
                  " is read and checked, but this version can not reckon it",
              "expected \"continuous\"");
}

void build_limits(const LimitsDraft& d, const std::optional<double>& held_K, const Given<double>& held,
                  const Builder& builder, ProductLimits& limits) {
  const Scope scope = builder.about("limits");
  if (d.temperature) limits.coldest_K = d.temperature->lo, limits.hottest_K = d.temperature->hi;
  limits.decomposition_K = d.decomposition.value;
  limits.wetted = d.wetted.value.value_or(std::vector<std::string>{});
  if (d.boiling) {
    using B = ProductLimits::Boiling;
    if (*d.boiling == "forbid")
      limits.boiling = B::forbid;
    else if (*d.boiling == "ignore")
      limits.boiling = B::ignore;
    else {
      const auto T = to_si(*d.boiling, dim::temperature, Sense::temperature);
      if (const auto* value = std::get_if<double>(&T))
        limits.boiling = B::at, limits.boiling_K = *value;
      else
        scope.error(d.boiling.place, "boiling", "found " + quoted(*d.boiling),
                    "expected a temperature, forbid or ignore");
    }
  }
  if (held_K && limits.hottest_K && *held_K > *limits.hottest_K + 1e-9 && held.written)
    builder.about("operation")
        .error(held.place, "temperature",
               "held " + show(*held_K - *limits.hottest_K, Shown::difference) + " above the product limit of line " +
                   std::to_string(d.temperature.place.line),
               "expected " + show(*limits.hottest_K, Shown::temperature) + " at the most");
  if (held_K && limits.coldest_K && *held_K < *limits.coldest_K - 1e-9 && held.written)
    builder.about("operation")
        .error(held.place, "temperature",
               "held " + show(*limits.coldest_K - *held_K, Shown::difference) + " below the product limit of line " +
                   std::to_string(d.temperature.place.line),
               "expected " + show(*limits.coldest_K, Shown::temperature) + " at the least");
}

std::vector<std::string> tags_of(const Site& site) {
  std::vector<std::string> tags;
  for (const Vessel& v : site.vessels) tags.push_back(v.tag);
  return tags;
}

}  // namespace

void build_operation(const DutyDraft& draft, const Site& site, bool said_pressure, Duty& duty, const Builder& builder) {
  static const OperationDraft nothing;
  const OperationDraft& d = draft.operation ? *draft.operation : nothing;
  const Feed& feed = duty.chemistry.feed;
  const Scope scope = builder.about("operation");
  check_mode(d, scope);
  duty.thermal = d.thermal.value.value_or(Thermal::hold);
  if (!d.thermal.written) builder.assume("operation.thermal", "hold", "left out");
  check_choice(d, duty.thermal, site, scope);
  check_heat(d.thermal, duty.chemistry, scope);
  duty.operation = choice_of(d);
  duty.catalyst_kg_m3 = d.catalyst.value.value_or(0);
  duty.hold_K = d.temperature.value.value_or(feed.temperature_K);
  if (duty.thermal == Thermal::hold && !d.temperature.written)
    builder.assume("operation.temperature", show(duty.hold_K, Shown::temperature), "left out: the feed's");
  duty.inlet_pressure_Pa = d.pressure.value.value_or(feed.pressure_Pa);
  if (!d.pressure.written && !said_pressure)
    builder.assume("operation.pressure", "1.01325 bar", "stated neither there nor in the feed");
  if (d.vessels)
    for (const auto& named : *d.vessels) {
      const std::string subject = "operation, vessel " + named.name;
      if (!site.find(named.name)) {
        builder.about(subject).warning(named.name_place, "", "no vessel " + quoted(named.name),
                                       "left unused; " + hint(named.name, tags_of(site)));
        continue;
      }
      check_choice(named.value, named.value.thermal.value.value_or(duty.thermal), site, builder.about(subject));
      check_heat(named.value.thermal, duty.chemistry, builder.about(subject));
      duty.operation_of[named.name] = choice_of(named.value);
    }
  if (draft.start) {
    duty.start.filled_with = draft.start->filled_with.value.value_or(Start::Filled::feed);
    duty.start.temperature_K = draft.start->temperature.value;
  }
  const std::optional<double> held = duty.thermal == Thermal::hold ? std::optional(duty.hold_K) : std::nullopt;
  if (draft.limits) build_limits(*draft.limits, held, d.temperature, builder, duty.limits);
  for (const auto& [written, place, what] : {std::tuple{draft.charge.written, draft.charge.place, "charge"},
                                             std::tuple{draft.dose.written, draft.dose.place, "dose"},
                                             std::tuple{draft.cycle.written, draft.cycle.place, "cycle"}})
    if (written && (!d.mode.written || (d.mode && *d.mode == Mode::continuous)))
      builder.about(what).warning(place, "", "is unused in a continuous duty");
}

}  // namespace vatwright
