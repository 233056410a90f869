#include "letters.hpp"

#include <algorithm>
#include <array>
#include <utility>

namespace vatwright {
namespace {

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

/// The code point of one letter of valid UTF-8.
char32_t code_of(std::string_view letter) {
  const auto first = static_cast<unsigned char>(letter.front());
  if (letter.size() == 1) return first;
  char32_t code = first & (0xFFu >> (letter.size() + 1));
  for (char byte : letter.substr(1)) code = code << 6 | (static_cast<unsigned char>(byte) & 0x3Fu);
  return code;
}

}  // namespace

char ascii_of(std::string_view letter) {
  const char32_t code = code_of(letter);
  if (code < 0x80) return static_cast<char>(code);
  if (code >= 0xA0 && code < 0x100) return latin_1[code - 0xA0];
  if (code >= 0x100 && code < 0x180) return latin_a[code - 0x100];
  const auto* known =
      std::find_if(likeness.begin(), likeness.end(), [code](const auto& pair) { return pair.first == code; });
  return known == likeness.end() ? '?' : known->second;
}

}  // namespace vatwright
