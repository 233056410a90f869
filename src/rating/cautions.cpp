#include <algorithm>
#include <cmath>

#include "vatwright/rating/rating.hpp"
#include "vatwright/thermal/adiabatic.hpp"

namespace vatwright {

namespace {
constexpr double atmosphere_Pa = 101325;
constexpr double rise_to_mind_K = 50, rise_to_fear_K = 200;  // customary marks, common practice, no source

bool heat_is_in_play(const Problem& problem) {
  return heat_knowledge(problem.duty.chemistry).state != HeatKnowledge::State::not_asked;
}

bool pressure_above_atmosphere(const Duty& duty) {
  const auto above = [](double P_Pa) { return P_Pa > atmosphere_Pa * (1 + 1e-6); };
  return above(duty.inlet_pressure_Pa) ||
         std::any_of(duty.operation_of.begin(), duty.operation_of.end(),
                     [&](const auto& own) { return own.second.pressure_Pa && above(*own.second.pressure_Pa); });
}

bool releases_heat(const Problem& problem) {
  const Kinetics& k = problem.duty.chemistry.kinetics;
  for (int j = 0; j < k.reactions(); ++j) {
    if (k.reaction(j).heat && k.reaction(j).heat->dH_J_mol < 0) return true;
  }
  return false;
}

std::optional<Caution> adiabatic_caution(const Problem& problem) {
  const Chemistry& chemistry = problem.duty.chemistry;
  const std::vector<double> none(static_cast<std::size_t>(chemistry.kinetics.reactions()), 0.0);
  const double T_K = chemistry.feed.temperature_K;
  const double rise = adiabatic_range(chemistry, none, T_K).warmest_K - T_K;
  if (rise <= rise_to_mind_K) return std::nullopt;
  std::string text = "Without cooling, complete reaction of the feed would warm it by " + show(rise, Shown::difference);
  text += rise > rise_to_fear_K
              ? ", more than 200 K: loss of cooling can bring boiling, decomposition and a rise of pressure; have the "
                "consequences worked out before any trial."
              : ", more than 50 K: what loss of cooling, stirring or dosing would do needs to be looked at.";
  return Caution{"adiabatic-rise", text};
}

/// "60 degC to 75 degC"
std::string range_text(std::pair<double, double> range, Shown shown) {
  return show(range.first, shown) + " to " + show(range.second, shown);
}

/// How far [low, high] runs out of `range`; empty: it does not.
std::string outside(double low, double high, std::pair<double, double> range, Shown shown, Shown distance) {
  std::string text;
  if (high > range.second) text = show(high, shown) + " here, " + show(high - range.second, distance) + " above";
  if (low < range.first) {
    if (!text.empty()) text += "; ";
    text += show(low, shown) + " here, " + show(range.first - low, distance) + " below";
  }
  return text;
}

void add_measured(std::vector<std::string>& texts, const Reaction& reaction, const VesselPlace& place,
                  const VesselOutcome& o) {
  const Measured& m = *reaction.measured;
  const std::string source = m.source.empty() ? "" : " (" + m.source + ")";
  if (m.temperature_K) {
    const auto out = outside(o.coldest_K, o.hottest_K, *m.temperature_K, Shown::temperature, Shown::difference);
    if (!out.empty()) {
      texts.push_back("the rate of " + reaction.name + " was measured at " +
                      range_text(*m.temperature_K, Shown::temperature) + source + ": " + out);
    }
  }
  if (m.conversion) {
    // a tank works at its outlet's conversion, a tube passes through all up to it
    const bool tank = std::holds_alternative<StirredTank>(place.vessel.kind);
    const double low = tank ? o.conversion : std::max(o.conversion, m.conversion->first);
    const auto out = outside(low, o.conversion, *m.conversion, Shown::number, Shown::number);
    if (!out.empty()) {
      texts.push_back("the rate of " + reaction.name + " was measured at conversions " +
                      range_text(*m.conversion, Shown::number) + source + ": " + out);
    }
  }
}
}  // namespace

std::vector<Caution> cautions_of(const Problem& problem) {
  std::vector<Caution> cautions;
  cautions.push_back(
      {"screening",
       "This is a screening by calculation, not a design and not a hazard review. Site rules, local codes "
       "and licensed engineers decide what may be done."});
  if (pressure_above_atmosphere(problem.duty) || heat_is_in_play(problem)) {
    cautions.push_back(
        {"pressure-relief",
         "Relief sizing, gas evolution and what a blocked outlet or a fire would do are not covered here."});
  }
  cautions.push_back({"old-vessel",
                      "The ratings are taken as the inventory states them. A vessel that has stood or served needs its "
                      "rating confirmed by inspection."});
  cautions.push_back({"materials",
                      "Corrosion, seals, coatings and the storing of mixtures are not covered; the lists of wetted "
                      "materials are compared by name only."});
  if (releases_heat(problem) && !problem.duty.limits.decomposition_K) {
    cautions.push_back(
        {"decomposition-not-asked",
         "Heat is released and no onset of decomposition is given, so decomposition is not covered at all: "
         "have it measured."});
  }
  if (auto rise = adiabatic_caution(problem)) cautions.push_back(*rise);
  return cautions;
}

namespace {
constexpr double glass_used = 0.8;     // of the step that a lining bears at once (a supplier's advice, from memory)
constexpr double peak_to_mind_K = 10;  // above what it then stays at (common practice, no source)

std::optional<Caution> driving_caution(const VesselOutcome& outcome) {
  if (!outcome.driving || outcome.driving->contents_K <= outcome.driving->most_K) return std::nullopt;
  return Caution{"driving-difference",
                 "The contents stand " + show(outcome.driving->contents_K, Shown::difference) +
                     " above what cools them; above R T^2/E, here " + show(outcome.driving->most_K, Shown::difference) +
                     ", heat made grows faster with temperature than heat removed: a small upset is not corrected by "
                     "itself, and a control loop must do it."};
}

std::optional<Caution> glass_caution(const std::vector<Limit>& limits) {
  const auto at =
      std::find_if(limits.begin(), limits.end(), [](const Limit& l) { return l.name == "glass temperature step"; });
  if (at == limits.end() || *at->value <= glass_used * *at->bound) return std::nullopt;
  return Caution{"glass-step", "Across the glass lining " + show(*at->value, Shown::difference) + " come at once, of " +
                                   show(*at->bound, Shown::difference) +
                                   " that it bears: warm up and cool down in steps, and ask its maker."};
}

std::optional<Caution> peak_caution(const VesselOutcome& outcome) {
  if (!outcome.start_peak_K || *outcome.start_peak_K <= outcome.hottest_K + peak_to_mind_K) return std::nullopt;
  return Caution{"start-peak", "While it comes on line it passes " + show(*outcome.start_peak_K, Shown::temperature) +
                                   ", " + show(*outcome.start_peak_K - outcome.hottest_K, Shown::difference) +
                                   " above what it then stays at."};
}

std::optional<Caution> measured_caution(const VesselPlace& place, const VesselOutcome& outcome) {
  std::vector<std::string> texts;
  const Kinetics& k = place.problem.duty.chemistry.kinetics;
  for (int j = 0; j < k.reactions(); ++j) {
    if (k.reaction(j).measured) add_measured(texts, k.reaction(j), place, outcome);
  }
  if (texts.empty()) return std::nullopt;
  std::string text = "Beyond what was measured: ";
  for (std::size_t i = 0; i < texts.size(); ++i) text += (i == 0 ? "" : "; ") + texts[i];
  return Caution{"beyond-measured", text + "."};
}
}  // namespace

std::vector<Caution> cautions_of(const VesselPlace& place, const VesselOutcome& outcome,
                                 const std::vector<Limit>& limits) {
  std::vector<Caution> cautions;
  for (const auto& caution :
       {driving_caution(outcome), glass_caution(limits), measured_caution(place, outcome), peak_caution(outcome)})
    if (caution) cautions.push_back(*caution);
  return cautions;
}

namespace {
constexpr double near = 0.05;          // of the feed rate
constexpr double worth_a_look = 0.02;  // conversion: less than this is no jump that matters
constexpr double jump_width = 1e-5;    // relative: a change that does not shrink down to here is a jump

/// Whether the change of conversion between two rates sits at one point: the half with more of it is kept.
std::optional<double> jump_between(const std::function<std::optional<double>(double)>& conversion_at, double a,
                                   double X_a, double b, double X_b) {
  while (std::abs(b - a) > jump_width * std::max(a, b)) {
    if (std::abs(X_b - X_a) <= worth_a_look) return std::nullopt;
    const double c = a + (b - a) / 2;
    const auto X_c = conversion_at(c);
    if (!X_c) return std::nullopt;
    if (std::abs(*X_c - X_a) > std::abs(X_b - *X_c)) {
      b = c, X_b = *X_c;
    } else {
      a = c, X_a = *X_c;
    }
  }
  return std::abs(X_b - X_a) > worth_a_look ? std::optional(b) : std::nullopt;
}
}  // namespace

std::optional<Caution> caution_window_at_fold(const Windows& windows) {
  if (windows.jumps_m3_s.empty()) return std::nullopt;
  std::string text = "The window ends where the state that the start reaches jumps, at ";
  for (std::size_t i = 0; i < windows.jumps_m3_s.size(); ++i)
    text += (i == 0 ? "" : " and ") + show(windows.jumps_m3_s[i], Shown::feed);
  return Caution{"near-fold", text + ": a little beyond, the vessel does something else altogether."};
}

std::optional<Caution> caution_near_fold(const std::function<std::optional<double>(double feed_m3_s)>& conversion_at,
                                         double feed_m3_s) {
  const auto X = conversion_at(feed_m3_s);
  if (!X) return std::nullopt;
  for (const double other : {feed_m3_s * (1 + near), feed_m3_s * (1 - near)}) {
    const auto X_other = conversion_at(other);
    if (!X_other || std::abs(*X_other - *X) <= worth_a_look) continue;
    if (const auto at = jump_between(conversion_at, feed_m3_s, *X, other, *X_other)) {
      return Caution{"near-fold", "The state that the start reaches jumps at " + show(*at, Shown::feed) + ", " +
                                      show(std::abs(*at / feed_m3_s - 1), Shown::percent) +
                                      " from the feed rate asked: conversion " + show(*X, Shown::number) + " here, " +
                                      show(*X_other, Shown::number) + " at " + show(other, Shown::feed) + "."};
    }
  }
  return std::nullopt;
}

}  // namespace vatwright
