#pragma once
#include <string>

/// Whether every byte belongs to a well-formed code point (Unicode standard, table 3-7, written as a small automaton).
inline bool is_utf8(const std::string& text) {
  int more = 0;
  unsigned low = 0x80, high = 0xbf;
  for (const char c : text) {
    const auto b = static_cast<unsigned char>(c);
    if (more > 0) {
      if (b < low || b > high) return false;
      low = 0x80, high = 0xbf, --more;
    } else if (b >= 0x80) {
      if (b < 0xc2 || b > 0xf4) return false;
      more = b >= 0xf0 ? 3 : b >= 0xe0 ? 2 : 1;
      if (b == 0xe0) low = 0xa0;
      if (b == 0xed) high = 0x9f;
      if (b == 0xf0) low = 0x90;
      if (b == 0xf4) high = 0x8f;
    }
  }
  return more == 0;
}
