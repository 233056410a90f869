#pragma once
#include <string>
#include <string_view>
#include <utility>
#include <vector>

#include "vatwright/field/field.hpp"

namespace vatwright {

// Makers of a Field for keys that hold tables. `fields` is a function, so that a list of keys is made once, when first
// asked for.

template <class D>
using FieldList = const Fields<D>& (*)();

/// A table under a key: `[vessel.jacket]`.
template <class D, class S>
Field<D> table(std::string key, FieldList<S> fields, Given<S> D::*member, std::string doc,
               std::string_view left_out = "") {
  auto read = [key, fields, member](const Node& n, const Scope& s, D& d) {
    Given<S>& given = d.*member;
    given.place = n.place;
    given.written = true;
    S draft;
    if (read_table_node(fields(), n, s.inside(key, n.place), "", draft)) given.value = std::move(draft);
  };
  return {key, "a table", std::string(left_out), std::move(doc), read};
}

/// Several tables in a list: `[[vessel]]`. subject: how messages name one of them, told from its keys and its number.
/// A single table counts as a list of one where `one_will_do`.
template <class D, class S>
Field<D> list_of_tables(std::string key, FieldList<S> fields, Given<std::vector<S>> D::*member,
                        std::string (*subject)(const Table&, std::size_t number), bool one_will_do, std::string doc,
                        std::string_view left_out = "") {
  auto read_one = [key, fields, subject](const Node& n, const Scope& s, std::size_t number, std::vector<S>& to) {
    const Table* t = n.table();
    if (!t) return s.error(n.place, key, found_text(n), "expected a table");
    const std::string name = subject(*t, number);
    const std::string step = key + "." + name.substr(name.rfind(' ') == std::string::npos ? 0 : name.find(' ') + 1);
    S draft;
    read_table(fields(), *t, s.named(name, step, n.place), draft);
    to.push_back(std::move(draft));
  };
  auto read = [key, member, one_will_do, read_one](const Node& n, const Scope& s, D& d) {
    Given<std::vector<S>>& given = d.*member;
    given.place = n.place;
    given.written = true;
    std::vector<S> list;
    if (const Array* array = n.array()) {
      for (std::size_t i = 0; i < array->items.size(); ++i) read_one(array->items[i], s, i, list);
      given.value = std::move(list);
    } else if (one_will_do && n.table()) {
      read_one(n, s, 0, list);
      given.value = std::move(list);
    } else {
      s.error(n.place, key, found_text(n), "expected a list of tables, [[" + key + "]]");
    }
  };
  return {key, one_will_do ? "a table, or a list of tables" : "a list of tables", std::string(left_out), std::move(doc),
          read};
}

/// Tables under names that the user chooses: `[utility.tower-water]`. Messages name one "utility tower-water".
template <class D, class S>
Field<D> tables_by_name(std::string key, FieldList<S> fields, Given<ByName<S>> D::*member, std::string doc,
                        std::string_view left_out = "") {
  auto read = [key, fields, member](const Node& n, const Scope& s, D& d) {
    Given<ByName<S>>& given = d.*member;
    given.place = n.place;
    given.written = true;
    const Table* t = n.table();
    if (!t) return s.error(n.place, key, found_text(n), "expected a table for each name, [" + key + ".NAME]");
    ByName<S> list;
    for (const Member& m : t->members) {
      if ((m.key == "note" || m.key == "source") && m.value.text()) continue;
      const std::string subject = s.top ? key + " " + m.key : s.subject + ", " + key + " " + m.key;
      const Scope inner = s.named(subject, key + "." + m.key, m.value.place);
      S draft;
      if (read_table_node(fields(), m.value, inner, "", draft))
        list.push_back({m.key, m.key_place, std::move(draft), m.value.place});
    }
    given.value = std::move(list);
  };
  return {key, "a table for each name", std::string(left_out), std::move(doc), read};
}

}  // namespace vatwright
