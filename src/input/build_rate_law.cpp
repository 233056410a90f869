#include "build_rate_law.hpp"

#include <cmath>
#include <tuple>

#include "vatwright/quantity/show.hpp"

namespace vatwright {
namespace {

std::vector<std::string> names_of(const Feed& feed) {
  std::vector<std::string> names;
  for (const Species& s : feed.species) names.push_back(s.name);
  return names;
}

class LawMaker {
 public:
  LawMaker(const RateDraft& d, const std::vector<Term>& consumed, const Equation& equation, const std::string& subject,
           const std::string& table, const ReactionContext& context)
      : d_(d), consumed_(consumed), equation_(equation), subject_(subject), table_(table), context_(context) {}

  std::optional<RateLaw> make() {
    RateLaw law;
    law.basis = d_.basis.value.value_or(Basis::concentration);
    law.per = d_.per.value.value_or(Per::unsaid);
    law.adsorption_power = d_.adsorption_power.value.value_or(1);
    if (law.basis == Basis::pressure && context_.feed.phase == Phase::liquid)
      error(d_.basis.place, "basis", "found \"pressure\" in a liquid",
            "expected \"concentration\"; partial pressures are for gases");
    for (const auto& [written, place, key] : {std::tuple{d_.conversion.written, d_.conversion.place, "conversion"},
                                              std::tuple{d_.consumption.written, d_.consumption.place, "consumption"},
                                              std::tuple{d_.table.written, d_.table.place, "table"}})
      if (written) error(place, key, "found a measured table in a reverse rate", "expected k, as in [reaction.rate]");
    const bool known_of = read_of(law);
    read_adsorption(law);
    const bool has_k = d_.k.written, has_most = d_.most.written;
    if (has_k == has_most) {
      error(has_k ? d_.most.place : d_.place, has_k ? "most" : "k", has_k ? "found both k and most" : "missing",
            "expected k, or most with half");
      return std::nullopt;
    }
    const auto body = has_k ? make_power_law(law) : make_saturating();
    if (!body || !known_of) return std::nullopt;
    law.law = *body;
    return law;
  }

 private:
  void error(Place at, const std::string& key, std::string found, std::string expected) const {
    context_.builder.about(subject_).error(at, table_ + key, std::move(found), std::move(expected));
  }
  int index(const std::string& name) const { return context_.feed.index_of(name); }

  /// Of whom the constant gives the rate.
  bool read_of(RateLaw& law) {
    if (d_.of && *d_.of != "reaction") {
      const double nu = equation_.net(*d_.of);
      if (index(*d_.of) < 0 || (equation_.left_of(*d_.of) == 0 && equation_.right_of(*d_.of) == 0)) {
        std::vector<std::string> known = equation_.species();
        known.push_back("reaction");
        error(d_.of.place, "of", "found " + quoted(*d_.of) + ", not in the equation",
              "expected reaction, or a species of the equation; " + hint(*d_.of, known));
        return false;
      }
      if (nu == 0) {
        error(d_.of.place, "of", "found " + quoted(*d_.of) + ", which this reaction neither makes nor consumes",
              "expected another species, or reaction");
        return false;
      }
      law.of_coefficient = std::abs(nu);
      species_of_ = *d_.of;
      return true;
    }
    if (d_.of.written) return d_.of.value.has_value();
    for (const Term& t : consumed_)
      if (t.coefficient != 1) {
        error(d_.place, "of", "missing where " + t.species + " stands with " + shortest(t.coefficient),
              "expected of = \"reaction\" or of = \"" + t.species + "\": whose rate k gives");
        return false;
      }
    return true;
  }

  std::optional<std::vector<SpeciesFigure>> read_orders() {
    std::vector<SpeciesFigure> orders;
    if (d_.orders.written) {
      if (!d_.orders) return std::nullopt;
      bool good = true;
      for (const auto& o : *d_.orders) {
        if (index(o.name) >= 0)
          orders.push_back({index(o.name), o.value});
        else
          good = false, error(o.name_place, "orders." + o.name, "no species " + quoted(o.name),
                              "expected one that is fed or made; " + hint(o.name, names_of(context_.feed)));
      }
      return good ? std::optional(orders) : std::nullopt;
    }
    const bool reverse = table_ == "reverse.";
    for (const Term& t : consumed_) {
      if (t.coefficient != 1 && !reverse) {
        error(d_.place, "orders", "missing where " + t.species + " stands with " + shortest(t.coefficient),
              "expected the orders, such as { " + t.species + " = " + shortest(t.coefficient) + " }");
        return std::nullopt;
      }
      orders.push_back({index(t.species), t.coefficient});
    }
    return orders;
  }

  Dimension rate_dimension() const {
    const Per per = d_.per.value.value_or(Per::unsaid);
    return dim::amount / (per == Per::catalyst ? dim::mass : dim::volume) / dim::time;
  }

  std::optional<std::variant<PowerLaw, Saturating>> make_power_law(const RateLaw& law) {
    PowerLaw power;
    if (d_.half.written) error(d_.half.place, "half", "found half beside k", "expected it with most");
    const auto orders = read_orders();
    if (!orders) return read_constant_alone(), std::nullopt;
    power.orders = *orders;
    double n = 0;
    for (const SpeciesFigure& o : *orders) n += o.value;
    const Dimension per_order = law.basis == Basis::pressure ? dim::pressure : dim::concentration;
    const auto k = read_constant(d_.k, "k", rate_dimension() / pow(per_order, n), "overall order " + shortest(n));
    if (!k) return std::nullopt;
    power.k = *k;
    return power;
  }

  std::optional<std::variant<PowerLaw, Saturating>> make_saturating() {
    Saturating s;
    if (d_.orders.written) error(d_.orders.place, "orders", "found orders beside most", "expected them with k only");
    if (d_.basis.written) error(d_.basis.place, "basis", "found basis beside most", "expected it with k only");
    if (!d_.half.written)
      error(d_.place, "half", "missing",
            "expected with most the concentrations that halve the rate, { S = \"60 mg/L\" }");
    bool good = d_.half.value.has_value();
    if (d_.half)
      for (const auto& h : *d_.half) {
        const int i = index(h.name);
        const auto value =
            context_.amounts.read(h.value, dim::concentration, h.name, subject_, table_ + "half." + h.name);
        if (i < 0)
          error(h.name_place, "half." + h.name, "no species " + quoted(h.name),
                "expected one that is fed or made; " + hint(h.name, names_of(context_.feed)));
        else if (value && !(*value > 0))
          error(h.place, "half." + h.name, "found " + quoted(h.value.text), "expected a concentration above zero");
        else if (value)
          s.half.push_back({i, *value});
        good = good && i >= 0 && value && *value > 0;
      }
    const auto most = read_constant(d_.most, "most", rate_dimension(), "a greatest rate");
    if (!good || !most) return std::nullopt;
    s.most = *most;
    return s;
  }

  void read_constant_alone() { (void)read_moves(); }

  std::optional<RateConstant> read_constant(const Given<Raw>& given, const std::string& key, Dimension dimension,
                                            const std::string& what) {
    auto constant = read_moves();
    if (!given) return std::nullopt;
    const Raw& raw = *given;
    std::optional<double> value;
    const Dimension wanted = context_.amounts.dimension(dimension);
    // a rate by mass is the rate of the species that the constant is of, else of the only reactant
    const std::string by = !species_of_.empty() || consumed_.size() != 1 ? species_of_ : consumed_[0].species;
    const bool by_mass = key == "most" && !by.empty() && (species_of_.empty() ? !d_.of.written : true) &&
                         mass_for_moles(raw.quantity.dimension, wanted).value_or(0) == 1;
    if (raw.quantity.dimension == wanted || by_mass)
      value = context_.amounts.read(raw, dimension, by_mass ? by : species_of_, subject_, table_ + key);
    else {
      const auto fault = std::get<QuantityFault>(fit(raw.quantity, raw.text, wanted));
      error(raw.place, key, fault.found,
            "expected for " + what + per_words() + " a unit such as \"" + unit_like(wanted) + "\"");
    }
    if (value && *value < 0) {
      error(raw.place, key, "found " + quoted(raw.text),
            "expected zero or more; a reverse reaction is written with \"<->\"");
      return std::nullopt;
    }
    if (!constant || !value) return std::nullopt;
    constant->k = *value;
    return constant;
  }

  std::string per_words() const { return d_.per && *d_.per == Per::catalyst ? " per catalyst mass" : std::string(); }
  static std::string unit_like(Dimension d) {
    const std::string example = example_of(d);
    const auto space = example.find(' ');
    return space == std::string::npos ? example : example.substr(space + 1);
  }

  /// How the constant moves with temperature.
  std::optional<RateConstant> read_moves() {
    RateConstant c;
    c.at_K = d_.at.value;
    if (d_.theta.written && d_.activation_energy.written) {
      error(d_.theta.place, "theta", "found both theta and activation_energy", "expected one of them");
      return std::nullopt;
    }
    if (d_.theta) c.moves = RateConstant::Moves::theta, c.theta = *d_.theta;
    if (d_.activation_energy) {
      const auto E = fit(d_.activation_energy->quantity, d_.activation_energy->text, dim::molar_energy);
      if (const auto* value = std::get_if<double>(&E)) {
        c.moves = RateConstant::Moves::arrhenius, c.activation_J_mol = *value;
        warn_of_energy(*value);
      } else {
        const auto& fault = std::get<QuantityFault>(E);
        const bool per_mole = d_.activation_energy->quantity.dimension == dim::energy;
        error(d_.activation_energy->place, "activation_energy", fault.found,
              per_mole ? "expected an energy per mole: \"" + d_.activation_energy->text + "/mol\"" : fault.expected);
        return std::nullopt;
      }
    }
    if (c.moves != RateConstant::Moves::not_at_all && !d_.at.written) {
      error(d_.place, "at", "missing", "expected the temperature at which the constant holds, such as \"60 degC\"");
      return std::nullopt;
    }
    if (d_.at && c.moves == RateConstant::Moves::not_at_all && !d_.theta.written && !d_.activation_energy.written &&
        context_.held_K && std::abs(*context_.held_K - *d_.at) > 1e-6)
      error(d_.at.place, "at",
            "found a constant at " + show(*d_.at, Shown::temperature) + " that would be used at " +
                show(*context_.held_K, Shown::temperature) + " unchanged",
            "expected activation_energy or theta, or operation.temperature = \"" + show(*d_.at, Shown::temperature) +
                "\"");
    return c;
  }

  /// Usual range of activation energies: 20 to 300 kJ/mol. Common practice, no source.
  void warn_of_energy(double J_mol) const {
    if ((J_mol >= 20e3 && J_mol <= 300e3) || J_mol == 0) return;
    const bool kilo = J_mol * 1000 >= 20e3 && J_mol * 1000 <= 300e3;
    context_.builder.about(subject_).warning(
        d_.activation_energy->place, table_ + "activation_energy",
        "found " + show(J_mol, Shown::molar_energy) + (J_mol < 20e3 ? ", below 20 kJ/mol" : ", above 300 kJ/mol"),
        kilo ? "kJ/mol meant?" : "");
  }

  void read_adsorption(RateLaw& law) {
    if (!d_.adsorption) {
      if (d_.adsorption_power.written && !d_.adsorption.written)
        error(d_.adsorption_power.place, "adsorption_power", "found a power without adsorption",
              "expected adsorption = { A = \"0.35 L/mol\" }");
      return;
    }
    const Dimension inverse = dim::none / (law.basis == Basis::pressure ? dim::pressure : dim::concentration);
    for (const auto& a : *d_.adsorption) {
      const int i = index(a.name);
      if (i < 0) {
        error(a.name_place, "adsorption." + a.name, "no species " + quoted(a.name),
              "expected one that is fed or made; " + hint(a.name, names_of(context_.feed)));
        continue;
      }
      const auto value = context_.amounts.read(a.value, inverse, a.name, subject_, table_ + "adsorption." + a.name);
      if (value && *value < 0)
        error(a.place, "adsorption." + a.name, "found " + quoted(a.value.text), "expected zero or more");
      else if (value)
        law.adsorption.push_back({i, *value});
    }
  }

  const RateDraft& d_;
  const std::vector<Term>& consumed_;
  const Equation& equation_;
  const std::string& subject_;
  const std::string& table_;
  const ReactionContext& context_;
  std::string species_of_;
};

}  // namespace

std::optional<RateLaw> build_rate_law(const RateDraft& draft, const std::vector<Term>& consumed,
                                      const Equation& equation, const std::string& subject, const std::string& table,
                                      const ReactionContext& context) {
  return LawMaker(draft, consumed, equation, subject, table, context).make();
}

}  // namespace vatwright
