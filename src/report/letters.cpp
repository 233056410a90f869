#include "letters.hpp"

#include <algorithm>
#include <array>
#include <utility>

namespace vatwright {
namespace {

int length_of(unsigned char first) {
  if (first < 0x80) return 1;
  if (first >= 0xC2 && first < 0xE0) return 2;
  if (first >= 0xE0 && first < 0xF0) return 3;
  if (first >= 0xF0 && first < 0xF5) return 4;
  return 0;
}

using Ranges = std::pair<char32_t, char32_t>;

// Unicode: combining diacritical marks and variation selectors, zero-width marks.
constexpr std::array<Ranges, 7> combining = {{{0x300, 0x36F},
                                              {0x483, 0x489},
                                              {0x591, 0x5BD},
                                              {0x200B, 0x200F},
                                              {0x202A, 0x202E},
                                              {0x20D0, 0x20FF},
                                              {0xFE00, 0xFE0F}}};
// Unicode, East Asian Width: the blocks whose letters are wide or full width.
constexpr std::array<Ranges, 8> wide = {{{0x1100, 0x115F},
                                         {0x2E80, 0x303E},
                                         {0x3041, 0xA4CF},
                                         {0xAC00, 0xD7A3},
                                         {0xF900, 0xFAFF},
                                         {0xFE30, 0xFE6F},
                                         {0xFF00, 0xFF60},
                                         {0x1F300, 0x3FFFD}}};

template <std::size_t n>
bool within(const std::array<Ranges, n>& ranges, char32_t letter) {
  return std::any_of(ranges.begin(), ranges.end(),
                     [letter](const Ranges& range) { return range.first <= letter && letter <= range.second; });
}

// Latin-1 from U+00A0 on, and Latin Extended-A from U+0100 on, letter by letter.
constexpr std::string_view latin_1 =
    " !cL?Y|S\"Ca<--R-o~23'uP.,1o>?"
    "??"
    "?"
    "AAAAAAACEEEEIIIIDNOOOOOxOUUUUYTsaaaaaaaceeeeiiiidnooooo/ouuuuyty";
constexpr std::string_view latin_a =
    "AaAaAaCcCcCcCcDdDdEeEeEeEeEeGgGgGgGgHhHhIiIiIiIiIiIiJjKkkLlLlLlL"
    "lLlNnNnNnnNnOoOoOoOoRrRrRrSsSsSsSsTtTtTtUuUuUuUuUuUuWwYyYZzZzZzs";
static_assert(latin_1.size() == 96 && latin_a.size() == 128);

constexpr std::array<std::pair<char32_t, char>, 16> likeness = {{{0x2010, '-'},
                                                                 {0x2011, '-'},
                                                                 {0x2012, '-'},
                                                                 {0x2013, '-'},
                                                                 {0x2014, '-'},
                                                                 {0x2018, '\''},
                                                                 {0x2019, '\''},
                                                                 {0x201C, '"'},
                                                                 {0x201D, '"'},
                                                                 {0x2026, '.'},
                                                                 {0x2190, '<'},
                                                                 {0x2192, '>'},
                                                                 {0x2212, '-'},
                                                                 {0x2500, '-'},
                                                                 {0x2502, '|'},
                                                                 {0x0394, 'D'}}};

}  // namespace

char32_t next_letter(std::string_view text, std::size_t& at) {
  const auto first = static_cast<unsigned char>(text[at]);
  const int length = length_of(first);
  if (length < 2 || at + static_cast<std::size_t>(length) > text.size()) {
    ++at;
    return length == 1 ? first : not_a_letter;
  }
  char32_t letter = first & (0xFFu >> (length + 1));
  for (int i = 1; i < length; ++i) {
    const auto next = static_cast<unsigned char>(text[at + static_cast<std::size_t>(i)]);
    if ((next & 0xC0u) != 0x80u) {
      ++at;
      return not_a_letter;
    }
    letter = (letter << 6) | (next & 0x3Fu);
  }
  const bool overlong = (length == 3 && letter < 0x800) || (length == 4 && letter < 0x10000);
  const bool surrogate = letter >= 0xD800 && letter < 0xE000;
  at += overlong || surrogate || letter > 0x10FFFF ? 1 : static_cast<std::size_t>(length);
  return overlong || surrogate || letter > 0x10FFFF ? not_a_letter : letter;
}

int width_of(char32_t letter) {
  if (within(combining, letter)) return 0;
  return within(wide, letter) ? 2 : 1;
}

char ascii_of(char32_t letter) {
  if (letter < 0x80) return static_cast<char>(letter);
  if (letter >= 0xA0 && letter < 0x100) return latin_1[letter - 0xA0];
  if (letter >= 0x100 && letter < 0x180) return latin_a[letter - 0x100];
  const auto* known =
      std::find_if(likeness.begin(), likeness.end(), [letter](const auto& pair) { return pair.first == letter; });
  return known == likeness.end() ? '?' : known->second;
}

}  // namespace vatwright
