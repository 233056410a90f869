#include "wording.hpp"

#include <array>
#include <charconv>
#include <cmath>
#include <cstdint>

namespace vatwright {
namespace {

constexpr std::size_t most_shown = 60;

/// Bytes of the UTF-8 code point at the front, 0 where it is none or one that must not reach a terminal.
std::size_t printable_bytes(std::string_view text) {
  const auto byte = [&](std::size_t i) { return static_cast<unsigned char>(text[i]); };
  const unsigned first = byte(0);
  if (first < 0x80) return first < 0x20 || first == 0x7f ? 0 : 1;
  const std::size_t bytes = first >= 0xf0 ? 4 : first >= 0xe0 ? 3 : 2;
  if (first < 0xc2 || first > 0xf4 || text.size() < bytes) return 0;
  std::uint32_t code = first & (0xffu >> (bytes + 1));
  for (std::size_t i = 1; i < bytes; ++i) {
    if ((byte(i) & 0xc0u) != 0x80u) return 0;
    code = code << 6 | (byte(i) & 0x3fu);
  }
  const bool overlong = (bytes == 3 && code < 0x800) || (bytes == 4 && code < 0x10000);
  const bool outside = (code >= 0xd800 && code <= 0xdfff) || code > 0x10ffff;
  const bool turns_text = (code >= 0x200b && code <= 0x200f) || (code >= 0x2028 && code <= 0x202e) ||
                          (code >= 0x2060 && code <= 0x206f) || code == 0xfeff || code < 0xa0;
  return overlong || outside || turns_text ? 0 : bytes;
}

}  // namespace

std::string quoted(std::string_view text) {
  std::string shown = "\"";
  for (std::size_t count = 0; !text.empty(); ++count) {
    if (count == most_shown) return shown + "...\"";
    const std::size_t bytes = printable_bytes(text);
    shown += bytes == 0 ? std::string_view("?") : text.substr(0, bytes);
    text.remove_prefix(bytes == 0 ? 1 : bytes);
  }
  return shown + "\"";
}

std::string brief(double value) {
  if (value == 0) return "0";
  std::array<char, 40> digits{};
  const double size = std::abs(value);
  // to_chars writes the rounded figure; trailing zeros go, since general format at a precision drops them
  const auto format = size >= 9.9995e-4 && size < 9.9995e5 ? std::chars_format::fixed : std::chars_format::scientific;
  int decimals = 3;
  if (format == std::chars_format::fixed) {
    decimals = 3 - static_cast<int>(std::floor(std::log10(size)));
    if (decimals < 0) value = std::round(value * std::pow(10.0, decimals)) / std::pow(10.0, decimals), decimals = 0;
  }
  const auto end = std::to_chars(digits.data(), digits.data() + digits.size(), value, format, decimals).ptr;
  std::string text(digits.data(), end);
  const std::size_t e = text.find('e');
  std::string tail = e == std::string::npos ? "" : text.substr(e);
  text.resize(text.size() - tail.size());
  if (text.find('.') != std::string::npos) {
    while (text.back() == '0') text.pop_back();
    if (text.back() == '.') text.pop_back();
  }
  return text + tail;
}

std::size_t leading_space(std::string_view text) {
  for (const std::string_view space : {" ", "\t", "\xc2\xa0", "\xe2\x80\xaf", "\xe2\x80\x89"})
    if (text.starts_with(space)) return space.size();
  return 0;
}

std::string_view trimmed(std::string_view text) {
  while (const std::size_t bytes = leading_space(text)) text.remove_prefix(bytes);
  for (bool more = true; more;) {
    more = false;
    for (const std::string_view space : {" ", "\t", "\xc2\xa0", "\xe2\x80\xaf", "\xe2\x80\x89"})
      if (text.ends_with(space)) text.remove_suffix(space.size()), more = true;
  }
  return text;
}

}  // namespace vatwright
