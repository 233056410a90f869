#pragma once
#include <optional>
#include <string>
#include <string_view>

#include "vatwright/error/diagnostic.hpp"

namespace vatwright {

/// The most bytes that a file may have: a real one has some thousand.
inline constexpr std::size_t most_bytes = 16u << 20;

/// The bytes of a file, or why they could not be had, in words ("no such file", "a folder, not a file").
struct Bytes {
  std::string text;
  std::string fault;
};
Bytes read_bytes(const std::string& path);

/// Whether a path names something that is neither a file nor a folder: reading it might wait without end.
bool is_device(const std::string& path);

/// SHA-256 of bytes, 64 hexadecimal digits (FIPS 180-4, by libmd).
std::string sha256_of(std::string_view bytes);

/// Where a text stops being UTF-8 text, with what stands there in words; nullopt where it is text throughout.
struct NotText {
  int line = 1, column = 1;
  std::string what;
};
std::optional<NotText> not_text(std::string_view bytes);

}  // namespace vatwright
