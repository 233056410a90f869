#include "excerpt.hpp"

#include <algorithm>

#include "vatwright/error/glyph.hpp"

namespace vatwright {
namespace {

constexpr std::size_t before_place = 44;  // columns kept before the place where the line is cut
constexpr std::size_t widest = 70;

}  // namespace

Lines::Lines(std::string_view text) : text_(text), begins_{0} {
  if (text_.starts_with("\xef\xbb\xbf")) begins_[0] = 3;
  for (std::size_t i = text_.find('\n'); i != std::string_view::npos; i = text_.find('\n', i + 1))
    begins_.push_back(i + 1);
}

std::string_view Lines::line(int number) const {
  if (number < 1 || static_cast<std::size_t>(number) > begins_.size()) return {};
  const std::size_t begin = begins_[static_cast<std::size_t>(number) - 1];
  std::string_view found = text_.substr(begin, std::min(text_.find('\n', begin), text_.size()) - begin);
  if (found.ends_with('\r')) found.remove_suffix(1);
  return found;
}

Excerpt excerpt(std::string_view line, int column) {
  std::vector<Glyph> glyphs;
  std::size_t width = 0, place_column = 0, place = static_cast<std::size_t>(std::max(column, 1)) - 1;
  while (!line.empty() && glyphs.size() < place + widest) {
    if (glyphs.size() == place) place_column = width;
    glyphs.push_back(take_glyph(line, width));
    width += glyphs.back().columns;
  }
  if (glyphs.size() <= place) place_column = width;
  place = std::min(place, glyphs.size());

  std::size_t first = 0, cut_columns = 0;
  if (width > widest || !line.empty())
    while (first < place && place_column - cut_columns > before_place) cut_columns += glyphs[first++].columns;

  Excerpt shown;
  shown.line = shown.mark = first > 0 ? "..." : "";
  for (char& dot : shown.mark) dot = ' ';
  shown.mark += std::string(place_column - cut_columns, ' ') + '^';
  std::size_t used = 0;
  for (std::size_t i = first; i < glyphs.size(); ++i) {
    used += glyphs[i].columns;
    if (used > widest && i > place) return shown.line += "...", shown;
    shown.line += glyphs[i].shown;
  }
  if (!line.empty()) shown.line += "...";
  return shown;
}

}  // namespace vatwright
