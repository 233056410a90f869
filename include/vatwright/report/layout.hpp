#pragma once
#include <string>
#include <string_view>
#include <vector>

#include "vatwright/report/look.hpp"

namespace vatwright {

inline constexpr int page_width = 80;

/// Columns that a UTF-8 text takes on a screen.
int width_of(std::string_view text);
/// The text as it may stand on one line of a screen: what could steer a terminal is written out, line ends are spaces.
std::string printable(std::string_view text);
/// The text in ASCII, of the same width: letters lose their marks, what has no likeness becomes '?'.
std::string to_ascii(std::string_view text);
/// Lines of at most `width` columns, broken at spaces, words too long for a line inside; at least one line.
std::vector<std::string> wrap(std::string_view text, int width);

/// point: figures whose decimal points stand below each other.
enum class Align { left, right, point };
struct Column {
  std::string head;  ///< lines of the head joined by '\n': a name, then a unit
  Align align = Align::left;
  bool wraps = false;  ///< gives way where the table is wider than the page
};
/// A table of texts. A row has one cell for each column.
struct Table {
  std::vector<Column> columns;
  std::vector<std::vector<std::string>> rows;
};

/// A text laid out for a screen of page_width columns, built from the top down.
class Page {
 public:
  explicit Page(const Look& look) : look_(look) {}

  void title(std::string_view text);
  /// A heading, with an empty line before it.
  void heading(std::string_view text);
  void blank();
  /// Wrapped text; lines after the first are indented by `hang` more.
  void paragraph(std::string_view text, int indent = 0, int hang = 0);
  /// Labels on the left, wrapped texts beside them; several texts of one label stand below each other.
  struct Item {
    std::string label;
    std::vector<std::string> texts;
  };
  void items(const std::vector<Item>& items);
  void table(const Table& table);
  /// Lines as they are.
  void lines(const std::vector<std::string>& lines);

  /// All of it; ASCII where the look says so.
  [[nodiscard]] std::string text() const;

 private:
  enum class Weight { plain, bold };
  void line(const std::string& text, Weight weight = Weight::plain);

  Look look_;
  std::string text_;
};

}  // namespace vatwright
