#include "json_rating.hpp"

namespace vatwright {
namespace {

Json windows_json(const std::vector<Interval>& intervals) {
  Json json = Json::array();
  for (const Interval& interval : intervals) json.push_back(Json::array({number(interval.lo), number(interval.hi)}));
  return json;
}

Json limit_json(const Limit& limit) {
  Json json;
  json["name"] = limit.name;
  json["value"] = number(limit.value);
  json["bound"] = number(limit.bound);
  json["unit"] = text_or_null(std::string(limit.unit));
  json["margin"] = number(limit.margin);
  json["state"] = text_of(limit.state);
  return json;
}

Json outlet_json(const Rating& rating, Amounts amounts) {
  if (!rating.outlet) return nullptr;
  Json flows = Json::object();
  for (const auto& [species, flow] : rating.outlet_mol_s) flows[species] = number(flow);
  Json json;
  json["temperature_K"] = number(rating.outlet->temperature_K);
  json["pressure_Pa"] = number(rating.outlet->pressure_Pa);
  json[amount_key("flow", amounts)] = flows;
  return json;
}

Json truth(std::optional<bool> known) { return known ? Json(*known) : Json(nullptr); }

Json states_json(const Rating& rating) {
  if (!rating.steady_states) return nullptr;
  Json json = Json::array();
  for (const SteadyState& state : *rating.steady_states) {
    Json item;
    item["conversion"] = number(state.conversion);
    item["temperature_K"] = number(state.temperature_K);
    item["stable"] = truth(state.stable);
    item["reached"] = truth(state.reached);
    json.push_back(item);
  }
  return json;
}

Json numbers_json(const std::vector<double>& values) {
  Json json = Json::array();
  for (double value : values) json.push_back(number(value));
  return json;
}

Json profile_json(const std::optional<Profile>& profile) {
  if (!profile) return nullptr;
  Json json;
  json["length_m"] = numbers_json(profile->length_m);
  json["volume_m3"] = numbers_json(profile->volume_m3);
  json["conversion"] = numbers_json(profile->conversion);
  json["temperature_K"] = numbers_json(profile->temperature_K);
  json["pressure_Pa"] = numbers_json(profile->pressure_Pa);
  json["medium_K"] = Json::array();
  for (const auto& value : profile->medium_K) json["medium_K"].push_back(number(value));
  return json;
}

}  // namespace

std::string amount_key(const std::string& stem, Amounts amounts) {
  return stem + (amounts == Amounts::mass ? "_kg_s" : "_mol_s");
}

Json cautions_json(const std::vector<Caution>& cautions) {
  Json json = Json::array();
  for (const Caution& caution : cautions) {
    Json item;
    item["id"] = caution.id;
    item["text"] = caution.text;
    json.push_back(item);
  }
  return json;
}

Json yields_json(const Rating& rating) {
  if (!rating.outlet && rating.yields.empty()) return nullptr;
  Json json = Json::object();
  for (const auto& [species, yield] : rating.yields) json[species] = number(yield);
  return json;
}

Json ends_json(const std::optional<Windows>& windows) {
  if (!windows) return nullptr;
  Json json;
  json["ceiling"] = text(windows->ends.ceiling);
  json["floor"] = text(windows->ends.floor);
  return json;
}

void add_rating(Json& json, const Rating& rating, const OverCases& over, Amounts amounts) {
  json["verdict"] = text_of(over.verdict);
  json["worst_case"] = text(over.worst_case);
  json["stands_in_the_way"] = rating.stands_in_the_way;
  json["conversion"] = number(rating.conversion);
  json["yields"] = yields_json(rating);
  json["outlet"] = outlet_json(rating, amounts);
  json["hottest_K"] = number(rating.hottest_K);
  json["start_peak_K"] = number(rating.start_peak_K);
  json["cooling_W"] = number(rating.cooling_W);
  json["preheat_W"] = number(rating.preheat_W);
  json["medium"] = text(rating.medium);
  json["steady_states"] = states_json(rating);
  json["states_complete"] = rating.states_complete ? Json(*rating.states_complete) : Json(nullptr);
  const std::optional<Windows>& windows = rating.windows;
  json["windows_m3_s"] = windows ? windows_json(windows->intervals) : Json(nullptr);
  json["windows_all_cases_m3_s"] = windows ? windows_json(over.windows_all_cases) : Json(nullptr);
  json["ceiling_m3_s"] = number(windows ? windows->ceiling_m3_s : std::nullopt);
  json["floor_m3_s"] = number(windows ? windows->floor_m3_s : std::nullopt);
  json["ends"] = ends_json(windows);
  json["limits"] = Json::array();
  for (const Limit& limit : rating.limits) json["limits"].push_back(limit_json(limit));
  json["residual"] = number(rating.residual);
  json["cautions"] = cautions_json(rating.cautions);
}

Json vessel_json(const Rating& rating, const OverCases& over, Amounts amounts) {
  Json json;
  json["tag"] = text_or_null(rating.tag);
  json["kind"] = text_or_null(rating.kind);
  add_rating(json, rating, over, amounts);
  return json;
}

Json part_json(const Rating& rating, const OverCases& over, Amounts amounts) {
  Json json = vessel_json(rating, over, amounts);
  json["feed_fraction"] = number(rating.feed_fraction);
  json["profile"] = profile_json(rating.profile);
  return json;
}

void add_head(Json& json, const Head& head) {
  json["site"] = head.site;
  json["duty"] = text_or_null(head.duty);
  json["feed_m3_s"] = number(head.feed_m3_s);
  json[amount_key("feed", head.amounts)] = number(head.feed_mol_s);
  json["assumed"] = Json::array();
  for (const Assumed& assumed : head.assumed) {
    Json item;
    item["key"] = assumed.key;
    item["value"] = assumed.value;
    item["why"] = assumed.why;
    json["assumed"].push_back(item);
  }
  json["not_asked"] = head.not_asked;
  json["cautions"] = cautions_json(head.cautions);
}

Json start_answer(const std::string& schema, const Head& head) {
  Json json;
  json["schema"] = schema;
  json["made_by"]["version"] = head.made_by.version;
  json["made_by"]["inventory_sha256"] = text_or_null(head.made_by.inventory_sha256);
  json["made_by"]["duty_sha256"] = text_or_null(head.made_by.duty_sha256);
  json["stamp"] = text(head.stamp);
  add_head(json, head);
  return json;
}

}  // namespace vatwright
