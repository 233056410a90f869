#include "cases.hpp"

#include <algorithm>

#include "vatwright/field/merge.hpp"
#include "vatwright/field/scope.hpp"

namespace vatwright {
namespace {

bool is_called(const Table& table, const std::string& name, const char* first, const char* second) {
  for (const char* key : {first, second})
    if (const Node* node = table.find(key))
      if (node->text()) return *node->text() == name;
  return false;
}

/// The members of `over` upon the tables of a list, each upon the one that bears its name.
void merge_by_name(Node& list, const Node& over, const char* first, const char* second, const std::string& subject,
                   const std::string& what, Diagnostics& diagnostics) {
  Array& array = std::get<Array>(list.value);
  std::vector<std::string> known;
  for (const Node& item : array.items)
    for (const char* key : {first, second})
      if (const Node* node = item.table() ? item.table()->find(key) : nullptr; node && node->text()) {
        known.push_back(*node->text());
        break;
      }
  for (const Member& m : over.table()->members) {
    Table* found = nullptr;
    for (Node& item : array.items)
      if (item.table() && is_called(*item.table(), m.key, first, second)) found = item.table();
    if (!found)
      diagnostics.error(m.key_place, subject, what + "." + m.key, "no " + what + " " + quoted(m.key),
                        "expected one of the files; " + hint(m.key, known));
    else if (!m.value.table())
      diagnostics.error(m.value.place, subject, what + "." + m.key, found_text(m.value),
                        "expected its keys, such as " + what + "." + m.key + ".temperature = ..");
    else
      merge_into(*found, *m.value.table());
  }
}

/// A case changes utilities that the inventory lists; it adds none.
bool knows_utilities(const Node& over, const Node* base, const std::string& subject, Diagnostics& diagnostics) {
  if (!over.table()) return true;
  std::vector<std::string> known;
  if (base && base->table())
    for (const Member& m : base->table()->members) known.push_back(m.key);
  bool all = true;
  for (const Member& m : over.table()->members) {
    if (std::find(known.begin(), known.end(), m.key) != known.end()) continue;
    diagnostics.error(m.key_place, subject, "utility." + m.key, "no utility " + quoted(m.key),
                      "expected one of the inventory; " + hint(m.key, known));
    all = false;
  }
  return all;
}

}  // namespace

void apply_case(const Table& overrides, const std::string& name, Table& inventory, Table& duty,
                Diagnostics& diagnostics) {
  const std::string subject = "case " + name;
  for (const Member& m : overrides.members) {
    if (m.key == "note" || m.key == "source") continue;
    if (m.key == "case" || m.key == "format") {
      diagnostics.error(m.key_place, subject, m.key, "found " + m.key + " within a case",
                        "expected keys of an inventory or a duty");
      continue;
    }
    Table& file = m.key == "site" || m.key == "utility" || m.key == "vessel" ? inventory : duty;
    Node* base = file.find(m.key);
    const bool by_name = base && base->array() && m.value.table();
    if (by_name && m.key == "vessel")
      merge_by_name(*base, m.value, "tag", "tag", subject, "vessel", diagnostics);
    else if (by_name && m.key == "reaction")
      merge_by_name(*base, m.value, "name", "equation", subject, "reaction", diagnostics);
    else if (by_name && m.key == "feed")
      merge_by_name(*base, m.value, "name", "name", subject, "feed", diagnostics);
    else if (m.key == "utility" && !knows_utilities(m.value, base, subject, diagnostics)) {
      continue;
    } else {
      Table one;
      one.members.push_back(m);
      merge_into(file, one);
    }
  }
}

}  // namespace vatwright
