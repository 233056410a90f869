#include "build_reaction.hpp"

#include <algorithm>
#include <cmath>

#include "build_rate_law.hpp"
#include "vatwright/quantity/show.hpp"

namespace vatwright {
namespace {

class ReactionMaker {
 public:
  ReactionMaker(const ReactionDraft& d, const Equation& e, std::size_t number, const ReactionContext& context)
      : d_(d), e_(e), context_(context), subject_("reaction " + name_of_reaction(d, number)) {
    reaction_.name = name_of_reaction(d, number);
  }

  std::optional<Reaction> make() {
    reaction_.equation = d_.equation.value.value_or("");
    for (const std::string& s : e_.species()) {
      reaction_.nu.push_back({index(s), e_.net(s)});
      if (e_.left_of(s) > 0) reaction_.left.push_back({index(s), e_.left_of(s)});
      if (e_.right_of(s) > 0) reaction_.right.push_back({index(s), e_.right_of(s)});
    }
    check_moles();
    read_heat();
    read_measured();
    const bool forward = read_forward();
    const bool backward = read_backward();
    return forward && backward ? std::optional(reaction_) : std::nullopt;
  }

 private:
  void error(Place at, const std::string& key, std::string found, std::string expected) const {
    context_.builder.about(subject_).error(at, key, std::move(found), std::move(expected));
  }
  int index(const std::string& name) const { return context_.feed.index_of(name); }

  void check_moles() const {
    if (context_.amounts.amounts() == Amounts::mass) return;
    double left = 0, right = 0;
    for (const std::string& s : e_.species()) {
      const auto M = context_.amounts.molar_mass(s);
      if (!M) return;
      left += e_.left_of(s) * *M, right += e_.right_of(s) * *M;
    }
    // molar masses are often rounded to 0.1 g/mol
    if (std::abs(left - right) <= 5e-3 * std::max(left, right)) return;
    const std::string off = shortest(std::round(std::abs(right - left) * 1e5) / 100) + " g/mol";
    error(d_.equation.place, "equation",
          "the right side is " + off + (right < left ? " lighter" : " heavier") + " than the left",
          "expected equal masses; a by-product forgotten?");
  }

  void read_heat() {
    const bool out = d_.releases.written, in = d_.absorbs.written;
    if (out && in) error(d_.absorbs.place, "absorbs", "found both releases and absorbs", "expected one of them");
    const Given<Raw>& given = out ? d_.releases : d_.absorbs;
    if (!given) return;
    const auto value = context_.amounts.read(*given, dim::molar_energy, "", subject_, out ? "releases" : "absorbs");
    if (!value) return;
    HeatOfReaction heat;
    heat.dH_J_mol = out ? -*value : *value;
    heat.at_K = d_.heat_at.value.value_or(298.15);
    if (context_.heat_moves) {
      heat.dCp = change_of_heat_capacity();
      if (!d_.heat_at.written)
        context_.builder.assume("reaction." + reaction_.name + ".heat_at", "25 degC", "left out");
    }
    if (context_.amounts.amounts() == Amounts::moles && std::abs(*value) > 1e6)
      context_.builder.about(subject_).warning(given.place, out ? "releases" : "absorbs",
                                               "found " + show(*value, Shown::molar_energy) + ", above 1000 kJ/mol",
                                               "J/mol or kJ/mol meant?");
    reaction_.heat = heat;
  }

  std::vector<double> change_of_heat_capacity() const {
    std::vector<double> dCp;
    for (const SpeciesFigure& nu : reaction_.nu) {
      const auto& a = context_.feed.species[static_cast<std::size_t>(nu.species)].heat_capacity->a;
      if (dCp.size() < a.size()) dCp.resize(a.size(), 0.0);
      for (std::size_t n = 0; n < a.size(); ++n) dCp[n] += nu.value * a[n];
    }
    return dCp;
  }

  void read_measured() {
    if (!d_.rate || !d_.rate->measured) return;
    const MeasuredDraft& m = *d_.rate->measured;
    Measured measured;
    const auto pair = [](const Given<Bounds>& b) {
      return b ? std::optional(std::pair{b->lo.value_or(b->hi), b->hi}) : std::nullopt;
    };
    measured.temperature_K = pair(m.temperature);
    measured.conversion = pair(m.conversion);
    measured.source = m.source.value.value_or("");
    reaction_.measured = measured;
  }

  bool read_forward() {
    if (!d_.rate) return false;
    const RateDraft& rate = *d_.rate;
    if (rate.conversion.written || rate.consumption.written || rate.table.written) {
      const auto table = build_rate_table(rate, subject_, context_);
      if (table) reaction_.forward = *table;
      return table.has_value();
    }
    const auto law = build_rate_law(rate, e_.left, e_, subject_, "rate.", context_);
    if (law) reaction_.forward = *law;
    return law.has_value();
  }

  bool read_backward() {
    const bool K = d_.equilibrium.written, back = d_.reverse.written;
    const Place at = K ? d_.equilibrium.place : d_.reverse.place;
    if (!e_.reversible && (K || back)) {
      error(at, K ? "equilibrium" : "reverse",
            std::string("found ") + (K ? "an equilibrium" : "a reverse rate") + " on a one-way equation",
            "expected \"<->\" in the equation, or none");
      return false;
    }
    if (!e_.reversible) return true;
    if (K == back) {
      error(K ? at : d_.place, K ? "reverse" : "equilibrium",
            K ? "found both an equilibrium and a reverse rate" : "missing on a reversible equation",
            K ? "expected one of them" : "expected [reaction.equilibrium] or [reaction.reverse]");
      return false;
    }
    if (K) return d_.equilibrium.value && read_equilibrium(*d_.equilibrium);
    if (!d_.reverse) return false;
    const auto law = build_rate_law(*d_.reverse, e_.right, e_, subject_, "reverse.", context_);
    if (law) reaction_.reverse = *law;
    return law.has_value();
  }

  bool read_equilibrium(const EquilibriumDraft& q) {
    if (!q.K) return false;
    const auto* law = std::get_if<RateLaw>(&reaction_.forward);
    const bool pressure = law && law->basis == Basis::pressure;
    double dn = 0;
    for (const SpeciesFigure& nu : reaction_.nu) dn += nu.value;
    const Dimension wanted = context_.amounts.dimension(pow(pressure ? dim::pressure : dim::concentration, dn));
    const auto fitted = fit(q.K->quantity, q.K->text, wanted);
    const auto* K = std::get_if<double>(&fitted);
    if (!K) {
      const auto& fault = std::get<QuantityFault>(fitted);
      error(q.K->place, "equilibrium.K", fault.found,
            wanted == dim::none ? "moles do not change: expected a bare number" : fault.expected);
      return false;
    }
    if (!(*K > 0)) return error(q.K->place, "equilibrium.K", "found " + q.K->text, "expected K above zero"), false;
    Equilibrium equilibrium;
    equilibrium.K = *K;
    equilibrium.at_K = q.at.value;
    equilibrium.heat = reaction_.heat;
    if (reaction_.heat && !q.at.written)
      error(q.place, "equilibrium.at", "missing",
            "expected the temperature at which K holds: it moves with the heat of reaction");
    if (!reaction_.heat)
      context_.builder.assume("reaction." + reaction_.name + ".equilibrium.K", "the same at any temperature",
                              "no heat of reaction is given");
    reaction_.equilibrium = equilibrium;
    return !law || check_orders(*law);
  }

  /// Ruling: an absent reactant whose order is below its coefficient would make the reverse rate infinite.
  bool check_orders(const RateLaw& law) const {
    const auto* power = std::get_if<PowerLaw>(&law.law);
    if (!power) return true;
    for (const SpeciesFigure& nu : reaction_.nu) {
      if (nu.value >= 0) continue;
      double order = 0;
      for (const SpeciesFigure& o : power->orders)
        if (o.species == nu.species) order += o.value;
      const auto i = static_cast<std::size_t>(nu.species);
      if (order >= -nu.value || context_.feed.c_mol_m3[i] > 0) continue;
      error(d_.rate.place, "rate.orders",
            "order " + shortest(order) + " of " + context_.feed.species[i].name +
                ", which is not fed, is below its coefficient " + shortest(-nu.value),
            "expected an order as large, or a reverse rate in place of the equilibrium");
      return false;
    }
    return true;
  }

  const ReactionDraft& d_;
  const Equation& e_;
  const ReactionContext& context_;
  std::string subject_;
  Reaction reaction_;
};

}  // namespace

std::string name_of_reaction(const ReactionDraft& draft, std::size_t number) {
  if (draft.name) return *draft.name;
  return draft.equation ? *draft.equation : std::to_string(number + 1);
}

std::vector<std::optional<Equation>> read_equations(const DutyDraft& draft, const Builder& builder) {
  std::vector<std::optional<Equation>> equations;
  if (!draft.reactions) return equations;
  for (std::size_t j = 0; j < draft.reactions->size(); ++j) {
    const ReactionDraft& d = (*draft.reactions)[j];
    equations.emplace_back();
    if (!d.equation) continue;
    auto parsed = parse_equation(*d.equation);
    if (auto* e = std::get_if<Equation>(&parsed))
      equations.back() = std::move(*e);
    else {
      const auto& fault = std::get<QuantityFault>(parsed);
      builder.about("reaction " + name_of_reaction(d, j))
          .error(d.equation.place, "equation", fault.found, fault.expected);
    }
  }
  return equations;
}

std::optional<Reaction> build_reaction(const ReactionDraft& draft, const Equation& equation, std::size_t number,
                                       const ReactionContext& context) {
  return ReactionMaker(draft, equation, number, context).make();
}

}  // namespace vatwright
