#include "key_depth.hpp"

#include <string>

namespace vatwright {
namespace {

/// Walks over a text, knowing what is string, comment, or structure.
class Walk {
 public:
  explicit Walk(std::string_view text) : text_(text) {}

  std::optional<DeepKey> run() {
    while (at_ < text_.size()) {
      const char c = text_[at_];
      if (c == '#')
        step_over_comment();
      else if (c == '"' || c == '\'')
        step_over_string(c);
      else if (c == '.' && ++dots_ >= most_key_parts)
        return DeepKey{line_, column_};
      else if (std::string_view("=,[]{}\n").find(c) != std::string_view::npos)
        dots_ = 0, step();
      else
        step();
    }
    return std::nullopt;
  }

 private:
  void step() {
    const auto c = static_cast<unsigned char>(text_[at_++]);
    if (c == '\n')
      ++line_, column_ = 1;
    else if ((c & 0xC0) != 0x80)
      ++column_;
  }
  void step_over_comment() {
    while (at_ < text_.size() && text_[at_] != '\n') step();
  }
  bool triple(char quote) const { return text_.substr(at_, 3) == std::string(3, quote); }
  void step_over_string(char quote) {
    const bool many_lines = triple(quote);
    for (int i = 0; i < (many_lines ? 3 : 1); ++i) step();
    while (at_ < text_.size()) {
      const char c = text_[at_];
      if (!many_lines && c == '\n') return;
      if (quote == '"' && c == '\\' && at_ + 1 < text_.size())
        step(), step();
      else if (c != quote)
        step();
      else if (!many_lines)
        return step();
      else if (triple(quote))
        return close_triple(quote);
      else
        step();
    }
  }
  /// Up to two quotes may stand right before the closing three.
  void close_triple(char quote) {
    for (int i = 0; i < 5 && at_ < text_.size() && text_[at_] == quote; ++i) step();
  }

  std::string_view text_;
  std::size_t at_ = 0;
  int line_ = 1, column_ = 1, dots_ = 0;
};

}  // namespace

std::optional<DeepKey> find_deep_key(std::string_view text) { return Walk(text).run(); }

}  // namespace vatwright
