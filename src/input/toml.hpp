#pragma once
#include <optional>
#include <string_view>

#include "vatwright/error/diagnostic.hpp"
#include "vatwright/field/node.hpp"

namespace vatwright {

/// Reads a TOML text into tables whose members stand in the order of the file. source: its number in `diagnostics`,
/// where the first fault of form is told (nullopt then), with a word of help where the mistake is a usual one.
std::optional<Table> parse_toml(std::string_view text, int source, Diagnostics& diagnostics);

}  // namespace vatwright
