#pragma once
#include <optional>
#include <string>
#include <string_view>
#include <variant>
#include <vector>

#include "vatwright/hookup/expression.hpp"

namespace vatwright {

/// A word of a hookup text. column: of its first character, from 1, in code points.
struct Token {
  enum class Is { word, quoted, open, close, share, end };
  Is is = Is::end;
  int column = 0;
  std::string text;    ///< a word as it stands, a quoted tag without its quotes
  double percent = 0;  ///< of a share
};

/// Cuts a text into words; the last is Is::end. `40%`, `40 %` and `40%T-7` begin with a share, unless the word is a
/// tag.
std::variant<std::vector<Token>, HookupFault> cut_words(std::string_view text, const std::vector<std::string>& tags);

/// The number before a per cent sign at the start of a word, and how many characters both take.
struct Percent {
  double value = 0;
  std::size_t length = 0;
};
std::optional<Percent> leading_percent(std::string_view word);

}  // namespace vatwright
