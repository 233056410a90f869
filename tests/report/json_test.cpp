#include "vatwright/report/json.hpp"

#include <limits>
#include <nlohmann/json.hpp>

#include "sample.hpp"
#include "support/catch.hpp"

using namespace vatwright;
using Json = nlohmann::ordered_json;

namespace {

std::vector<std::string> keys_of(const Json& object) {
  std::vector<std::string> keys;
  for (const auto& item : object.items()) keys.push_back(item.key());
  return keys;
}

using Keys = std::vector<std::string>;

// The keys of the contract, in its order; worst_case and windows_all_cases_m3_s belong to the cases.
const Keys vessel_keys = {"tag",
                          "kind",
                          "verdict",
                          "worst_case",
                          "stands_in_the_way",
                          "conversion",
                          "yields",
                          "outlet",
                          "hottest_K",
                          "start_peak_K",
                          "cooling_W",
                          "preheat_W",
                          "medium",
                          "steady_states",
                          "states_complete",
                          "windows_m3_s",
                          "windows_all_cases_m3_s",
                          "ceiling_m3_s",
                          "floor_m3_s",
                          "ends",
                          "limits",
                          "residual",
                          "cautions"};
const Keys head_keys = {"schema",    "made_by",    "stamp",   "site",      "duty",
                        "feed_m3_s", "feed_mol_s", "assumed", "not_asked", "cautions"};

Keys after(Keys front, const Keys& more) {
  front.insert(front.end(), more.begin(), more.end());
  return front;
}

}  // namespace

TEST_CASE("a screen has every key, in order, whatever exists", "[report][json]") {
  const Json json = Json::parse(to_json(sample_screen()));
  CHECK(keys_of(json) == after(head_keys, {"vessels", "cases"}));
  CHECK(json["schema"] == "vatwright.screen/1");
  CHECK(keys_of(json["made_by"]) == Keys{"version", "inventory_sha256", "duty_sha256"});
  for (const Json& vessel : json["vessels"]) CHECK(keys_of(vessel) == vessel_keys);
  CHECK(json["stamp"].is_null());
  CHECK(json["cases"] == Json::object());
  CHECK(json["feed_m3_s"] == 0.001);
  CHECK(json["feed_mol_s"] == 7.1);
  CHECK(json["assumed"][0] == Json{{"key", "operation.pressure"}, {"value", "1.013 bar"}, {"why", "not given"}});
  CHECK(json["not_asked"] == Json{"decomposition"});
  CHECK(json["cautions"][0] == Json{{"id", "screening"}, {"text", "Screening is not design."}});
}

TEST_CASE("a rated vessel is told figure by figure", "[report][json]") {
  const Json tank = Json::parse(to_json(sample_screen()))["vessels"][0];
  CHECK(tank["tag"] == "K-1");
  CHECK(tank["kind"] == "stirred-tank");
  CHECK(tank["verdict"] == "fits");
  CHECK(tank["stands_in_the_way"] == Json::array());
  CHECK(tank["conversion"] == 0.95);
  CHECK(tank["yields"] == Json{{"C", 0.9}});
  CHECK(tank["outlet"]["temperature_K"] == 343.15);
  CHECK(tank["outlet"]["pressure_Pa"] == 4e5);
  CHECK(keys_of(tank["outlet"]["flow_mol_s"]) == Keys{"A", "B", "C"});
  CHECK(tank["start_peak_K"].is_null());
  CHECK(tank["cooling_W"] == -1500);
  CHECK(tank["steady_states"] ==
        Json::array({Json{{"conversion", 0.95}, {"temperature_K", 343.15}, {"stable", true}, {"reached", true}}}));
  CHECK(tank["windows_m3_s"] == Json::parse("[[null, 0.0005], [0.0008, 0.002]]"));
  CHECK(tank["windows_all_cases_m3_s"] == tank["windows_m3_s"]);
  CHECK(tank["ceiling_m3_s"] == 0.002);
  CHECK(tank["ends"] == Json{{"ceiling", "target"}, {"floor", "heat removal"}});
  CHECK(tank["limits"][0] ==
        Json{{"name", "fill"}, {"value", 0.8}, {"bound", 0.85}, {"unit", "1"}, {"margin", 0.0588}, {"state", "holds"}});
  CHECK(tank["residual"] == 1e-13);
}

TEST_CASE("what does not exist is null, never nought", "[report][json]") {
  const Json vessels = Json::parse(to_json(sample_screen()))["vessels"];
  const Json& tube = vessels[1];
  CHECK(tube["yields"] == Json{{"C", nullptr}});
  CHECK(tube["steady_states"].is_null());
  CHECK(tube["windows_m3_s"] == Json::array());
  CHECK(tube["ceiling_m3_s"].is_null());
  CHECK(tube["ends"] == Json{{"ceiling", nullptr}, {"floor", nullptr}});
  CHECK(tube["limits"][0] == Json{{"name", "wetted material"},
                                  {"value", nullptr},
                                  {"bound", nullptr},
                                  {"unit", nullptr},
                                  {"margin", nullptr},
                                  {"state", "broken"}});
  const Json& unrated = vessels[2];
  CHECK(unrated["verdict"] == "cannot-tell");
  for (const char* key :
       {"conversion", "yields", "outlet", "hottest_K", "cooling_W", "medium", "windows_m3_s", "ends", "residual"}) {
    INFO(key);
    CHECK(unrated[key].is_null());
  }
}

TEST_CASE("figures are the shortest that read back, minus nought is nought, what is not finite is null",
          "[report][json]") {
  ScreenAnswer answer = sample_screen();
  answer.vessels[0].conversion = 0.1 + 0.2;  // 0.30000000000000004, the textbook case of IEEE 754 addition
  answer.vessels[0].hottest_K = std::numeric_limits<double>::quiet_NaN();
  answer.vessels[0].cooling_W = std::numeric_limits<double>::infinity();
  const std::string text = to_json(answer);
  CHECK(text.find("\"conversion\": 0.30000000000000004,") != std::string::npos);
  CHECK(text.find("\"B\": 0,") != std::string::npos);
  const Json tank = Json::parse(text)["vessels"][0];
  CHECK(tank["hottest_K"].is_null());
  CHECK(tank["cooling_W"].is_null());
}

TEST_CASE("amounts by mass rename the keys in mol", "[report][json]") {
  ScreenAnswer answer = sample_screen();
  answer.head.amounts = Amounts::mass;
  const Json json = Json::parse(to_json(answer));
  CHECK(json.contains("feed_kg_s"));
  CHECK_FALSE(json.contains("feed_mol_s"));
  CHECK(json["vessels"][0]["outlet"].contains("flow_kg_s"));
  CHECK(to_json(answer).find("mol_s") == std::string::npos);
}

TEST_CASE("any bytes of a user's text give a JSON that reads", "[report][json]") {
  ScreenAnswer answer = sample_screen();
  answer.head.stamp = "a\xff\x01\"\\b";
  answer.vessels[0].outlet_mol_s = {{"\xc3", 1.0}};
  const Json json = Json::parse(to_json(answer));
  CHECK(json["stamp"] == "a\xEF\xBF\xBD\x01\"\\b");  // U+FFFD in place of the byte that is no UTF-8
}

TEST_CASE("cases hold the same answers; the verdict above is the worst", "[report][json]") {
  ScreenAnswer answer = sample_screen();
  ScreenAnswer winter = sample_screen();
  winter.vessels[0].verdict = Verdict::does_not_fit;
  winter.vessels[0].windows->intervals = {{0.0001, 0.001}};
  answer.cases = {{"winter", winter}};
  const Json json = Json::parse(to_json(answer));
  const Json& tank = json["vessels"][0];
  CHECK(tank["verdict"] == "does-not-fit");
  CHECK(tank["worst_case"] == "winter");
  CHECK(tank["windows_m3_s"] == Json::parse("[[null, 0.0005], [0.0008, 0.002]]"));
  CHECK(tank["windows_all_cases_m3_s"] == Json::parse("[[0.0001, 0.0005], [0.0008, 0.001]]"));
  const Json& of_case = json["cases"]["winter"];
  CHECK(keys_of(of_case) ==
        Keys{"site", "duty", "feed_m3_s", "feed_mol_s", "assumed", "not_asked", "cautions", "vessels"});
  CHECK(keys_of(of_case["vessels"][0]) == vessel_keys);
  CHECK(of_case["vessels"][0]["worst_case"].is_null());
}

TEST_CASE("examine tells the whole, then every vessel with its share and profile", "[report][json]") {
  const Json json = Json::parse(to_json(sample_examine()));
  Keys keys = after(head_keys, {"hookup"});
  for (const std::string& key : vessel_keys)
    if (key != "cautions") keys.push_back(key);
  CHECK(keys_of(json) == after(keys, {"vessels", "cases"}));
  CHECK(json["hookup"] == "[40% K-1 beside 60% P-2]");
  for (const char* key : {"tag", "kind", "medium", "steady_states"}) CHECK(json[key].is_null());
  CHECK(json["cautions"].size() == 2);  // the one both name stands once
  for (const Json& vessel : json["vessels"]) CHECK(keys_of(vessel) == after(vessel_keys, {"feed_fraction", "profile"}));
  const Json& tube = json["vessels"][1];
  CHECK(tube["feed_fraction"] == 0.6);
  for (const char* key : {"windows_m3_s", "windows_all_cases_m3_s", "ceiling_m3_s", "floor_m3_s", "ends"})
    CHECK(tube[key].is_null());
  CHECK(keys_of(tube["profile"]) ==
        Keys{"length_m", "volume_m3", "conversion", "temperature_K", "pressure_Pa", "medium_K"});
  CHECK(tube["profile"]["medium_K"] == Json::parse("[null, 300]"));
  CHECK(json["vessels"][0]["profile"].is_null());
}

TEST_CASE("rank tells its space, its stair and its places", "[report][json]") {
  RankAnswer answer = sample_rank();
  const Json json = Json::parse(to_json(answer));
  CHECK(keys_of(json) == after(head_keys, {"by", "space", "stair", "today", "hookups", "kept_out", "cases"}));
  CHECK(json["by"] == "fit");
  CHECK(json["space"] ==
        Json{{"vessels", 2}, {"most", 3}, {"hookups", 5}, {"rated", 4}, {"complete", "visited"}, {"within", nullptr}});
  CHECK(json["stair"][1] == Json{{"vessel_count", 2}, {"best", "K-1 then P-2"}, {"value", 0.002}});
  CHECK(json["today"].is_null());
  const Json& first = json["hookups"][0];
  CHECK(keys_of(first) == Keys{"hookup", "verdict", "worst_case", "conversion", "yields", "ceiling_m3_s",
                               "vessel_count", "ends", "same_as", "splits"});
  CHECK(first["same_as"] == Json{"P-2 then K-1"});
  answer.ranking.top[0].splits = {{{"K-1", "P-2"}, {0.4, 0.6}, {0.5, 0.5}, 0.01, std::nullopt}};
  answer.ranking.kept_out = {{"P-2", 0.003, {"feed line"}}};
  const Json more = Json::parse(to_json(answer));
  CHECK(more["hookups"][0]["splits"] == Json::parse(R"([{"branches": ["K-1", "P-2"], "best": [0.4, 0.6],
      "by_volume": [0.5, 0.5], "by_volume_costs": 0.01, "off_by_0_05_costs": null}])"));
  CHECK(more["kept_out"] ==
        Json::parse(R"([{"hookup": "P-2", "value": 0.003, "stands_in_the_way": ["feed line"]}])"));
  answer.ranking.today = answer.ranking.top[1];
  answer.ranking.today_place = 2;
  CHECK(Json::parse(to_json(answer))["today"]["place"] == 2);
}

TEST_CASE("check tells what was understood, and warns", "[report][json]") {
  CheckAnswer answer;
  answer.head = sample_head();
  answer.understood = {"K-1 holds 6.3 m3"};
  const int source = answer.diagnostics.add_source("site.toml", "volume = 1\n");
  answer.diagnostics.warning({source, 1, 10}, "K-1", "U", "found 0.38", "50 to 1200");
  const Json json = Json::parse(to_json(answer));
  CHECK(keys_of(json) == after(head_keys, {"understood", "warnings"}));
  CHECK(json["understood"] == Json{"K-1 holds 6.3 m3"});
  CHECK(json["warnings"][0]["file"] == "site.toml");
  CHECK(json["warnings"][0]["line"] == 1);
}
