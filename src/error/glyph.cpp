#include "vatwright/error/glyph.hpp"

#include <cstdint>
#include <utility>

#include "vatwright/error/expects.hpp"

namespace vatwright {
namespace {

struct Decoded {
  std::uint32_t code = 0;
  std::size_t bytes = 0;  ///< 0: no UTF-8
};

/// The well-formed byte sequences of the Unicode standard, table 3-7: shortest form, no surrogates, up to U+10FFFF.
Decoded decode(std::string_view text) {
  const auto byte = [&](std::size_t i) { return static_cast<unsigned char>(text[i]); };
  const unsigned first = byte(0);
  if (first < 0x80) return {first, 1};
  const std::size_t bytes = first >= 0xf0 ? 4 : first >= 0xe0 ? 3 : 2;
  if (first < 0xc2 || first > 0xf4 || text.size() < bytes) return {};
  std::uint32_t code = first & (0xffu >> (bytes + 1));
  for (std::size_t i = 1; i < bytes; ++i) {
    if ((byte(i) & 0xc0u) != 0x80u) return {};
    code = code << 6 | (byte(i) & 0x3fu);
  }
  const bool overlong = (bytes == 3 && code < 0x800) || (bytes == 4 && code < 0x10000);
  const bool outside = (code >= 0xd800 && code <= 0xdfff) || code > 0x10ffff;
  return overlong || outside ? Decoded{} : Decoded{code, bytes};
}

bool between(std::uint32_t code, std::uint32_t low, std::uint32_t high) { return code >= low && code <= high; }

bool is_control(std::uint32_t code) { return code < 0x20 || between(code, 0x7f, 0x9f); }

/// Marks that turn or break the line, or can not be seen at all.
bool is_unseen(std::uint32_t code) {
  return between(code, 0x200b, 0x200f) || between(code, 0x2028, 0x202e) || between(code, 0x2060, 0x206f) ||
         code == 0xfeff || code == 0x061c || between(code, 0xe0000, 0xe007f);
}

/// Roughly the wide ranges of Unicode Standard Annex 11: East Asian letters and pictures.
bool is_wide(std::uint32_t code) {
  return between(code, 0x1100, 0x115f) || between(code, 0x2e80, 0xa4cf) || between(code, 0xac00, 0xd7a3) ||
         between(code, 0xf900, 0xfaff) || between(code, 0xfe30, 0xfe6f) || between(code, 0xff00, 0xff60) ||
         between(code, 0xffe0, 0xffe6) || between(code, 0x1f300, 0x1faff) || between(code, 0x20000, 0x3fffd);
}

bool sits_on_letter(std::uint32_t code) { return between(code, 0x300, 0x36f) || between(code, 0xfe00, 0xfe0f); }

std::string hexadecimal(std::uint32_t value, int digits) {
  std::string text;
  for (int i = digits - 1; i >= 0; --i) text += "0123456789abcdef"[value >> (4 * i) & 0xfu];
  return text;
}

Glyph written_out(std::string text) {
  const std::size_t columns = text.size();
  return {std::move(text), columns};
}

}  // namespace

Glyph take_glyph(std::string_view& rest, std::size_t column) {
  VATWRIGHT_EXPECTS(!rest.empty());
  const Decoded at = decode(rest);
  const std::string_view raw = rest.substr(0, at.bytes == 0 ? 1 : at.bytes);
  rest.remove_prefix(raw.size());
  if (at.bytes == 0) return written_out("\\x" + hexadecimal(static_cast<unsigned char>(raw[0]), 2));
  if (at.code == '\t') return written_out(std::string(4 - column % 4, ' '));
  if (is_control(at.code)) return written_out("\\x" + hexadecimal(at.code, 2));
  if (is_unseen(at.code)) return written_out("\\u" + hexadecimal(at.code, at.code > 0xffff ? 5 : 4));
  return {std::string(raw), sits_on_letter(at.code) ? 0u : is_wide(at.code) ? 2u : 1u};
}

std::string harmless(std::string_view text) {
  std::string shown;
  while (!text.empty()) shown += take_glyph(text, 3).shown;
  return shown;
}

}  // namespace vatwright
