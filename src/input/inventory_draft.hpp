#pragma once
#include <cstdint>
#include <string>
#include <utility>
#include <vector>

#include "vatwright/field/field.hpp"
#include "vatwright/vessel/vessel.hpp"

namespace vatwright {

// The tables of an inventory as they are written, before what belongs together is judged together. Figures are SI.

struct SiteNameDraft : Common {
  Given<std::string> name;
};

struct UtilityDraft : Common {
  Given<double> supply, flow, total, density, heat_capacity;
  Given<bool> condensing;
};

struct JacketDraft : Common {
  Given<std::vector<std::string>> utilities;
  Given<double> area, U, fouling;
  Given<Passage> passage;
};

struct AgitatorDraft : Common {
  Given<double> power, speed;
};

struct PackingDraft : Common {
  Given<double> particle, voidage, bulk_density;
};

enum class Kind { stirred_tank, tube, packed_tube };

struct VesselDraft : Common {
  Given<std::string> tag, like;
  Given<Kind> kind;
  Given<Status> status;
  Given<double> volume, feed_line, bore, length, roughness, pressure_drop;
  Given<std::int64_t> tubes;
  Given<std::pair<double, double>> fill, pressure, temperature;
  Given<std::vector<std::string>> wetted;
  Given<JacketDraft> jacket;
  Given<AgitatorDraft> agitator;
  Given<PackingDraft> packing;
};

struct InventoryDraft : Common {
  Given<std::int64_t> format;
  Given<SiteNameDraft> site;
  Given<ByName<UtilityDraft>> utilities;
  Given<std::vector<VesselDraft>> vessels;
};

// The declarations of their keys.
const Fields<InventoryDraft>& inventory_fields();
const Fields<SiteNameDraft>& site_fields();
const Fields<UtilityDraft>& utility_fields();
const Fields<VesselDraft>& vessel_fields();
const Fields<JacketDraft>& jacket_fields();
const Fields<AgitatorDraft>& agitator_fields();
const Fields<PackingDraft>& packing_fields();

}  // namespace vatwright
