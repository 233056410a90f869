#include <algorithm>

#include "json_rating.hpp"
#include "vatwright/report/json.hpp"

namespace vatwright {
namespace {

Json splits_json(const Ranked& ranked) {
  Json json = Json::array();
  for (const SplitCost& split : ranked.splits) {
    Json item;
    item["branches"] = split.branches;
    item["best"] = split.best;
    item["by_volume"] = split.by_volume;
    item["by_volume_costs"] = number(split.by_volume_costs);
    item["off_by_0_05_costs"] = number(split.off_costs);
    json.push_back(item);
  }
  return json;
}

Json place_json(const Ranked& ranked, const OverCases& over) {
  const Rating& whole = ranked.rating.whole;
  Json json;
  json["hookup"] = ranked.rating.text;
  json["verdict"] = text_of(over.verdict);
  json["worst_case"] = text(over.worst_case);
  json["conversion"] = number(whole.conversion);
  json["yields"] = yields_json(whole);
  json["ceiling_m3_s"] = number(whole.windows ? whole.windows->ceiling_m3_s : std::nullopt);
  json["vessel_count"] = ranked.rating.vessel_count;
  json["ends"] = ends_json(whole.windows);
  json["same_as"] = ranked.same_as;
  json["splits"] = splits_json(ranked);
  return json;
}

OverCases over(const Ranked& ranked, const OverCases* given) {
  return given ? *given : over_cases(ranked.rating.whole, {});
}

Json today_json(const RankAnswer& answer) {
  if (!answer.ranking.today) return nullptr;
  const Ranked& today = *answer.ranking.today;
  Json json = place_json(today, over(today, answer.over_today ? &*answer.over_today : nullptr));
  json["place"] = answer.ranking.today_place ? Json(*answer.ranking.today_place) : Json(nullptr);
  return json;
}

void add_body(Json& json, const ScreenAnswer& answer) { json["vessels"] = vessels_json(answer); }

void add_body(Json& json, const ExamineAnswer& answer) {
  const Json whole = whole_json(answer);
  for (const auto& item : whole.items()) json[item.key()] = item.value();
  json["vessels"] = parts_json(answer);
}

void add_body(Json& json, const RankAnswer& answer) {
  const Ranking& ranking = answer.ranking;
  json["by"] = text_of(answer.by);
  Json& space = json["space"];
  space["vessels"] = ranking.offered;
  space["most"] = ranking.most;
  space["hookups"] = ranking.hookups;
  space["rated"] = ranking.rated;
  space["complete"] = ranking.complete;
  space["within"] = number(ranking.within);
  json["stair"] = Json::array();
  for (const Stair& step : ranking.stair) {
    Json item;
    item["vessel_count"] = step.vessel_count;
    item["best"] = text(step.best);
    item["value"] = number(step.value);
    json["stair"].push_back(item);
  }
  json["today"] = today_json(answer);
  json["hookups"] = places_json(answer);
  json["kept_out"] = Json::array();
  for (const KeptOut& out : ranking.kept_out) {
    Json item;
    item["hookup"] = out.hookup;
    item["value"] = number(out.value);
    item["stands_in_the_way"] = out.stands_in_the_way;
    json["kept_out"].push_back(item);
  }
}

template <class Answer>
std::string answer_text(const std::string& schema, const Answer& answer) {
  Json json = start_answer(schema, answer.head);
  add_body(json, answer);
  Json& cases = json["cases"] = Json::object();
  for (const auto& [name, of_case] : answer.cases) {
    add_head(cases[name], of_case.head);
    add_body(cases[name], alone(of_case));
  }
  return json_text(json);
}

Json warning_json(const Diagnostics& diagnostics, const Diagnostic& diagnostic) {
  const Place& place = diagnostic.place;
  const bool placed = place.source >= 0;
  Json json;
  json["file"] = placed ? Json(diagnostics.sources()[static_cast<std::size_t>(place.source)].name) : Json(nullptr);
  json["line"] = placed ? Json(place.line) : Json(nullptr);
  json["column"] = placed ? Json(place.column) : Json(nullptr);
  json["subject"] = diagnostic.subject;
  json["key"] = diagnostic.key;
  json["found"] = diagnostic.found;
  json["expected"] = diagnostic.expected;
  return json;
}

}  // namespace

Json vessels_json(const ScreenAnswer& answer) {
  Json json = Json::array();
  for (std::size_t i = 0; i < answer.vessels.size(); ++i)
    json.push_back(vessel_json(answer.vessels[i], over_cases_of(answer, i), answer.head.amounts));
  return json;
}

Json whole_json(const ExamineAnswer& answer) {
  Json json;
  json["hookup"] = answer.rating.text;
  json.update(vessel_json(answer.rating.whole, over_cases_of(answer), answer.head.amounts));
  std::vector<Caution> cautions = answer.head.cautions;
  for (const Caution& caution : answer.rating.whole.cautions)
    if (std::find(cautions.begin(), cautions.end(), caution) == cautions.end()) cautions.push_back(caution);
  json["cautions"] = cautions_json(cautions);
  return json;
}

Json parts_json(const ExamineAnswer& answer) {
  Json json = Json::array();
  for (std::size_t i = 0; i < answer.rating.vessels.size(); ++i)
    json.push_back(part_json(answer.rating.vessels[i], over_cases_of(answer, i), answer.head.amounts));
  return json;
}

Json places_json(const RankAnswer& answer) {
  Json json = Json::array();
  for (std::size_t i = 0; i < answer.ranking.top.size(); ++i) {
    const Ranked& ranked = answer.ranking.top[i];
    json.push_back(place_json(ranked, over(ranked, i < answer.over_top.size() ? &answer.over_top[i] : nullptr)));
  }
  return json;
}

std::string to_json(const ScreenAnswer& answer) { return answer_text("vatwright.screen/1", answer); }
std::string to_json(const ExamineAnswer& answer) { return answer_text("vatwright.examine/1", answer); }
std::string to_json(const RankAnswer& answer) { return answer_text("vatwright.rank/1", answer); }

std::string to_json(const CheckAnswer& answer) {
  Json json = start_answer("vatwright.check/1", answer.head);
  json["understood"] = answer.understood;
  json["warnings"] = Json::array();
  for (const Diagnostic& diagnostic : answer.diagnostics.sorted())
    if (diagnostic.severity == Severity::warning)
      json["warnings"].push_back(warning_json(answer.diagnostics, diagnostic));
  return json_text(json);
}

}  // namespace vatwright
