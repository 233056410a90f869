#pragma once
#include <string>
#include <string_view>

#include "vatwright/error/diagnostic.hpp"

namespace vatwright {

/// A fault of form in a person's words.
struct TomlHelp {
  Place place;
  std::string found, expected;
};

/// Turns what the parser said of a place of `text` into words that help with the usual mistakes: curly quotes, an
/// inline table over several lines, a table or key given twice, a unit without quotes, a decimal comma.
TomlHelp help_with(std::string_view said, std::string_view text, Place place);

}  // namespace vatwright
