#pragma once
#include <cstdint>
#include <memory>
#include <string>
#include <string_view>
#include <utility>
#include <variant>
#include <vector>

#include "vatwright/error/diagnostic.hpp"

namespace vatwright {

struct Node;

/// One key of a table with the place where it stands.
struct Member;

/// A table, members in the order of the file.
struct Table {
  std::vector<Member> members;
  [[nodiscard]] const Node* find(std::string_view key) const;
  [[nodiscard]] Node* find(std::string_view key);
};

struct Array {
  std::vector<Node> items;
};

/// A value read from a file: text, number, truth, array or table, with its place. The library that parsed it is not
/// visible from here on. `other` holds what the format has no use for (a date), as its text.
struct Node {
  struct Other {
    std::string what;
  };
  std::variant<std::string, std::int64_t, double, bool, Array, Table, Other> value;
  Place place;

  [[nodiscard]] const Table* table() const { return std::get_if<Table>(&value); }
  [[nodiscard]] Table* table() { return std::get_if<Table>(&value); }
  [[nodiscard]] const Array* array() const { return std::get_if<Array>(&value); }
  [[nodiscard]] const std::string* text() const { return std::get_if<std::string>(&value); }
};

struct Member {
  std::string key;
  Place key_place;
  Node value;
};

}  // namespace vatwright
