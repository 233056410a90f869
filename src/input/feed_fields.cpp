#include "duty_draft.hpp"
#include "measures.hpp"
#include "vatwright/field/kinds.hpp"
#include "vatwright/field/tables.hpp"

namespace vatwright {
namespace {

// Keys that a feed, a charge and a dose share.
template <class D>
Fields<D> material_fields() {
  return {
      figure<D>("temperature", measure::temperature, &D::temperature, "temperature", needed),
      raws_by_species<D>("concentration", "species and concentrations, `{ A = \"3.2 mol/L\" }`", &D::concentration,
                         "liquid: what is left up to the density is unnamed solvent"),
      figure<D>("density", {dim::density, above(0)}, &D::density, "liquid: density"),
      figure<D>("heat_capacity", {dim::heat_capacity, above(0)}, &D::heat_capacity,
                "of the mixture; or one for every species instead"),
      figure<D>("viscosity", {dim::viscosity, above(0)}, &D::viscosity, "viscosity, for the pressure drop of tubes",
                "no pressure drop is reckoned"),
  };
}

}  // namespace

const Fields<FeedDraft>& feed_fields() {
  using D = FeedDraft;
  static const Fields<D> fields = [] {
    Fields<D> list = material_fields<D>();
    list.insert(list.begin(), {text("name", "a text", &D::name, "[[feed]]: name of the stream"),
                               raw("feed_rate", "a flow, `\"5.2 m3/h\"`, kg/h, or of a gas kmol/h", &D::feed_rate,
                                   "[[feed]]: its share of the whole, needed where there are several")});
    list.push_back(figure("pressure", measure::pressure, &D::pressure, "pressure", "1.01325 bar"));
    list.push_back(figures_by_species("fraction", measure::fraction,
                                      "species and mole fractions, `{ A = 0.5, N2 = 0.5 }`", &D::fraction,
                                      "gas: must add to 1"));
    return list;
  }();
  return fields;
}

const Fields<FeedDraft>& charge_fields() {
  static const Fields<FeedDraft> fields = [] {
    Fields<FeedDraft> list = material_fields<FeedDraft>();
    list.push_back(figure("volume", measure::volume, &FeedDraft::volume, "how much goes in",
                          "as much as the most working fill allows"));
    return list;
  }();
  return fields;
}

const Fields<DoseDraft>& dose_fields() {
  using D = DoseDraft;
  static const Fields<D> fields = [] {
    Fields<D> list;
    for (const Field<FeedDraft>& f : charge_fields())
      list.push_back({f.key, f.form, f.key == "volume" ? "" : f.left_out, f.doc,
                      [&f](const Node& n, const Scope& s, D& d) { f.read(n, s, d); }});
    list.push_back(table("equivalents", &equivalents_fields, &D::equivalents, "in place of volume"));
    list.push_back(
        figure("time", {dim::time, above(0)}, &D::time, "how long it is fed", "the shortest that every limit allows"));
    return list;
  }();
  return fields;
}

const Fields<EquivalentsDraft>& equivalents_fields() {
  using D = EquivalentsDraft;
  static const Fields<D> fields{
      text("of", "a species", &D::of, "what the dose brings", needed),
      text("to", "a species", &D::to, "what the charge holds", needed),
      figure("ratio", {dim::none, above(0)}, &D::ratio, "moles of the one to moles of the other", needed),
  };
  return fields;
}

const Fields<CycleDraft>& cycle_fields() {
  using D = CycleDraft;
  static const Fields<D> fields{
      figure("charging", measure::time, &D::charging, "time to fill", "0"),
      figure("emptying", measure::time, &D::emptying, "time to empty", "0"),
      figure("cleaning", measure::time, &D::cleaning, "time to clean", "0"),
      figure("discharge_at", measure::temperature, &D::discharge_at, "cooled to this before emptying", "no cooling"),
  };
  return fields;
}

const Fields<SpeciesDraft>& species_fields() {
  using D = SpeciesDraft;
  static const Fields<D> fields{
      figure("molar_mass", {dim::molar_mass, above(0)}, &D::molar_mass, "molar mass"),
      table("antoine", &antoine_fields, &D::antoine, "vapour pressure, log10 p = A - B/(T + C)"),
      truth("solvent", &D::solvent, "liquid: this species fills up to the density, at most one", "false"),
      truth("volatile", &D::is_volatile, "false: a salt, no vapour pressure", "true"),
      raws("heat_capacity", "`\"177 J/mol/K\"`, or a polynomial in K, a list", &D::heat_capacity,
           "heat capacity, by moles or by mass"),
  };
  return fields;
}

const Fields<AntoineDraft>& antoine_fields() {
  using D = AntoineDraft;
  static const Fields<D> fields{
      figure("A", measure::number, &D::A, "A of the equation", needed),
      figure("B", measure::number, &D::B, "B of the equation", needed),
      figure("C", measure::number, &D::C, "C of the equation", needed),
      text("pressure", "a unit of pressure, `\"mmHg\"`", &D::pressure, "unit of p", needed),
      words<D, AntoineScale>("temperature", {{"K", AntoineScale::kelvin}, {"degC", AntoineScale::celsius}},
                             &D::temperature, "unit of T", needed),
  };
  return fields;
}

}  // namespace vatwright
