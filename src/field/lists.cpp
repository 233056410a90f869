#include "vatwright/field/value.hpp"

namespace vatwright {
namespace {

/// Reads every item of a list; nullopt where one of them is wrong.
template <class T, class ReadOne>
std::optional<std::vector<T>> each(const Array& array, ReadOne&& read_one) {
  std::vector<T> values;
  for (const Node& item : array.items)
    if (auto value = read_one(item)) values.push_back(std::move(*value));
  if (values.size() != array.items.size()) return std::nullopt;
  return values;
}

/// Reads every entry of a table whose keys are species.
template <class T, class ReadOne>
std::optional<ByName<T>> each_species(const Node& node, const Scope& scope, std::string_view key, ReadOne&& read_one) {
  const Table* table = node.table();
  if (!table) {
    scope.error(node.place, key, found_text(node), "expected a table of species, { A = .. }");
    return std::nullopt;
  }
  ByName<T> values;
  for (const Member& member : table->members) {
    const std::string name = std::string(key) + "." + member.key;
    if (is_common_key(member.key)) {
      scope.error(member.key_place, key, "found " + quoted(member.key) + " among the species",
                  member.key == "spread"
                      ? "expected it in the table above, as " + quoted(name + " = \"5 %\"") + " in spread"
                      : "expected it in the table above; no species may be called so");
    } else if (auto value = read_one(member.value, name)) {
      values.push_back({member.key, member.key_place, std::move(*value), member.value.place});
    }
  }
  return values;
}

}  // namespace

std::optional<std::pair<double, double>> read_pair(const Node& node, const Measure& m, std::string_view what,
                                                   std::string_view example, const Scope& scope, std::string_view key) {
  const std::string wanted = "expected " + std::string(what) + ", such as " + std::string(example);
  const Array* array = node.array();
  if (!array || array->items.size() != 2) {
    const std::string found = array ? "found a list of " + std::to_string(array->items.size()) : found_text(node);
    scope.error(node.place, key, found, wanted);
    return std::nullopt;
  }
  const auto lo = read_figure(array->items[0], m, scope, key);
  const auto hi = read_figure(array->items[1], m, scope, key);
  if (!lo || !hi) return std::nullopt;
  if (*lo <= *hi) return std::pair(*lo, *hi);
  const auto shown = [](const Node& n) { return found_text(n).substr(6); };
  scope.error(node.place, key,
              "the range is upside down: " + shown(array->items[0]) + " is above " + shown(array->items[1]),
              "expected the least first, " + std::string(example));
  return std::nullopt;
}

std::optional<Bounds> read_bounds(const Node& node, const Measure& m, std::string_view example, const Scope& scope,
                                  std::string_view key) {
  if (node.array()) {
    const auto pair = read_pair(node, m, "the least and the most", example, scope, key);
    return pair ? std::optional(Bounds{pair->first, pair->second}) : std::nullopt;
  }
  const auto most = read_figure(node, m, scope, key);
  return most ? std::optional(Bounds{std::nullopt, *most}) : std::nullopt;
}

std::optional<std::vector<std::string>> read_texts(const Node& node, const Scope& scope, std::string_view key) {
  const auto one = [&](const Node& n) { return read_text(n, scope, key); };
  if (const Array* array = node.array()) return each<std::string>(*array, one);
  const std::string example = node.text() ? std::string("[").append(quoted(*node.text())) + "]" : "[\"..\"]";
  scope.error(node.place, key, found_text(node), "expected a list, " + example);
  return std::nullopt;
}

std::optional<std::vector<double>> read_figures(const Node& node, const Measure& m, const Scope& scope,
                                                std::string_view key) {
  const auto one = [&](const Node& n) { return read_figure(n, m, scope, key); };
  if (const Array* array = node.array()) return each<double>(*array, one);
  scope.error(node.place, key, found_text(node), "expected a list, each " + m.text());
  return std::nullopt;
}

std::optional<std::vector<Raw>> read_raws(const Node& node, const Scope& scope, std::string_view key) {
  const auto one = [&](const Node& n) { return read_raw(n, scope, key); };
  if (const Array* array = node.array()) return each<Raw>(*array, one);
  const auto raw = one(node);
  return raw ? std::optional(std::vector{*raw}) : std::nullopt;
}

std::optional<ByName<double>> read_figures_by_name(const Node& node, const Measure& m, const Scope& scope,
                                                   std::string_view key) {
  return each_species<double>(node, scope, key,
                              [&](const Node& n, const std::string& name) { return read_figure(n, m, scope, name); });
}

std::optional<ByName<Raw>> read_raws_by_name(const Node& node, const Scope& scope, std::string_view key) {
  return each_species<Raw>(node, scope, key,
                           [&](const Node& n, const std::string& name) { return read_raw(n, scope, name); });
}

}  // namespace vatwright
