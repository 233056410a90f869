#include "vatwright/report/csv.hpp"

#include <algorithm>
#include <charconv>

#include "json_rating.hpp"
#include "vatwright/quantity/show.hpp"

namespace vatwright {
namespace {

using Cells = std::vector<std::pair<std::string, std::string>>;  // header and cell

std::string plain(const Json& json) {
  if (json.is_null()) return "";
  if (json.is_string()) return json.get<std::string>();
  if (json.is_number_float()) return shortest(json.get<double>());
  return json.dump();
}

std::string list_of(const Json& array, const std::string& between) {
  std::string cell;
  for (const Json& item : array) {
    if (&item != &array.front()) cell += between;
    cell += item.is_array() ? plain(item.at(0)) + ".." + plain(item.at(1)) : plain(item);
  }
  return cell;
}

void add_limits(const Json& limits, Cells& cells) {
  for (const Json& limit : limits)
    for (const char* key : {"value", "bound", "unit", "margin", "state"})
      cells.emplace_back("limits." + limit.at("name").get<std::string>() + "." + key, plain(limit.at(key)));
}

void add_states(const Json& states, Cells& cells) {
  for (const char* key : {"conversion", "temperature_K", "stable", "reached"}) {
    Json column = Json::array();
    for (const Json& state : states) column.push_back(state.at(key));
    cells.emplace_back(std::string("steady_states.") + key, list_of(column, ";"));
  }
}

std::string cautions_cell(const Json& cautions) {
  Json texts = Json::array();
  for (const Json& caution : cautions) texts.push_back(caution.at("text"));
  return list_of(texts, "; ");
}

void add_object(const std::string& name, const Json& object, const std::vector<std::string>& keys, Cells& cells) {
  for (const std::string& key : keys) {
    const bool there = object.is_object() && object.contains(key);
    cells.emplace_back(name + "." + key, there ? plain(object.at(key)) : "");
  }
}

/// The columns of a row do not depend on which figures exist: those of absent objects are there, and empty.
Cells cells_of(const Json& row, const Head& head, const std::vector<std::string>& made) {
  Cells cells;
  for (const auto& [key, value] : row.items()) {
    if (key == "profile" || key == "splits") continue;
    if (key == "yields") {
      add_object(key, value, made, cells);
    } else if (key == "outlet") {
      add_object(key, value, {"temperature_K", "pressure_Pa"}, cells);
      const std::string flow = amount_key("flow", head.amounts);
      add_object(key + "." + flow, value.is_object() ? value.at(flow) : Json(nullptr), head.species, cells);
    } else if (key == "ends") {
      add_object(key, value, {"ceiling", "floor"}, cells);
    } else if (key == "limits") {
      add_limits(value, cells);
    } else if (key == "steady_states") {
      add_states(value, cells);
    } else if (key == "cautions") {
      cells.emplace_back(key, cautions_cell(value));
    } else if (value.is_array()) {
      const bool texts = !value.empty() && value.front().is_string();
      cells.emplace_back(key, list_of(value, texts ? "; " : ";"));
    } else {
      cells.emplace_back(key, plain(value));
    }
  }
  return cells;
}

/// All headers of all rows; one that only some rows have comes after the header it follows there.
std::vector<std::string> headers_of(const std::vector<Cells>& rows) {
  std::vector<std::string> headers;
  for (const Cells& row : rows) {
    auto place = headers.begin();
    for (const auto& [header, cell] : row) {
      const auto known = std::find(headers.begin(), headers.end(), header);
      place = (known != headers.end() ? known : headers.insert(place, header)) + 1;
    }
  }
  return headers;
}

bool is_number(const std::string& cell) {
  double value = 0;
  const char* end = cell.data() + cell.size();
  const auto [stop, error] = std::from_chars(cell.data(), end, value);
  return error == std::errc() && stop == end;
}

std::string written(std::string cell) {
  const bool reckoned = !cell.empty() && std::string_view("=+-@").find(cell.front()) != std::string_view::npos;
  if (reckoned && !is_number(cell)) cell.insert(cell.begin(), '\'');
  if (cell.find_first_of(",\"\r\n") == std::string::npos) return cell;
  std::string quoted = "\"";
  for (char letter : cell) quoted.append(letter == '"' ? 2 : 1, letter);
  quoted += '"';
  return quoted;
}

std::string line_of(const std::vector<std::string>& cells) {
  std::string line;
  for (std::size_t i = 0; i < cells.size(); ++i) line.append(i == 0 ? "" : ",").append(written(cells[i]));
  return line + "\r\n";
}

/// Species that some row has a yield of, in their order.
std::vector<std::string> species_made(const Json& rows, const Head& head) {
  std::vector<std::string> made;
  for (const std::string& species : head.species)
    if (std::any_of(rows.begin(), rows.end(), [&](const Json& row) {
          return row.at("yields").is_object() && row.at("yields").contains(species);
        }))
      made.push_back(species);
  return made;
}

std::string csv_text(const Json& rows, const Head& head, const std::vector<std::string>& headers_without_rows) {
  const std::vector<std::string> made = species_made(rows, head);
  std::vector<Cells> all;
  for (const Json& row : rows) all.push_back(cells_of(row, head, made));
  const std::vector<std::string> headers = all.empty() ? headers_without_rows : headers_of(all);
  std::string text = line_of(headers);
  for (const Cells& row : all) {
    std::vector<std::string> line;
    for (const std::string& header : headers) {
      const auto cell = std::find_if(row.begin(), row.end(), [&](const auto& c) { return c.first == header; });
      line.push_back(cell == row.end() ? "" : cell->second);
    }
    text += line_of(line);
  }
  return text;
}

std::vector<std::string> headers_of(const Json& row, const Head& head) {
  std::vector<std::string> headers;
  for (const auto& cell : cells_of(row, head, {})) headers.push_back(cell.first);
  return headers;
}

/// The row with these keys before all others, null where it has them not.
Json led_by(const Json& row, const std::vector<std::string>& front) {
  Json filled;
  for (const std::string& key : front) filled[key] = row.contains(key) ? row.at(key) : Json(nullptr);
  for (const auto& [key, value] : row.items()) filled[key] = value;
  return filled;
}

}  // namespace

std::string to_csv(const ScreenAnswer& answer) {
  const Json none = vessel_json(Rating{}, over_cases(Rating{}, {}), answer.head.amounts);
  return csv_text(vessels_json(answer), answer.head, headers_of(none, answer.head));
}

std::string to_csv(const ExamineAnswer& answer) {
  Json rows = Json::array({led_by(whole_json(answer), {"hookup"})});
  for (const Json& part : parts_json(answer)) rows.push_back(led_by(part, {"hookup"}));
  return csv_text(rows, answer.head, {});
}

std::string to_csv(const RankAnswer& answer) {
  RankAnswer one = answer;
  one.ranking.top.resize(1);
  one.over_top.clear();
  return csv_text(places_json(answer), answer.head, headers_of(places_json(one).front(), answer.head));
}

}  // namespace vatwright
