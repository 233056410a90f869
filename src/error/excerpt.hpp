#pragma once
#include <string>
#include <string_view>
#include <vector>

#include "vatwright/error/diagnostic.hpp"

namespace vatwright {

/// Where the lines of a text begin, so that many places in one file are found without reading it again.
class Lines {
 public:
  explicit Lines(std::string_view text);
  /// Line `number`, from 1, without its end and without a byte order mark; empty where there is none.
  [[nodiscard]] std::string_view line(int number) const;

 private:
  std::string_view text_;
  std::vector<std::size_t> begins_;
};

/// The line of a place and, under it, a mark below the code point `column` (from 1; past the end: just behind it).
struct Excerpt {
  std::string line, mark;
};

/// Both lines are valid UTF-8 of at most about 76 columns: a longer line is cut around the place, "..." where it was
/// cut.
Excerpt excerpt(std::string_view line, int column);

}  // namespace vatwright
