#include <cmath>

#include "vatwright/field/value.hpp"

namespace vatwright {
namespace {

struct Sibling {
  const Node* node = nullptr;
  std::string missing;             ///< the step that is not there
  std::vector<std::string> known;  ///< what is there in its place
};

/// Follows "k" or "concentration.A" from a table; a key may hold dots itself.
Sibling find_sibling(const Table& table, std::string_view path) {
  const Table* here = &table;
  while (true) {
    if (const Node* node = here->find(path)) return {node, {}, {}};
    const Table* next = nullptr;
    for (std::size_t dot = path.find('.'); dot != path.npos && !next; dot = path.find('.', dot + 1))
      if (const Node* node = here->find(path.substr(0, dot)); node && node->table())
        next = node->table(), path.remove_prefix(dot + 1);
    if (next) {
      here = next;
      continue;
    }
    Sibling none{nullptr, std::string(path), {}};
    for (const Member& m : here->members)
      if (!is_common_key(m.key)) none.known.push_back(m.key);
    return none;
  }
}

std::optional<Quantity> silent_quantity(const Node& node) {
  Quantity bare;
  if (const auto* i = std::get_if<std::int64_t>(&node.value)) return bare.si = static_cast<double>(*i), bare;
  if (const auto* x = std::get_if<double>(&node.value)) return bare.si = *x, bare;
  if (!node.text()) return std::nullopt;
  auto read = parse_quantity(*node.text());
  if (auto* q = std::get_if<Quantity>(&read)) return *q;
  return std::nullopt;
}

bool same_dimension(const Quantity& a, const Quantity& b) { return a.dimension == b.dimension; }

struct SpreadReader {
  const Scope& scope;
  const Table& table;
  const std::vector<std::string>& known;

  void one(const Member& m) const {
    const std::string key = "spread." + m.key;
    const Sibling sibling = find_sibling(table, m.key);
    if (!sibling.node) return tell_missing(m, key, sibling);
    const std::optional<Raw> half = read_raw(m.value, scope, key);
    const std::optional<Quantity> value = silent_quantity(*sibling.node);
    if (!half) return;
    if (!value) {
      const bool list = sibling.node->array() || sibling.node->table();
      if (list)
        scope.error(m.key_place, key, quoted(m.key) + " is no single figure", "expected the name of one figure");
      return;
    }
    judge(m, key, *half, *value);
  }

  void tell_missing(const Member& m, const std::string& key, const Sibling& sibling) const {
    for (const std::string& k : known)
      if (k == m.key) return scope.error(m.key_place, key, quoted(m.key) + " has a spread but is not given");
    const bool direct = sibling.missing == m.key;
    scope.error(m.key_place, key, "no sibling key " + quoted(m.key),
                hint(sibling.missing, direct && sibling.known.empty() ? known : sibling.known));
  }

  void judge(const Member& m, const std::string& key, const Raw& half, const Quantity& value) const {
    const Quantity& q = half.quantity;
    const bool per_cent = q.unit == "%";
    const auto fault = [&](std::string found, std::string expected) {
      scope.error(m.value.place, key, std::move(found), std::move(expected));
    };
    const std::string found = "found " + quoted(half.text);
    if (per_cent && value.temperature)
      return fault(found + ", a share of a temperature", "expected a difference, such as \"2 K\"");
    if (!per_cent && !same_dimension(q, value))
      return fault(found + ", not of the kind of " + quoted(m.key),
                   "expected a share, such as \"15 %\", or a half-width in the unit of " + quoted(m.key));
    const double width = q.temperature ? q.difference : q.si;
    if (!(width > 0)) return fault(found, "expected a half-width above zero");
    const bool free = value.temperature || value.gauge || m.key.rfind("orders.", 0) == 0;
    if (!per_cent && !free && value.si > 0 && width >= value.si)
      return fault(found + ", which reaches zero",
                   "expected a half-width below the value, or a share such as \"15 %\"");
    scope.collected->spreads.push_back({scope.trail.empty() ? m.key : scope.trail + "." + m.key, per_cent, width});
  }
};

}  // namespace

bool is_common_key(std::string_view key) { return key == "source" || key == "note" || key == "spread"; }

void read_spread(const Node& node, const Table& table, const std::vector<std::string>& known, const Scope& scope) {
  const Table* spread = node.table();
  if (!spread)
    return scope.error(node.place, "spread", found_text(node), "expected a table of sibling keys, { k = \"15 %\" }");
  const SpreadReader reader{scope, table, known};
  for (const Member& m : spread->members)
    if (!((m.key == "source" || m.key == "note") && m.value.text())) reader.one(m);
}

}  // namespace vatwright
