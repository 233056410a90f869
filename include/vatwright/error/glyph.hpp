#pragma once
#include <cstddef>
#include <string>
#include <string_view>

namespace vatwright {

/// One code point of a text of any bytes, ready to be shown: valid UTF-8 that moves no cursor and turns no direction.
/// Control characters, marks of direction and bytes that are no UTF-8 are written out as \x1b, \u202e, \xff.
struct Glyph {
  std::string shown;
  std::size_t columns = 1;  ///< of a terminal: 0 for marks that sit on the letter before, 2 for wide letters
};

/// Takes the next code point off `rest`, which must not be empty; a byte that is no UTF-8 counts as one. A tab is
/// written as spaces up to the next multiple of 4, counted from `column`.
Glyph take_glyph(std::string_view& rest, std::size_t column);

/// The whole text so written out, on one line; a tab becomes one space.
std::string harmless(std::string_view text);

}  // namespace vatwright
