#include "vatwright/field/merge.hpp"

#include <algorithm>

namespace vatwright {

void merge_into(Table& base, const Table& over) {
  for (const Member& member : over.members) {
    Node* old = base.find(member.key);
    if (!old)
      base.members.push_back(member);
    else if (old->table() && member.value.table())
      merge_into(*old->table(), *member.value.table());
    else
      *old = member.value;
  }
}

void remove_key(Table& table, std::string_view key) {
  auto& members = table.members;
  members.erase(std::remove_if(members.begin(), members.end(), [&](const Member& m) { return m.key == key; }),
                members.end());
}

}  // namespace vatwright
