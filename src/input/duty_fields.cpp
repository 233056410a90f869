#include "duty_draft.hpp"
#include "measures.hpp"
#include "vatwright/field/kinds.hpp"
#include "vatwright/field/tables.hpp"

namespace vatwright {
namespace {

std::string named_subject(const char* what, const char* key, const Table& table, std::size_t number) {
  const Node* name = table.find(key);
  return std::string(what) + " " + (name && name->text() ? *name->text() : std::to_string(number + 1));
}
std::string reaction_subject(const Table& table, std::size_t number) {
  return named_subject("reaction", table.find("name") ? "name" : "equation", table, number);
}
std::string stream_subject(const Table& table, std::size_t number) {
  return named_subject("feed", "name", table, number);
}

/// `[feed]` or `[[feed]]`.
Field<DutyDraft> feed_field() {
  using D = DutyDraft;
  Field<D> streams = list_of_tables("feed", &feed_fields, &D::feeds, &stream_subject, false, "");
  auto read = [read_streams = streams.read](const Node& n, const Scope& s, D& d) {
    if (n.array()) return read_streams(n, s, d);
    d.one_feed = true;
    d.feeds = {std::nullopt, n.place, true};
    FeedDraft draft;
    if (read_table_node(feed_fields(), n, s.inside("feed", n.place), "", draft)) d.feeds.value = {draft};
  };
  return {"feed", "a table, or a list of tables: streams that meet before the first vessel", "",
          "the feed of a continuous duty; the rates of several streams give their proportions", read};
}

/// A table of the inventory that stands in a duty.
Field<DutyDraft> of_other_file(std::string key) {
  return {key, "", "", "", [key](const Node& n, const Scope& s, DutyDraft&) {
            s.error(n.place, key, "found a table of an inventory in a duty",
                    "expected it in the inventory, or in [case.NAME]");
          }};
}

/// `[case.NAME]` is applied to the files before they are read, see cases.hpp.
Field<DutyDraft> case_field() {
  return {"case", "a table for each name", "", "overrides of either file; the verdict is that of the worst case",
          [](const Node&, const Scope&, DutyDraft&) {}};
}

}  // namespace

const Fields<DutyDraft>& duty_fields() {
  using D = DutyDraft;
  static const Fields<D> fields{
      whole("format", 1, &D::format, "the format of the file: 1", needed),
      text("name", "a text", &D::name, "name of the duty"),
      words<D, Phase>("phase", {{"liquid", Phase::liquid}, {"gas", Phase::gas}}, &D::phase,
                      "liquid: constant density; gas: ideal gas", needed),
      text("conversion_of", "a species", &D::conversion_of, "the reactant that conversion counts", needed),
      words<D, Amounts>("amounts", {{"moles", Amounts::moles}, {"mass", Amounts::mass}}, &D::amounts,
                        "mass: species without a molar mass (effluent loads) count in kg, liquids only", "moles"),
      table("target", &target_fields, &D::target, "what is wanted", needed),
      feed_field(),
      tables_by_name("species", &species_fields, &D::species, "what is known of a species"),
      list_of_tables("reaction", &reaction_fields, &D::reactions, &reaction_subject, false, "the reactions", needed),
      table("operation", &operation_fields, &D::operation, "how vessels are run"),
      table("start", &start_fields, &D::start, "how a tank is brought on line; decides among steady states"),
      table("limits", &limits_fields, &D::limits, "limits of the product, besides those of the vessels"),
      table("charge", &charge_fields, &D::charge, "batch and dosed: what goes in first"),
      table("dose", &dose_fields, &D::dose, "dosed: what is fed to the charge"),
      table("cycle", &cycle_fields, &D::cycle, "batch and dosed: the rest of the vessel's day"),
      case_field(),
      of_other_file("vessel"),
      of_other_file("utility"),
      of_other_file("site"),
  };
  return fields;
}

const Fields<TargetDraft>& target_fields() {
  using D = TargetDraft;
  static const Fields<D> fields{
      figure("conversion", measure::fraction, &D::conversion, "at least, of conversion_of"),
      raw("feed_rate", "a flow, `\"2.4 m3/h\"`, kg/h, or of a gas kmol/h", &D::feed_rate,
          "total, at feed conditions; in place of production"),
      table("production", &production_fields, &D::production, "wanted of a product; in place of feed_rate"),
      table("yield", &share_fields, &D::yield, "a yield wanted"),
      table("selectivity", &share_fields, &D::selectivity, "a selectivity wanted"),
      list_of_tables(
          "outlet", &outlet_fields, &D::outlet,
          +[](const Table& t, std::size_t) {
            const Node* species = t.find("species");
            return "target, outlet " + (species && species->text() ? *species->text() : std::string("demand"));
          },
          true, "what the outlet may hold of a species, at least or at most"),
  };
  return fields;
}

const Fields<ProductionDraft>& production_fields() {
  using D = ProductionDraft;
  static const Fields<D> fields{
      text("species", "a species", &D::species, "what is made", needed),
      raw("amount", "mass or moles per time, `\"4200 t/year\"`", &D::amount, "how much of it", needed),
      figure("on_stream", {dim::none, inside(0, 1.0000001)}, &D::on_stream, "hours worked, `\"7600 h/year\"`",
             "8760 h/year"),
  };
  return fields;
}

const Fields<ShareDraft>& share_fields() {
  using D = ShareDraft;
  static const Fields<D> fields{
      text("species", "a species", &D::species, "of what", needed),
      figure("at_least", measure::fraction, &D::at_least, "the least that will do", needed),
  };
  return fields;
}

const Fields<OutletDraft>& outlet_fields() {
  using D = OutletDraft;
  const std::string form = "a concentration, `\"0.9 mol/L\"`; of a gas also a mole fraction";
  static const Fields<D> fields{
      text("species", "a species", &D::species, "of what", needed),
      raw("at_least", form, &D::at_least, "the least that will do"),
      raw("at_most", form, &D::at_most, "the most that will do"),
  };
  return fields;
}

const Fields<OperationDraft>& operation_fields() {
  using D = OperationDraft;
  static const Fields<D> fields = [] {
    Fields<D> list{words<D, Mode>("mode",
                                  {{"continuous", Mode::continuous}, {"batch", Mode::batch}, {"dosed", Mode::dosed}},
                                  &D::mode, "how the duty is worked", "continuous")};
    for (const Field<VesselOperationDraft>& f : vessel_operation_fields())
      list.push_back(
          {f.key, f.form, f.left_out, f.doc, [&f](const Node& n, const Scope& s, D& d) { f.read(n, s, d); }});
    list.push_back(
        tables_by_name("vessel", &vessel_operation_fields, &D::vessels, "the same keys for one vessel alone"));
    return list;
  }();
  return fields;
}

const Fields<VesselOperationDraft>& vessel_operation_fields() {
  using D = VesselOperationDraft;
  static const Fields<D> fields{
      words<D, Thermal>("thermal",
                        {{"hold", Thermal::hold}, {"adiabatic", Thermal::adiabatic}, {"jacketed", Thermal::jacketed}},
                        &D::thermal, "hold: every vessel is held at `temperature`", "hold"),
      figure("temperature", measure::temperature, &D::temperature, "for hold", "the feed's"),
      figure("pressure", measure::pressure, &D::pressure, "at the inlet of every first vessel", "the feed's"),
      figure("fill", measure::fill, &D::fill, "working fill of tanks, fraction of the volume", "the most working fill"),
      text("utility", "a utility", &D::utility, "the medium to take", "the one with the most margin"),
      figure("catalyst", {dim::density, at_least(0)}, &D::catalyst,
             "loading in stirred tanks, per working volume, for `per = \"catalyst\"`"),
  };
  return fields;
}

const Fields<StartDraft>& start_fields() {
  using D = StartDraft;
  using F = Start::Filled;
  static const Fields<D> fields{
      words<D, F>("filled_with", {{"feed", F::feed}, {"product", F::product}, {"solvent", F::solvent}}, &D::filled_with,
                  "product: fully converted feed; solvent: feed without reactants", "feed"),
      figure("temperature", measure::temperature, &D::temperature, "of what it is filled with", "the feed's"),
  };
  return fields;
}

const Fields<LimitsDraft>& limits_fields() {
  using D = LimitsDraft;
  static const Fields<D> fields{
      bounds("temperature", measure::temperature, "[\"0 degC\", \"110 degC\"]", &D::temperature, "never outside"),
      figure("decomposition", measure::temperature, &D::decomposition, "onset of decomposition"),
      texts("wetted", "a list, `[\"316L\", \"glass\"]`", &D::wetted, "what the product may touch"),
      text("boiling", "a temperature, forbid or ignore", &D::boiling,
           "boiling seen at operating pressure, or reckoned, or not asked",
           "forbid where every vapour pressure that it takes is given, else not asked"),
  };
  return fields;
}

}  // namespace vatwright
