#pragma once
#include <charconv>
#include <string>

namespace vatwright {

/// A number in a message: six digits, whatever its size.
inline std::string number_text(double value) {
  char text[32];
  const auto end = std::to_chars(text, text + sizeof text, value, std::chars_format::general, 6).ptr;
  return {text, end};
}

}  // namespace vatwright
