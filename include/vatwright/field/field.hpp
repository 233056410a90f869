#pragma once
#include <functional>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

#include "vatwright/field/value.hpp"

namespace vatwright {

/// What the reference page says of one key.
struct KeyDoc {
  std::string key, form, left_out, doc;
};

/// One key of a table D, declared once: how it is written, what it may be, where it goes, what it means. Reader, check,
/// the hint for a near name and the reference page all come from this.
template <class D>
struct Field {
  std::string key;
  std::string form;      ///< how a value looks
  std::string left_out;  ///< what holds where it is left out; "needed": it may not be
  std::string doc;
  std::function<void(const Node&, const Scope&, D&)> read;
};
template <class D>
using Fields = std::vector<Field<D>>;

/// What every table carries besides its own keys.
struct Common {
  Place place;
  Given<std::string> source, note;
};

/// What a key may cost to leave out.
inline constexpr std::string_view needed = "needed";
inline constexpr std::string_view optional_key = "";

namespace field_detail {
void unknown_key(const Member& member, const std::vector<std::string>& known, const Scope& scope);
void missing_key(std::string_view key, std::string_view form, const Scope& scope);
bool read_common(const Member& member, const Table& table, const std::vector<std::string>& known, const Scope& scope,
                 Common& common);
}  // namespace field_detail

template <class D>
std::vector<std::string> keys_of(const Fields<D>& fields) {
  std::vector<std::string> keys;
  for (const Field<D>& field : fields)
    if (!field.form.empty()) keys.push_back(field.key);  // without a form: a usual wrong name, told when met
  return keys;
}

/// Reads every key of a table into `draft`; unknown and missing keys are told.
template <class D>
void read_table(const Fields<D>& fields, const Table& table, const Scope& scope, D& draft) {
  const std::vector<std::string> known = keys_of(fields);
  draft.place = scope.place;
  for (const Member& member : table.members) {
    const Field<D>* field = nullptr;
    for (const Field<D>& f : fields)
      if (f.key == member.key) field = &f;
    if (field)
      field->read(member.value, scope, draft);
    else if (!field_detail::read_common(member, table, known, scope, draft))
      field_detail::unknown_key(member, known, scope);
  }
  for (const Field<D>& f : fields)
    if (f.left_out == needed && !table.find(f.key)) field_detail::missing_key(f.key, f.form, scope);
}

/// Reads a node that has to be a table.
template <class D>
bool read_table_node(const Fields<D>& fields, const Node& node, const Scope& scope, std::string_view key, D& draft) {
  const Table* table = node.table();
  if (!table)
    scope.error(node.place, key, found_text(node), "expected a table");
  else
    read_table(fields, *table, scope, draft);
  return table != nullptr;
}

template <class D>
std::vector<KeyDoc> docs_of(const Fields<D>& fields) {
  std::vector<KeyDoc> docs;
  for (const Field<D>& f : fields)
    if (!f.form.empty()) docs.push_back({f.key, f.form, f.left_out, f.doc});
  return docs;
}

}  // namespace vatwright
