#include "inventory_draft.hpp"
#include "vatwright/field/kinds.hpp"
#include "vatwright/field/tables.hpp"

namespace vatwright {
namespace {

constexpr Measure absolute_temperature{dim::temperature, above(0), Sense::temperature};

std::string vessel_subject(const Table& table, std::size_t number) {
  const Node* tag = table.find("tag");
  return tag && tag->text() && !tag->text()->empty() ? *tag->text() : "vessel " + std::to_string(number + 1);
}

}  // namespace

const Fields<InventoryDraft>& inventory_fields() {
  using D = InventoryDraft;
  static const Fields<D> fields{
      whole("format", 1, &D::format, "the format of the file: 1", needed),
      table("site", &site_fields, &D::site, "the site"),
      tables_by_name("utility", &utility_fields, &D::utilities, "heating and cooling media, each under its name"),
      list_of_tables("vessel", &vessel_fields, &D::vessels, &vessel_subject, false, "the vessels", needed),
  };
  return fields;
}

const Fields<SiteNameDraft>& site_fields() {
  static const Fields<SiteNameDraft> fields{text("name", "a text", &SiteNameDraft::name, "name of the site")};
  return fields;
}

const Fields<UtilityDraft>& utility_fields() {
  using D = UtilityDraft;
  static const Fields<D> fields{
      figure("supply", absolute_temperature, &D::supply, "temperature at which it arrives", needed),
      figure("flow", {dim::volume_flow, above(0)}, &D::flow, "the most that one vessel can draw", "no limit"),
      figure("total", {dim::volume_flow, above(0)}, &D::total,
             "the most that all vessels of a hookup can draw together", "no limit"),
      figure("density", {dim::density, above(0)}, &D::density, "density", "water, 997 kg/m3"),
      figure("heat_capacity", {dim::heat_capacity, above(0)}, &D::heat_capacity, "heat capacity by mass",
             "water, 4.181 kJ/kg/K"),
      truth("condensing", &D::condensing, "it stays at its supply temperature whatever is drawn", "false"),
  };
  return fields;
}

const Fields<VesselDraft>& vessel_fields() {
  using D = VesselDraft;
  static const Fields<D> fields{
      text("tag", "a text without spaces", &D::tag, "plant tag, each once", needed),
      text("like", "the tag of another vessel", &D::like,
           "all keys of that vessel, deeply, then those given here; tag, note and source are not taken over"),
      words<D, Kind>("kind",
                     {{"stirred-tank", Kind::stirred_tank}, {"tube", Kind::tube}, {"packed-tube", Kind::packed_tube}},
                     &D::kind, "what it is", needed),
      words<D, Status>("status",
                       {{"idle", Status::idle}, {"in-service", Status::in_service}, {"mothballed", Status::mothballed}},
                       &D::status, "only idle vessels are offered unless asked otherwise", "idle"),
      figure("volume", {dim::volume, above(0)}, &D::volume, "stirred-tank: brimful volume"),
      pair_of("fill", {dim::none, between(0, 1)}, "least and most working fill, fractions of the volume",
              "[0.30, 0.85]", &D::fill, "stirred-tank: least and most working fill", "[0, 1]"),
      pair_of("pressure", {dim::pressure, at_least(0), Sense::plain, true}, "a design range, least and most",
              "[\"-1 barg\", \"6 barg\"]", &D::pressure, "design range"),
      pair_of("temperature", absolute_temperature, "a design range, least and most", "[\"-20 degC\", \"180 degC\"]",
              &D::temperature, "design range"),
      texts("wetted", "a list, `[\"316L\"]`", &D::wetted, "wetted materials; each must be on the product's list"),
      figure("feed_line", {dim::volume_flow, above(0)}, &D::feed_line,
             "the most that nozzle, pump and outlet pass, at feed conditions"),
      figure("bore", {dim::length, above(0)}, &D::bore, "tubes: inside diameter of one tube"),
      figure("length", {dim::length, above(0)}, &D::length, "tubes: length of one tube"),
      whole("tubes", 1, &D::tubes, "tubes: how many stand side by side", "1"),
      figure("roughness", {dim::length, at_least(0)}, &D::roughness, "tube: roughness of the wall", "smooth"),
      figure("pressure_drop", {dim::pressure, above(0)}, &D::pressure_drop, "tubes: the most that may be spent here"),
      table("jacket", &jacket_fields, &D::jacket, "the jacket"),
      table("agitator", &agitator_fields, &D::agitator, "stirred-tank: the agitator"),
      table("packing", &packing_fields, &D::packing, "packed-tube: the packing, needed there"),
  };
  return fields;
}

const Fields<JacketDraft>& jacket_fields() {
  using D = JacketDraft;
  static const Fields<D> fields{
      texts("utilities", "a list of utilities, `[\"tower-water\"]`", &D::utilities,
            "media that can be put on, the first is the usual one", needed),
      figure("area", {dim::area, above(0)}, &D::area,
             "stirred-tank: wetted at the most working fill; in proportion to the fill below that"),
      figure("U", {dim::heat_transfer, at_least(0)}, &D::U,
             "overall heat transfer coefficient, of a tube on its inside", needed),
      figure("fouling", {dim::fouling, at_least(0)}, &D::fouling, "resistance in series with U", "0"),
      words<D, Passage>("passage",
                        {{"uniform", Passage::uniform},
                         {"co-current", Passage::co_current},
                         {"counter-current", Passage::counter_current}},
                        &D::passage, "tubes: how the medium passes", "uniform"),
  };
  return fields;
}

const Fields<AgitatorDraft>& agitator_fields() {
  using D = AgitatorDraft;
  static const Fields<D> fields{
      figure("power", {dim::power, at_least(0)}, &D::power, "drawn in service; counts in the heat balance", "0"),
      figure("speed", {dim::frequency, above(0)}, &D::speed, "speed of the shaft, as rpm; only checked"),
  };
  return fields;
}

const Fields<PackingDraft>& packing_fields() {
  using D = PackingDraft;
  static const Fields<D> fields{
      figure("particle", {dim::length, above(0)}, &D::particle, "equivalent diameter", needed),
      figure("voidage", {dim::none, inside(0, 1)}, &D::voidage, "share of the bed that is void", needed),
      figure("bulk_density", {dim::density, above(0)}, &D::bulk_density, "catalyst mass per bed volume", needed),
  };
  return fields;
}

}  // namespace vatwright
