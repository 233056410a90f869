#include "toml_help.hpp"

#include <algorithm>

namespace vatwright {
namespace {

std::string_view line_of(std::string_view text, int number) {
  for (int i = 1; i < number; ++i) {
    const std::size_t end = text.find('\n');
    if (end == text.npos) return {};
    text.remove_prefix(end + 1);
  }
  return text.substr(0, std::min(text.find('\n'), text.size()));
}

int letters(std::string_view text) {
  return static_cast<int>(
      std::count_if(text.begin(), text.end(), [](char c) { return (static_cast<unsigned char>(c) & 0xC0) != 0x80; }));
}

std::string between_marks(std::string_view said) {
  const std::size_t from = said.find('\''), to = said.rfind('\'');
  return from == said.npos || to <= from + 1 ? "" : std::string(said.substr(from + 1, to - from - 1));
}

bool has(std::string_view text, std::string_view part) { return text.find(part) != text.npos; }

/// The place of the first curly quote of a line, or 0.
int curly_quote(std::string_view line) {
  std::size_t first = line.npos;
  for (const std::string_view quote : {"\u201c", "\u201d", "\u201e", "\u2018", "\u2019"})
    first = std::min(first, line.find(quote));
  return first == line.npos ? 0 : letters(line.substr(0, first)) + 1;
}

bool digit_before(std::string_view line, int column) {
  std::string_view head = line;
  while (letters(head) >= column && !head.empty()) head.remove_suffix(1);
  while (!head.empty() && head.back() == ' ') head.remove_suffix(1);
  return !head.empty() && head.back() >= '0' && head.back() <= '9';
}

std::string plain_words(std::string_view said) {
  constexpr std::string_view head = "Error while parsing ";
  std::string words(said.substr(0, head.size()) == head ? said.substr(head.size()) : said);
  return "not TOML: " + words;
}

}  // namespace

TomlHelp help_with(std::string_view said, std::string_view text, Place place) {
  const std::string_view line = line_of(text, place.line);
  if (const int column = curly_quote(line); column > 0 && column <= place.column + 1)
    return {{place.source, place.line, column},
            "found curly quotes, as word processors make them",
            "expected plain ones: \""};
  if (has(said, "inline table") && has(said, "saw '\\n'"))
    return {place, "found a line break within { }", "expected an inline table on one line, or a [table] of its own"};
  if (has(said, "cannot redefine existing table"))
    return {place, "table \"" + between_marks(said) + "\" is given twice", "expected all its keys in one place"};
  if (has(said, "cannot redefine existing array") && has(said, "as table"))
    return {place, "found a [table] after a [[list of tables]] of that name", "expected [[ ]] each time"};
  if (has(said, "cannot redefine existing") && has(said, "key-value pair"))
    return {place, "the key is given twice in one table", "expected it once"};
  if (has(said, "saw ','") && digit_before(line, place.column))
    return {place, "found a comma after a number",
            "expected a decimal point, and a value with a unit in quotes, such as \"6.3 m3\""};
  if (has(said, "expected a comment or whitespace") && digit_before(line, place.column))
    return {place, "found more after a number", "expected a value with a unit in quotes, such as \"6.3 m3\""};
  if (has(said, "could not determine value type"))
    return {place, "found a value that is no number, text, list or table",
            "expected text and units in quotes, such as \"6.3 m3\""};
  if (has(said, "boolean")) return {place, plain_words(said), "expected true or false, small letters; text in quotes"};
  return {place, plain_words(said), ""};
}

}  // namespace vatwright
