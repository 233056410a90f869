#include "vatwright/report/layout.hpp"

#include <algorithm>
#include <numeric>

#include "letters.hpp"
#include "vatwright/error/glyph.hpp"

namespace vatwright {
namespace {

constexpr int gap = 2;            // between columns
constexpr int narrowest = 8;      // a column that gives way keeps this much
constexpr int widest_label = 24;  // labels of items beyond this are wrapped

std::string spaces(int n) { return std::string(static_cast<std::size_t>(std::max(n, 0)), ' '); }

std::string padded(const std::string& text, int width, Align align) {
  std::string line = text;
  return line.insert(align == Align::left ? line.size() : 0, spaces(width - width_of(text)));
}

std::string without_trailing(std::string text) {
  text.erase(text.find_last_not_of(' ') + 1);
  return text;
}

/// The longest beginning of `word` that fits `width` columns (one letter at the least), in bytes.
std::size_t fitting(std::string_view word, int width) {
  std::string_view rest = word;
  int used = 0;
  while (!rest.empty()) {
    std::string_view next = rest;
    used += static_cast<int>(take_glyph(next, 0).columns);
    if (used > width && rest.size() != word.size()) break;
    rest = next;
  }
  return word.size() - rest.size();
}

std::vector<std::string> split(const std::string& text, char at) {
  std::vector<std::string> parts(1);
  for (char letter : text) {
    if (letter == at)
      parts.emplace_back();
    else
      parts.back() += letter;
  }
  return parts;
}

using Block = std::vector<std::vector<std::string>>;  // per column the lines of one cell

std::string joined_line(const Block& block, std::size_t line, const std::vector<Column>& columns,
                        const std::vector<int>& widths) {
  std::string text;
  for (std::size_t j = 0; j < columns.size(); ++j) {
    const std::string cell = line < block[j].size() ? block[j][line] : "";
    if (j > 0) text += spaces(gap);
    text += padded(cell, widths[j], columns[j].align);
  }
  return without_trailing(text);
}

/// Fills figures up with spaces behind, so that flush right their decimal points meet.
void align_points(Table& table, std::size_t column) {
  const auto behind = [](const std::string& cell) {
    const bool number = cell.find_first_of("0123456789") != std::string::npos;
    return number ? cell.size() - std::min(cell.find_first_of(".e"), cell.size()) : std::string::npos;
  };
  std::size_t most = 0;
  for (const auto& row : table.rows)
    if (behind(row[column]) != std::string::npos) most = std::max(most, behind(row[column]));
  for (auto& row : table.rows)
    if (behind(row[column]) != std::string::npos) row[column].append(most - behind(row[column]), ' ');
}

std::vector<int> natural_widths(const Table& table) {
  std::vector<int> widths;
  for (std::size_t j = 0; j < table.columns.size(); ++j) {
    int widest = 0;
    for (const std::string& line : split(table.columns[j].head, '\n')) widest = std::max(widest, width_of(line));
    for (const auto& row : table.rows) widest = std::max(widest, width_of(row[j]));
    widths.push_back(widest);
  }
  return widths;
}

/// Takes from the widest column that wraps until the table fits; where none is left, from the widest of all.
std::vector<int> fitted_widths(const Table& table) {
  std::vector<int> widths = natural_widths(table);
  const int room = page_width - gap * (static_cast<int>(widths.size()) - 1);
  const auto widest = [&](bool any, int least) {
    std::size_t found = widths.size();
    for (std::size_t j = 0; j < widths.size(); ++j)
      if ((any || table.columns[j].wraps) && widths[j] > least && (found == widths.size() || widths[j] > widths[found]))
        found = j;
    return found;
  };
  while (std::accumulate(widths.begin(), widths.end(), 0) > room) {
    std::size_t j = widest(false, narrowest);
    if (j == widths.size()) j = widest(true, 1);
    if (j == widths.size()) break;
    --widths[j];
  }
  return widths;
}

}  // namespace

int width_of(std::string_view text) {
  std::size_t width = 0;
  while (!text.empty()) width += take_glyph(text, width).columns;
  return static_cast<int>(width);
}

std::string printable(std::string_view text) {
  std::string one_line(text);
  std::replace_if(
      one_line.begin(), one_line.end(), [](char letter) { return letter == '\n' || letter == '\r'; }, ' ');
  return harmless(one_line);
}

std::string to_ascii(std::string_view text) {
  std::string out;
  while (!text.empty()) {
    const Glyph glyph = take_glyph(text, 0);
    if (glyph.columns <= 2)
      out.append(glyph.columns, ascii_of(glyph.shown));
    else
      out += glyph.shown;  // written out already
  }
  return out;
}

std::vector<std::string> wrap(std::string_view text, int width) {
  std::vector<std::string> lines(1);
  for (std::string word : split(std::string(text), ' ')) {
    if (word.empty()) continue;
    std::string& last = lines.back();
    if (!last.empty() && width_of(last) + 1 + width_of(word) <= width) {
      last += ' ' + word;
      continue;
    }
    if (!last.empty()) lines.emplace_back();
    while (width_of(word) > width) {
      const std::size_t end = fitting(word, width);
      if (end == word.size()) break;
      lines.back() = word.substr(0, end);
      lines.emplace_back();
      word.erase(0, end);
    }
    lines.back() = word;
  }
  return lines;
}

void Page::line(const std::string& text, Weight weight) {
  const bool bold = look_.colour && weight == Weight::bold;
  text_.append(bold ? "\x1b[1m" : "").append(look_.ascii ? to_ascii(text) : text).append(bold ? "\x1b[0m\n" : "\n");
}
void Page::blank() { line(""); }

void Page::title(std::string_view text) {
  for (const std::string& part : wrap(printable(text), page_width)) line(part, Weight::bold);
}

void Page::heading(std::string_view text) {
  blank();
  title(text);
}

void Page::paragraph(std::string_view text, int indent, int hang) {
  bool first = true;
  // the first line may be longer than the others: all are broken to the shorter width, which reads evenly
  for (const std::string& part : wrap(printable(text), page_width - indent - hang)) {
    line(spaces(first ? indent : indent + hang) + part);
    first = false;
  }
}

void Page::items(const std::vector<Item>& items) {
  int label = 0;
  for (const Item& item : items) label = std::max(label, width_of(printable(item.label)));
  label = std::min(label, widest_label);
  const Table layout{{{"", Align::left}, {"", Align::left}}, {}};
  const std::vector<int> widths = {label, page_width - 2 - gap - label};
  for (const Item& item : items) {
    Block block = {wrap(printable(item.label), label), {}};
    for (const std::string& text : item.texts)
      for (const std::string& part : wrap(printable(text), widths[1])) block[1].push_back(part);
    for (std::size_t i = 0; i < std::max(block[0].size(), block[1].size()); ++i)
      line(without_trailing(spaces(2).append(joined_line(block, i, layout.columns, widths))));
  }
}

void Page::lines(const std::vector<std::string>& lines) {
  for (const std::string& each : lines) line(each);
}

void Page::table(const Table& given) {
  Table table = given;
  for (auto& row : table.rows)
    for (std::string& cell : row) cell = printable(cell);
  for (std::size_t j = 0; j < table.columns.size(); ++j)
    if (table.columns[j].align == Align::point) align_points(table, j);
  const std::vector<int> widths = fitted_widths(table);
  Block head;
  std::size_t head_lines = 0;
  for (std::size_t j = 0; j < table.columns.size(); ++j) {
    head.emplace_back();
    for (const std::string& part : split(table.columns[j].head, '\n'))
      for (const std::string& piece : wrap(part, widths[j])) head.back().push_back(piece);
    head_lines = std::max(head_lines, head.back().size());
  }
  for (std::size_t i = 0; i < head_lines; ++i) line(joined_line(head, i, table.columns, widths), Weight::bold);
  std::string rule;
  for (int i = 0, n = std::accumulate(widths.begin(), widths.end(), gap * (static_cast<int>(widths.size()) - 1)); i < n;
       ++i)
    rule += look_.ascii ? "-" : "\u2500";
  line(rule);
  for (const auto& row : table.rows) {
    Block block;
    std::size_t lines = 1;
    for (std::size_t j = 0; j < row.size(); ++j) {
      const bool whole = table.columns[j].align == Align::point && width_of(row[j]) <= widths[j];
      block.push_back(whole ? std::vector{row[j]} : wrap(row[j], widths[j]));
      lines = std::max(lines, block.back().size());
    }
    for (std::size_t i = 0; i < lines; ++i) line(joined_line(block, i, table.columns, widths));
  }
}

std::string Page::text() const { return text_; }

}  // namespace vatwright
