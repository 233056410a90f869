#include "toml.hpp"

#include <algorithm>
#include <sstream>
#include <string>

#include "file.hpp"
#include "key_depth.hpp"
#include "toml_help.hpp"

#ifndef TOML_HEADER_ONLY
#define TOML_HEADER_ONLY 0
#endif
#include <toml++/toml.h>

namespace vatwright {
namespace {

constexpr int most_depth = 64;  // tables and lists within one another

/// Turns the library's nodes into ours.
class Converter {
 public:
  Converter(int source, Diagnostics& diagnostics) : source_(source), diagnostics_(diagnostics) {}

  Table table(const toml::table& from, int depth) {
    Table to;
    for (const auto& [key, node] : from)
      to.members.push_back({std::string(key.str()), place(key.source()), convert(node, depth + 1)});
    std::stable_sort(to.members.begin(), to.members.end(), [](const Member& a, const Member& b) {
      return std::pair(a.key_place.line, a.key_place.column) < std::pair(b.key_place.line, b.key_place.column);
    });
    return to;
  }

 private:
  Place place(const toml::source_region& region) const {
    return {source_, static_cast<int>(region.begin.line), static_cast<int>(region.begin.column)};
  }
  Array array(const toml::array& from, int depth) {
    Array to;
    for (const toml::node& item : from) to.items.push_back(convert(item, depth + 1));
    return to;
  }
  Node convert(const toml::node& node, int depth) {
    Node to;
    to.place = place(node.source());
    if (depth > most_depth) {
      if (!told_depth_) diagnostics_.error(to.place, "", "", "tables or lists nested more than 64 deep");
      told_depth_ = true;
    } else if (const auto* t = node.as_table())
      to.value = table(*t, depth);
    else if (const auto* a = node.as_array())
      to.value = array(*a, depth);
    else if (const auto* s = node.as_string())
      to.value = s->get();
    else if (const auto* i = node.as_integer())
      to.value = i->get();
    else if (const auto* x = node.as_floating_point())
      to.value = x->get();
    else if (const auto* b = node.as_boolean())
      to.value = b->get();
    else
      to.value = Node::Other{date_text(node)};
    return to;
  }
  static std::string date_text(const toml::node& node) {
    std::ostringstream text;
    if (const auto* d = node.as_date()) text << *d;
    if (const auto* t = node.as_time()) text << *t;
    if (const auto* dt = node.as_date_time()) text << *dt;
    return "a date or time, " + text.str();
  }

  int source_;
  Diagnostics& diagnostics_;
  bool told_depth_ = false;
};

bool is_text(std::string_view text, int source, Diagnostics& diagnostics) {
  if (const auto fault = not_text(text)) {
    diagnostics.error({source, fault->line, fault->column}, "", "", "found " + fault->what,
                      "expected a text file in UTF-8");
    return false;
  }
  return true;
}

}  // namespace

std::optional<Table> parse_toml(std::string_view text, int source, Diagnostics& diagnostics) {
  if (!is_text(text, source, diagnostics)) return std::nullopt;
  if (const auto deep = find_deep_key(text)) {
    diagnostics.error({source, deep->line, deep->column}, "", "",
                      "a key of more than " + std::to_string(most_key_parts) + " parts joined by dots",
                      "expected a few at most, such as jacket.U");
    return std::nullopt;
  }
  try {
    const toml::table root = toml::parse(text, std::string_view{});
    const bool had_errors = diagnostics.has_errors();
    Table table = Converter(source, diagnostics).table(root, 0);
    if (!had_errors && diagnostics.has_errors()) return std::nullopt;
    return table;
  } catch (const toml::parse_error& fault) {
    const auto& at = fault.source().begin;
    const Place place{source, static_cast<int>(at.line), static_cast<int>(at.column)};
    const TomlHelp help = help_with(fault.description(), text, place);
    diagnostics.error(help.place, "", "", help.found, help.expected);
    return std::nullopt;
  }
}

}  // namespace vatwright
