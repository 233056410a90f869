#include "vatwright/field/field.hpp"

#include <algorithm>

namespace vatwright::field_detail {

void unknown_key(const Member& member, const std::vector<std::string>& known, const Scope& scope) {
  std::vector<std::string> all = known;
  all.insert(all.end(), {"source", "note", "spread"});
  const std::string what = member.value.table() ? "table" : "key";
  const std::string near = meant(member.key, all);
  scope.error(member.key_place, "", "unknown " + what + " " + quoted(member.key),
              near.empty() ? "known keys: " + joined(known, "and") : "nearest known key: " + quoted(near));
}

void missing_key(std::string_view key, std::string_view form, const Scope& scope) {
  std::string words(form);  // forms are written for the page of keys, their examples in code marks
  if (const auto at = words.find(", `"); at != words.npos) words.replace(at, 3, ", such as ");
  words.erase(std::remove(words.begin(), words.end(), '`'), words.end());
  scope.error(scope.place, key, "missing", "expected " + words);
}

bool read_common(const Member& member, const Table& table, const std::vector<std::string>& known, const Scope& scope,
                 Common& common) {
  if (member.key == "spread") {
    read_spread(member.value, table, known, scope);
    return true;
  }
  if (member.key != "source" && member.key != "note") return false;
  Given<std::string>& given = member.key == "note" ? common.note : common.source;
  given = {read_text(member.value, scope, member.key), member.value.place, true};
  return true;
}

}  // namespace vatwright::field_detail
