#include "site.hpp"

#include <map>

namespace vatwright {
namespace {

Utility build_utility(const Named<UtilityDraft>& named, const Builder& builder) {
  const UtilityDraft& d = named.value;
  Utility utility;
  utility.name = named.name;
  utility.supply_K = d.supply.value.value_or(298.15);
  utility.flow_m3_s = d.flow.value;
  utility.total_m3_s = d.total.value;
  utility.condensing = d.condensing.value.value_or(false);
  if (d.density) utility.density_kg_m3 = *d.density;
  if (d.heat_capacity) utility.heat_capacity_J_kg_K = *d.heat_capacity;
  // a condensing medium gives its heat at one temperature: neither figure is used
  const std::string key = "utility." + named.name;
  if (!d.density.written && !utility.condensing) builder.assume(key + ".density", "997 kg/m3", "left out: water");
  if (!d.heat_capacity.written && !utility.condensing)
    builder.assume(key + ".heat_capacity", "4.181 kJ/kg/K", "left out: water");
  return utility;
}

void check_tags(const std::vector<VesselDraft>& drafts, const Builder& builder) {
  std::map<std::string, Place> seen;
  for (const VesselDraft& d : drafts) {
    if (!d.tag) continue;
    const auto [first, fresh] = seen.try_emplace(*d.tag, d.tag.place);
    if (!fresh)
      builder.about(*d.tag).error(
          d.tag.place, "tag",
          "tag " + quoted(*d.tag) + " is already used at line " + std::to_string(first->second.line),
          "expected each tag once");
    if (const std::string fault = fault_of_tag(*d.tag); !fault.empty())
      builder.about(*d.tag).error(d.tag.place, "tag", fault, "expected another tag");
  }
}

}  // namespace

std::string fault_of_tag(const std::string& tag) {
  if (tag.empty()) return "found an empty tag";
  if (tag == "then" || tag == "beside") return "found " + quoted(tag) + ", the word that joins vessels in a hookup";
  for (const char c : tag) {
    const auto u = static_cast<unsigned char>(c);
    if (u <= 0x20 || u == 0x7f)
      return "found " + quoted(tag) + (c == ' ' ? ", with a space in it" : ", with a control character in it");
    if (c == '[' || c == ']' || c == '"' || c == '\'')
      return "found " + quoted(tag) + ", with " + c + " in it, a mark of the hookup language";
  }
  if (tag.back() == '%') return "found " + quoted(tag) + ", which ends like a share in a hookup";
  return {};
}

Site build_site(const InventoryDraft& draft, const std::string& fallback_name, const Builder& builder) {
  Site site;
  const bool named = draft.site && draft.site->name;
  site.name = named ? *draft.site->name : fallback_name;
  std::vector<std::string> names;
  if (draft.utilities)
    for (const Named<UtilityDraft>& u : *draft.utilities) {
      site.utilities.push_back(build_utility(u, builder));
      names.push_back(u.name);
    }
  if (!draft.vessels) return site;
  check_tags(*draft.vessels, builder);
  if (draft.vessels->empty())
    builder.about("inventory").error(draft.vessels.place, "vessel", "found no vessel", "expected [[vessel]]");
  for (const VesselDraft& d : *draft.vessels) site.vessels.push_back(build_vessel(d, names, builder));
  return site;
}

}  // namespace vatwright
