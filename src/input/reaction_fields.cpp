#include "duty_draft.hpp"
#include "measures.hpp"
#include "vatwright/field/kinds.hpp"
#include "vatwright/field/tables.hpp"

namespace vatwright {
namespace {

/// A usual wrong name, with what to write instead.
template <class D>
Field<D> instead(std::string key, std::string what) {
  return {key, "", "", "",
          [key, what](const Node& n, const Scope& s, D&) { s.error(n.place, key, found_text(n), what); }};
}

}  // namespace

const Fields<ReactionDraft>& reaction_fields() {
  using D = ReactionDraft;
  static const Fields<D> fields{
      text("name", "a text", &D::name, "how it is called", "its equation"),
      text("equation", "`\"2 A + B -> C\"`", &D::equation,
           "'->' one way, '<->' reversible; coefficients with a space: \"2 A + B\"", needed),
      raw("releases", "heat per mole, `\"62 kJ/mol\"`", &D::releases,
          "heat given off per mole of the equation as written"),
      raw("absorbs", "heat per mole, `\"62 kJ/mol\"`", &D::absorbs, "heat taken up, in place of releases"),
      figure("heat_at", measure::temperature, &D::heat_at, "temperature at which that heat holds", "25 degC"),
      table("rate", &rate_fields, &D::rate, "the rate", needed),
      table("reverse", &rate_fields, &D::reverse, "'<->': the rate backwards"),
      table("equilibrium", &equilibrium_fields, &D::equilibrium, "'<->': the equilibrium, in place of reverse"),
      instead<D>("heat", "expected releases = \"18 kJ/mol\" or absorbs = \"18 kJ/mol\""),
  };
  return fields;
}

const Fields<RateDraft>& rate_fields() {
  using D = RateDraft;
  static const Fields<D> fields{
      raw("k", "a rate constant, `\"0.042 L/mol/min\"`; its unit must fit orders, basis and per", &D::k,
          "k times the product of concentrations to their orders"),
      text("of", "reaction, or a species", &D::of,
           "whose rate the constant gives; needed where a reactant's coefficient is not 1", "reaction"),
      figure("at", measure::temperature, &D::at, "temperature at which the constant holds"),
      raw("activation_energy", "energy per mole, `\"58 kJ/mol\"`", &D::activation_energy,
          "how the constant moves with temperature", "it does not move"),
      figure("theta", {dim::none, above(0)}, &D::theta, "in place of activation_energy: k times theta^(T - at)"),
      figures_by_species("orders", measure::number, "species and orders, `{ A = 1, B = 1 }`", &D::orders,
                         "orders of reaction", "1 each, where every reactant's coefficient is 1"),
      words<D, Basis>("basis", {{"concentration", Basis::concentration}, {"pressure", Basis::pressure}}, &D::basis,
                      "pressure: partial pressures, gas only", "concentration"),
      words<D, Per>("per", {{"fluid", Per::fluid}, {"bed", Per::bed}, {"catalyst", Per::catalyst}}, &D::per,
                    "what the rate counts on; a packed tube needs it said", "fluid in tanks and tubes"),
      raws_by_species("adsorption", "species and constants, `{ A = \"0.35 L/mol\" }`", &D::adsorption,
                      "the rate is divided by (1 + sum K_i C_i)^adsorption_power"),
      figure("adsorption_power", {dim::none, above(0)}, &D::adsorption_power, "see adsorption", "1"),
      raw("most", "a rate, `\"6 mg/L/h\"`", &D::most, "in place of k: most times the product of C/(half + C)"),
      raws_by_species("half", "species and concentrations, `{ S = \"60 mg/L\" }`", &D::half,
                      "with most: where a species halves the rate"),
      table("measured", &measured_fields, &D::measured, "the range in which it was measured"),
      figures("conversion", measure::fraction, &D::conversion, "a measured table: conversions, rising"),
      raws("consumption", "a list of rates, `[\"9.1 mol/m3/min\", ..]`", &D::consumption,
           "a measured table: consumption of conversion_of at these conversions"),
      text("table", "a CSV file beside the duty", &D::table,
           "in place of conversion and consumption; its header: `conversion,consumption [mol/m3/min]`"),
  };
  return fields;
}

const Fields<MeasuredDraft>& measured_fields() {
  using D = MeasuredDraft;
  static const Fields<D> fields{
      bounds("temperature", measure::temperature, "[\"50 degC\", \"75 degC\"]", &D::temperature,
             "range of temperature"),
      bounds("conversion", measure::fraction, "[0.0, 0.9]", &D::conversion, "range of conversion"),
  };
  return fields;
}

const Fields<EquilibriumDraft>& equilibrium_fields() {
  using D = EquilibriumDraft;
  static const Fields<D> fields{
      raw("K", "a number, with a unit where moles change", &D::K, "in concentrations, or in pressures with that basis",
          needed),
      figure("at", measure::temperature, &D::at, "temperature at which it holds"),
  };
  return fields;
}

}  // namespace vatwright
