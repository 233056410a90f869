#include "vatwright/field/node.hpp"

namespace vatwright {

const Node* Table::find(std::string_view key) const {
  for (const Member& member : members)
    if (member.key == key) return &member.value;
  return nullptr;
}

Node* Table::find(std::string_view key) {
  for (Member& member : members)
    if (member.key == key) return &member.value;
  return nullptr;
}

}  // namespace vatwright
