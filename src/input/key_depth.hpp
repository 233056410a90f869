#pragma once
#include <optional>
#include <string_view>

namespace vatwright {

/// The most parts that a dotted key may have. A real one has four; the parser of the library runs out of stack at some
/// ten thousand, so what is deeper is refused before parsing.
inline constexpr int most_key_parts = 40;

/// Line and column (in code points) where a dotted key goes beyond that; nullopt where none does. Strings and comments
/// are stepped over by the rules of TOML.
struct DeepKey {
  int line, column;
};
std::optional<DeepKey> find_deep_key(std::string_view text);

}  // namespace vatwright
