#include "vatwright/field/value.hpp"

#include <cmath>

#include "vatwright/quantity/show.hpp"

namespace vatwright {
namespace {

bool bare_dimension(const Dimension& d) { return d == dim::none; }

std::optional<double> number_of(const Node& node) {
  if (const auto* i = std::get_if<std::int64_t>(&node.value)) return static_cast<double>(*i);
  if (const auto* x = std::get_if<double>(&node.value)) return *x;
  return std::nullopt;
}

/// `0.95 or "95 %"` for 95 where a fraction is asked.
std::string per_cent_hint(double x, const Measure& m) {
  if (!bare_dimension(m.dimension) || m.range.hi > 1 || x <= 1 || x > 100) return {};
  return "; " + show_number(x / 100, Shown::number, Units::trade) + " or \"" +
         show_number(x, Shown::number, Units::trade) + " %\" meant?";
}

std::string expected_text(const std::string& what) {
  return what.rfind("expected", 0) == 0 ? what : "expected " + what;
}

/// A word on units that are easily meant otherwise: the gallon, and plain bar where a gauge reads.
void warn_of_unit(const std::string& text, const Node& node, const Measure& m, const Scope& scope,
                  std::string_view key) {
  const auto read = parse_quantity(text);
  const Quantity* q = std::get_if<Quantity>(&read);
  if (!q) return;
  if (q->unit == "gal")
    scope.warning(node.place, key, "found " + quoted(text) + ", read as US gallons: " + show(q->si, Shown::volume),
                  "an imperial gallon is 1.20 of it");
  if (!m.absolute || !q->plain_bar || scope.collected->bar_told) return;
  constexpr double atmosphere_Pa = 101325;
  const std::string gauge = show_number(q->si - atmosphere_Pa, Shown::pressure, Units::trade);
  scope.warning(node.place, key,
                "found " + quoted(text) + ", read as absolute: " + show_number(q->si, Shown::pressure, Units::trade) +
                    " bar absolute = " + gauge + " barg",
                "write barg where a gauge reads it");
  scope.collected->bar_told = true;
}

bool below_vacuum(double x, const Measure& m) { return m.dimension == dim::pressure && x < 0 && m.range.lo == 0; }

std::optional<double> judged(double x, const Node& node, const Measure& m, const Scope& scope, std::string_view key) {
  if (std::isfinite(x) && m.range.has(x)) return x;
  if (m.sense == Sense::temperature && x <= 0) {
    scope.error(node.place, key, found_text(node) + ", absolute zero", "expected a temperature above it");
    return std::nullopt;
  }
  if (below_vacuum(x, m)) {
    scope.error(node.place, key, found_text(node) + ", below full vacuum",
                m.absolute ? "expected -1.01325 barg or more" : "expected " + m.text());
    return std::nullopt;
  }
  const std::string such = bare_dimension(m.dimension) ? "" : ", such as " + m.example();
  scope.error(node.place, key, found_text(node),
              "expected " + m.text() + (std::isfinite(x) ? "" : ", finite") + such + per_cent_hint(x, m));
  return std::nullopt;
}

}  // namespace

std::string Range::text() const {
  const bool low = std::isfinite(lo), high = std::isfinite(hi);
  if (low && high) return (lo_in ? "from " : "between ") + shortest(lo) + (lo_in ? " to " : " and ") + shortest(hi);
  if (low && lo == 0) return lo_in ? "of zero or more" : "above zero";
  if (low) return lo_in ? "of " + shortest(lo) + " or more" : "above " + shortest(lo);
  if (high) return hi_in ? "of at most " + shortest(hi) : "below " + shortest(hi);
  return {};
}

std::string Measure::text() const {
  const std::string what = sense == Sense::difference  ? "a temperature difference"
                           : bare_dimension(dimension) ? "a number"
                                                       : name_of(dimension);
  if (sense == Sense::temperature) return what;  // its range is that above absolute zero, in whatever scale
  const std::string where = range.text();
  return where.empty() ? what : what + " " + where;
}

std::string Measure::example() const {
  if (!bare_dimension(dimension)) {
    const std::string example = example_of(dimension, sense);
    return example.rfind('"', 0) == 0 ? example : "\"" + example + "\"";
  }
  if (std::isfinite(range.lo) && std::isfinite(range.hi)) return shortest((range.lo + range.hi) / 2);
  return std::isfinite(range.lo) ? shortest(range.lo + 1) : "1";
}

std::optional<double> read_figure(const Node& node, const Measure& m, const Scope& scope, std::string_view key) {
  if (const std::string* text = node.text()) {
    const auto read = to_si(*text, m.dimension, m.sense);
    if (const double* x = std::get_if<double>(&read)) {
      warn_of_unit(*text, node, m, scope, key);
      return judged(*x, node, m, scope, key);
    }
    const auto& fault = std::get<QuantityFault>(read);
    scope.error(node.place, key, fault.found, expected_text(fault.expected));
    return std::nullopt;
  }
  const std::optional<double> x = number_of(node);
  if (x && bare_dimension(m.dimension)) return judged(*x, node, m, scope, key);
  const std::string unitless = x ? ", without a unit" : "";
  scope.error(node.place, key, found_text(node) + unitless,
              "expected " + m.text() +
                  (bare_dimension(m.dimension) ? ", such as " : " with its unit, in quotes, such as ") + m.example());
  return std::nullopt;
}

std::optional<Raw> read_raw(const Node& node, const Scope& scope, std::string_view key) {
  if (const std::string* text = node.text()) {
    auto read = parse_quantity(*text);
    if (auto* q = std::get_if<Quantity>(&read)) return Raw{std::move(*q), *text, node.place};
    const auto& fault = std::get<QuantityFault>(read);
    scope.error(node.place, key, fault.found, expected_text(fault.expected));
    return std::nullopt;
  }
  const std::optional<double> x = number_of(node);
  if (x && std::isfinite(*x)) {
    Quantity q;
    q.si = *x;
    return Raw{q, shortest(*x), node.place};
  }
  scope.error(node.place, key, found_text(node), "expected a number with its unit, in quotes");
  return std::nullopt;
}

std::optional<std::string> read_text(const Node& node, const Scope& scope, std::string_view key) {
  if (const std::string* text = node.text()) return *text;
  scope.error(node.place, key, found_text(node), "expected a text in quotes");
  return std::nullopt;
}

std::optional<bool> read_truth(const Node& node, const Scope& scope, std::string_view key) {
  if (const bool* b = std::get_if<bool>(&node.value)) return *b;
  scope.error(node.place, key, found_text(node), "expected true or false, without quotes");
  return std::nullopt;
}

std::optional<std::int64_t> read_whole(const Node& node, std::int64_t least, const Scope& scope, std::string_view key) {
  const auto* i = std::get_if<std::int64_t>(&node.value);
  constexpr std::int64_t most = 1'000'000'000;
  if (i && *i >= least && *i <= most) return *i;
  scope.error(node.place, key, found_text(node),
              "expected a whole number, " + std::to_string(least) + " or more" +
                  (i && *i > most ? ", below a thousand million" : ""));
  return std::nullopt;
}

}  // namespace vatwright
