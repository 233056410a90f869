#include "lexer.hpp"

#include <algorithm>
#include <charconv>
#include <cmath>

namespace vatwright {
namespace {

bool is_blank(char c) { return c == ' ' || c == '\t' || c == '\n' || c == '\r' || c == '\f' || c == '\v'; }
bool ends_word(char c) { return is_blank(c) || c == '[' || c == ']' || c == '"'; }

std::optional<double> number_of(std::string_view text) {
  double value = 0;
  const auto [end, error] = std::from_chars(text.data(), text.data() + text.size(), value, std::chars_format::fixed);
  if (error != std::errc() || end != text.data() + text.size() || !std::isfinite(value)) return std::nullopt;
  return value;
}

class Cutter {
 public:
  Cutter(std::string_view text, const std::vector<std::string>& tags) : text_(text), tags_(tags) {}

  std::variant<std::vector<Token>, HookupFault> run() {
    while (skip_blanks()) {
      if (text_[at_] == '[' || text_[at_] == ']')
        bracket();
      else if (text_[at_] == '"') {
        if (!quoted()) return HookupFault{column(at_), "a quote is not closed", "\" after the tag"};
      } else {
        word();
      }
    }
    tokens_.push_back({Token::Is::end, column(text_.size()), "", 0});
    return std::move(tokens_);
  }

 private:
  bool skip_blanks() {
    while (at_ < text_.size() && is_blank(text_[at_])) ++at_;
    return at_ < text_.size();
  }
  // Continuation bytes of UTF-8 do not start a column.
  int column(std::size_t position) {
    for (; counted_ < position; ++counted_) {
      if ((static_cast<unsigned char>(text_[counted_]) & 0xC0u) != 0x80u) ++column_;
    }
    return column_ + 1;
  }
  void bracket() {
    tokens_.push_back(
        {text_[at_] == '[' ? Token::Is::open : Token::Is::close, column(at_), std::string(1, text_[at_]), 0});
    ++at_;
  }
  bool quoted() {
    std::string tag;
    for (std::size_t i = at_ + 1; i < text_.size(); ++i) {
      if (text_[i] == '"') {
        tokens_.push_back({Token::Is::quoted, column(at_), tag, 0});
        at_ = i + 1;
        return true;
      }
      if (text_[i] == '\\' && i + 1 < text_.size()) ++i;
      tag += text_[i];
    }
    return false;
  }
  void word() {
    const std::size_t begin = at_;
    while (at_ < text_.size() && !ends_word(text_[at_])) ++at_;
    const std::string_view whole = text_.substr(begin, at_ - begin);
    if (std::find(tags_.begin(), tags_.end(), whole) != tags_.end()) return push_word(begin, whole);
    if (const auto percent = leading_percent(whole)) {
      tokens_.push_back(
          {Token::Is::share, column(begin), std::string(whole.substr(0, percent->length)), percent->value});
      if (percent->length < whole.size()) push_word(begin + percent->length, whole.substr(percent->length));
      return;
    }
    if (joins_number_before(whole)) return;
    push_word(begin, whole);
  }
  void push_word(std::size_t begin, std::string_view word) {
    tokens_.push_back({Token::Is::word, column(begin), std::string(word), 0});
  }
  // `40 %` and `40 %T-7`: the number stands as a word of its own.
  bool joins_number_before(std::string_view word) {
    if (word.front() != '%' || tokens_.empty() || tokens_.back().is != Token::Is::word) return false;
    const auto value = number_of(tokens_.back().text);
    if (!value) return false;
    tokens_.back() = {Token::Is::share, tokens_.back().column, tokens_.back().text + " %", *value};
    if (word.size() > 1) push_word(at_ - word.size() + 1, word.substr(1));
    return true;
  }

  std::string_view text_;
  const std::vector<std::string>& tags_;
  std::vector<Token> tokens_;
  std::size_t at_ = 0, counted_ = 0;
  int column_ = 0;
};

}  // namespace

std::optional<Percent> leading_percent(std::string_view word) {
  const auto sign = word.find('%');
  if (sign == std::string_view::npos || sign == 0) return std::nullopt;
  const auto value = number_of(word.substr(0, sign));
  if (!value) return std::nullopt;
  return Percent{*value, sign + 1};
}

std::variant<std::vector<Token>, HookupFault> cut_words(std::string_view text, const std::vector<std::string>& tags) {
  return Cutter(text, tags).run();
}

}  // namespace vatwright
