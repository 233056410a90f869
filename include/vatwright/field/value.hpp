#pragma once
#include <cstdint>
#include <limits>
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "vatwright/field/scope.hpp"

namespace vatwright {

/// Which figures a key takes, SI.
struct Range {
  double lo = -std::numeric_limits<double>::infinity();
  double hi = std::numeric_limits<double>::infinity();
  bool lo_in = true, hi_in = true;
  [[nodiscard]] bool has(double x) const { return (lo_in ? x >= lo : x > lo) && (hi_in ? x <= hi : x < hi); }
  /// "above zero", "from 0 to 1"; empty where anything goes.
  [[nodiscard]] std::string text() const;
};
inline constexpr Range anything{};
constexpr Range above(double lo) { return {lo, std::numeric_limits<double>::infinity(), false, true}; }
constexpr Range at_least(double lo) { return {lo, std::numeric_limits<double>::infinity(), true, true}; }
constexpr Range between(double lo, double hi) { return {lo, hi, true, true}; }
constexpr Range inside(double lo, double hi) { return {lo, hi, false, false}; }

/// How a figure is meant and what it may be.
struct Measure {
  Dimension dimension;
  Range range = anything;
  Sense sense = Sense::plain;
  bool absolute = false;  ///< a pressure that may be meant as gauge: a plain "bar" is worth a word
  /// "a volume above zero".
  [[nodiscard]] std::string text() const;
  /// A figure that would do, as it is written in a file: `"6.3 m3"` or `0.5`.
  [[nodiscard]] std::string example() const;
};

/// Readers of one value: nullopt and a diagnostic where it is not what the key takes. key: for the message.
std::optional<double> read_figure(const Node& node, const Measure& measure, const Scope& scope, std::string_view key);
std::optional<Raw> read_raw(const Node& node, const Scope& scope, std::string_view key);
std::optional<std::string> read_text(const Node& node, const Scope& scope, std::string_view key);
std::optional<bool> read_truth(const Node& node, const Scope& scope, std::string_view key);
std::optional<std::int64_t> read_whole(const Node& node, std::int64_t least, const Scope& scope, std::string_view key);
/// [least, most], rising. example: how it is written. what: what the two are.
std::optional<std::pair<double, double>> read_pair(const Node& node, const Measure& measure, std::string_view what,
                                                   std::string_view example, const Scope& scope, std::string_view key);
/// As read_pair, or a single figure: the upper end.
std::optional<Bounds> read_bounds(const Node& node, const Measure& measure, std::string_view example,
                                  const Scope& scope, std::string_view key);
std::optional<std::vector<std::string>> read_texts(const Node& node, const Scope& scope, std::string_view key);
std::optional<std::vector<double>> read_figures(const Node& node, const Measure& measure, const Scope& scope,
                                                std::string_view key);
/// A list of quantities; a single one counts as a list of one.
std::optional<std::vector<Raw>> read_raws(const Node& node, const Scope& scope, std::string_view key);
/// A table of species and figures. `spread`, `source` and `note` are no names of species.
std::optional<ByName<double>> read_figures_by_name(const Node& node, const Measure& measure, const Scope& scope,
                                                   std::string_view key);
std::optional<ByName<Raw>> read_raws_by_name(const Node& node, const Scope& scope, std::string_view key);

/// Words that every table takes besides its own.
bool is_common_key(std::string_view key);
/// Reads the table `spread` of `table` (its siblings are looked up there) and adds what it finds to scope.collected.
void read_spread(const Node& node, const Table& table, const std::vector<std::string>& known, const Scope& scope);

}  // namespace vatwright
