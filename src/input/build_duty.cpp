#include "build_duty.hpp"

#include <algorithm>
#include <cmath>

#include "build_feed.hpp"
#include "build_reaction.hpp"

namespace vatwright {
namespace {

bool continuous(const DutyDraft& d) {
  return !d.operation || !d.operation->mode.written || (d.operation->mode && *d.operation->mode == Mode::continuous);
}

/// Every fed or made species has a heat capacity, the feed states none, and no solvent is left unnamed.
bool heat_moves(const Feed& feed) {
  if (feed.heat_capacity_J_kg_K || feed.unnamed_solvent) return false;
  return std::all_of(feed.species.begin(), feed.species.end(),
                     [](const Species& s) { return s.heat_capacity.has_value(); });
}

std::optional<double> held_everywhere(const DutyDraft& d, const Feed& feed) {
  if (d.operation && d.operation->thermal && *d.operation->thermal != Thermal::hold) return std::nullopt;
  if (d.operation && d.operation->vessels && !d.operation->vessels->empty()) return std::nullopt;
  if (d.operation && d.operation->temperature) return *d.operation->temperature;
  return d.operation && d.operation->temperature.written ? std::nullopt : std::optional(feed.temperature_K);
}

void check_conversion_of(const DutyDraft& d, const std::vector<Reaction>& reactions, const Feed& feed,
                         const Builder& builder) {
  if (!d.conversion_of) return;
  const Scope scope = builder.about("duty");
  const int i = feed.index_of(*d.conversion_of);
  std::vector<std::string> reactants, known;
  bool consumed = false, made = false;
  for (const Species& s : feed.species) known.push_back(s.name);
  for (const Reaction& r : reactions)
    for (const SpeciesFigure& nu : r.nu) {
      const std::string& name = feed.species[static_cast<std::size_t>(nu.species)].name;
      if (nu.value < 0 && std::find(reactants.begin(), reactants.end(), name) == reactants.end())
        reactants.push_back(name);
      consumed = consumed || (nu.species == i && nu.value < 0);
      made = made || (nu.species == i && nu.value > 0);
    }
  if (i < 0)
    return scope.error(d.conversion_of.place, "conversion_of", "no species " + quoted(*d.conversion_of),
                       "expected a reactant; " + hint(*d.conversion_of, known));
  if (!consumed && !reactions.empty())
    return scope.error(d.conversion_of.place, "conversion_of",
                       *d.conversion_of + (made ? " is made, not consumed" : " is not consumed"),
                       reactants.empty() ? "expected an equation that consumes it"
                                         : "conversion is of a reactant: expected " + joined(reactants, "or"));
  const auto& c = feed.c_mol_m3;
  const bool fed = c[static_cast<std::size_t>(i)] > 0;
  const bool nothing_fed = std::all_of(c.begin(), c.end(), [](double x) { return x <= 0; });
  if (nothing_fed && builder.diagnostics->has_errors()) return;  // why the feed holds nothing has been told
  if (!fed && !reactions.empty())
    scope.error(d.conversion_of.place, "conversion_of", *d.conversion_of + " is not fed",
                "expected a reactant that is fed");
}

/// Figures each of a size that can be may make one that can not, such as a gas at 1e300 bar.
void check_finite(const DutyDraft& d, const Feed& feed, const Builder& builder) {
  bool finite = std::isfinite(feed.temperature_K) && std::isfinite(feed.pressure_Pa) &&
                std::isfinite(feed.density_kg_m3.value_or(0)) && std::isfinite(feed.heat_capacity_J_kg_K.value_or(0));
  for (const double c : feed.c_mol_m3) finite = finite && std::isfinite(c);
  if (!finite)
    builder.about("feed").error(d.feeds.place, "", "found a mixture with a figure beyond all size",
                                "expected concentrations, temperatures, pressures and rates that can be");
}

/// Batch and dosed are fed by charge and dose; what they lack is told, the rest is refused elsewhere.
void check_whole(const DutyDraft& d, const Builder& builder) {
  if (continuous(d)) {
    if (!d.feeds.written) builder.about("duty").error(d.place, "feed", "missing", "expected [feed], what arrives");
    return;
  }
  if (d.feeds.written)
    builder.about("feed").error(d.feeds.place, "", "found a feed in a duty that is not continuous",
                                "expected [charge]");
  if (!d.charge.written)
    builder.about("duty").error(d.place, "charge", "missing", "expected [charge], what goes in first");
  if (*d.operation->mode == Mode::dosed && !d.dose.written)
    builder.about("duty").error(d.place, "dose", "missing", "expected [dose], what is fed to the charge");
  if (d.target && d.target->feed_rate.written)
    builder.about("target").error(d.target->feed_rate.place, "feed_rate",
                                  "found a feed rate in a duty that is not continuous", "expected production, or none");
}

}  // namespace

Duty build_duty(const DutyDraft& draft, const Site& site, const std::string& folder, const Builder& builder) {
  Duty duty;
  duty.name = draft.name.value.value_or("");
  duty.conversion_of = draft.conversion_of.value.value_or("");
  check_whole(draft, builder);
  AmountReader amounts(draft.amounts.value.value_or(Amounts::moles), builder);
  if (amounts.amounts() == Amounts::mass && draft.phase && *draft.phase == Phase::gas)
    builder.about("duty").error(draft.amounts.place, "amounts", "found \"mass\" in a gas",
                                "expected \"moles\"; mass is for liquids");
  const auto equations = read_equations(draft, builder);
  BuiltFeed built = build_feed(draft, build_species(draft, equations, amounts, builder), amounts, builder);
  Chemistry& chemistry = duty.chemistry;
  chemistry.feed = built.feed;
  const Feed& feed = chemistry.feed;
  check_finite(draft, feed, builder);
  std::vector<Reaction> reactions;
  if (draft.feeds) {
    const ReactionContext context{
        feed, amounts, builder, duty.conversion_of, folder, heat_moves(feed), held_everywhere(draft, feed)};
    for (std::size_t j = 0; j < equations.size(); ++j)
      if (equations[j])
        if (auto r = build_reaction((*draft.reactions)[j], *equations[j], j, context))
          reactions.push_back(std::move(*r));
  }
  bool has_table = false;
  for (const Reaction& r : reactions) has_table = has_table || std::holds_alternative<RateTable>(r.forward);
  if (has_table && reactions.size() > 1)
    builder.about("duty").error(draft.reactions.place, "reaction",
                                "found a measured table of rates beside other reactions", "expected one reaction");
  if (reactions.size() == equations.size()) check_conversion_of(draft, reactions, feed, builder);
  const int of = feed.index_of(duty.conversion_of);
  std::vector<bool> fed;
  for (const double c : feed.c_mol_m3) fed.push_back(c > 0);
  chemistry.kinetics = Kinetics(std::move(reactions), static_cast<int>(feed.species.size()), of,
                                of < 0 ? 0.0 : feed.c_mol_m3[static_cast<std::size_t>(of)], std::move(fed));
  build_operation(draft, site, built.said_pressure, duty, builder);
  if (continuous(draft)) duty.target = build_target(draft, duty, built.sum_of_rates_m3_s, amounts, builder);
  return duty;
}

}  // namespace vatwright
