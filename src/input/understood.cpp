#include "understood.hpp"

#include <cmath>

#include "vatwright/quantity/show.hpp"

namespace vatwright {
namespace {

std::string tell_utility(const Utility& u) {
  std::string text = "utility " + u.name + ": supplied at " + show(u.supply_K, Shown::temperature);
  if (u.condensing) return text + ", condensing";
  text += u.flow_m3_s ? ", at most " + show(*u.flow_m3_s, Shown::feed) + " for one vessel" : ", any flow";
  return text + (u.total_m3_s ? ", " + show(*u.total_m3_s, Shown::feed) + " for a hookup" : "");
}

std::string tell_vessel(const Vessel& v) {
  static constexpr const char* status[] = {"idle", "in service", "mothballed"};
  std::string text = v.tag + ": " + std::string(kind_of(v)) + ", " + status[static_cast<int>(v.status)];
  double most_fill = 1;
  if (const auto* tank = std::get_if<StirredTank>(&v.kind)) {
    most_fill = tank->fill.second;
    text += ", " + show(tank->volume_m3, Shown::volume) + " brimful, " +
            show(fluid_volume(v.kind, most_fill), Shown::volume) + " at the most working fill";
  } else {
    text += ", " + show(fluid_volume(v.kind, 1), Shown::volume) + " of fluid";
  }
  if (v.jacket) {
    text += ", jacket " + show(jacket_area(v, most_fill), Shown::area) + " at " +
            show(v.jacket->U_fouled(), Shown::heat_transfer) + " with ";
    for (std::size_t i = 0; i < v.jacket->utilities.size(); ++i) text += (i ? ", " : "") + v.jacket->utilities[i];
  } else {
    text += ", no jacket";
  }
  if (v.feed_line_m3_s) text += ", feed line " + show(*v.feed_line_m3_s, Shown::feed);
  return text;
}

std::string amount_unit(const Feed& feed) { return feed.amounts == Amounts::mass ? "kg" : "mole"; }

std::string show_concentration(const Feed& feed, double c) {
  return feed.amounts == Amounts::mass ? show(c, Shown::density) : show(c, Shown::concentration);
}

std::string tell_feed(const Duty& duty) {
  const Feed& f = duty.chemistry.feed;
  std::string text = std::string("feed: ") + (f.phase == Phase::gas ? "gas" : "liquid") + " at " +
                     show(f.temperature_K, Shown::temperature) + ", " + show(f.pressure_Pa, Shown::pressure) +
                     " absolute";
  for (std::size_t i = 0; i < f.species.size(); ++i)
    if (f.c_mol_m3[i] > 0) text += ", " + f.species[i].name + " " + show_concentration(f, f.c_mol_m3[i]);
  return text + (f.phase == Phase::liquid && f.unnamed_solvent ? ", the rest an unnamed solvent" : "");
}

/// "A disappears at 0.97 mol/L/min in the feed, held at 70 degC".
std::string tell_rate(const Duty& duty, int j) {
  const Chemistry& chemistry = duty.chemistry;
  const Reaction& r = chemistry.kinetics.reaction(j);
  const double T = duty.thermal == Thermal::hold ? duty.hold_K : chemistry.feed.temperature_K;
  std::vector<double> xi(static_cast<std::size_t>(chemistry.kinetics.reactions()), 0.0), rates(xi),
      C(chemistry.feed.species.size());
  chemistry.concentrations(xi, T, duty.inlet_pressure_Pa, C);
  RateEvaluator evaluate(chemistry.kinetics);
  evaluate(C, T, 0.0, rates);
  const auto at = static_cast<std::size_t>(j);
  if (!std::isfinite(rates[at])) return "its rate in the feed is outside the measured table";
  for (const SpeciesFigure& nu : r.nu) {
    if (nu.value >= 0) continue;
    const auto* law = std::get_if<RateLaw>(&r.forward);
    const double gone = -nu.value * rates[at];
    const std::string name = chemistry.feed.species[static_cast<std::size_t>(nu.species)].name;
    const bool mass = chemistry.feed.amounts == Amounts::mass;
    std::string figure = mass ? shortest(std::round(gone * 3.6e6 * 1e4) / 1e4) + " g/m3/h"
                              : shortest(std::stod(show(gone * 60, Shown::concentration))) + " mol/L/min";
    if (law && law->per == Per::catalyst)
      figure = shortest(std::stod(show(gone * 1000, Shown::number))) + (mass ? " g/kg/s" : " mmol/kg/s");
    return name + " disappears at " + figure + " in the feed, " + (duty.thermal == Thermal::hold ? "held at " : "at ") +
           show(T, Shown::temperature);
  }
  return "it consumes nothing";
}

std::string tell_heat(const Duty& duty, const Reaction& r) {
  if (!r.heat) return "no heat is given";
  const double dH = r.heat->dH_J_mol;
  const std::string per = amount_unit(duty.chemistry.feed);
  const std::string figure =
      duty.chemistry.feed.amounts == Amounts::mass
          ? shortest(std::abs(dH) / 1000) + " kJ"
          : show(std::abs(dH), Shown::molar_energy).substr(0, show(std::abs(dH), Shown::molar_energy).find("/mol"));
  if (dH == 0) return "no heat of reaction";
  std::string of = " of the equation as written";
  for (const SpeciesFigure& nu : r.nu)
    if (nu.value == -1) {
      of = " of " + duty.chemistry.feed.species[static_cast<std::size_t>(nu.species)].name;
      break;
    }
  return (dH < 0 ? "releases " : "absorbs ") + figure + " per " + per + of;
}

std::string tell_target(const Duty& duty) {
  const Target& t = duty.target;
  std::string text = "wanted: ";
  if (t.conversion)
    text += "conversion of " + duty.conversion_of + " " + show(*t.conversion, Shown::percent) + " at least, ";
  for (const Demand& d : t.demands) {
    const std::string& name = duty.chemistry.feed.species[static_cast<std::size_t>(d.species)].name;
    const std::string side = d.at_least ? " at least, " : " at most, ";
    switch (d.on) {
      case Demand::On::yield:
        text += "yield of " + name + " " + show(d.bound, Shown::percent) + side;
        break;
      case Demand::On::selectivity:
        text += "selectivity to " + name + " " + show(d.bound, Shown::percent) + side;
        break;
      case Demand::On::concentration:
        text += name + " in the outlet " + show_concentration(duty.chemistry.feed, d.bound) + side;
        break;
      case Demand::On::fraction:
        text += "mole fraction of " + name + " in the outlet " + shortest(d.bound) + side;
        break;
    }
  }
  return text + "at a feed of " + show(t.feed_m3_s, Shown::feed);
}

std::string tell_operation(const Duty& duty) {
  switch (duty.thermal) {
    case Thermal::hold:
      return "every vessel is held at " + show(duty.hold_K, Shown::temperature) +
             (duty.operation_of.empty() ? "" : ", unless it has its own temperature");
    case Thermal::adiabatic:
      return "vessels are adiabatic";
    case Thermal::jacketed:
      return "vessels are cooled or heated by their jackets, held by nothing";
  }
  return {};
}

}  // namespace

std::vector<std::string> tell_site(const Site& site) {
  std::vector<std::string> told;
  for (const Utility& u : site.utilities) told.push_back(tell_utility(u));
  for (const Vessel& v : site.vessels) told.push_back(tell_vessel(v));
  return told;
}

std::vector<std::string> tell_duty(const Problems& problems) {
  const Duty& duty = problems.base.duty;
  std::vector<std::string> told{tell_feed(duty)};
  for (int j = 0; j < duty.chemistry.kinetics.reactions(); ++j) {
    const Reaction& r = duty.chemistry.kinetics.reaction(j);
    told.push_back("reaction " + r.name + (r.name == r.equation ? "" : ", " + r.equation) + ": " + tell_heat(duty, r) +
                   "; " + tell_rate(duty, j));
  }
  told.push_back(tell_operation(duty));
  told.push_back(tell_target(duty));
  for (const auto& [name, problem] : problems.cases)
    told.push_back("case " + name + ": " + tell_operation(problem.duty) + "; " + tell_feed(problem.duty));
  return told;
}

}  // namespace vatwright
