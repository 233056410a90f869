#pragma once
#include "vatwright/field/node.hpp"

namespace vatwright {

/// Puts `over` upon `base`: tables merge deeply, every other value (a list too) is replaced whole. Values keep the
/// places they were written at; new keys follow those of `base`.
void merge_into(Table& base, const Table& over);

/// Removes a key, where it is.
void remove_key(Table& table, std::string_view key);

}  // namespace vatwright
