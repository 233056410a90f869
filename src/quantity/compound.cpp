#include "compound.hpp"

#include <charconv>
#include <cmath>
#include <optional>
#include <utility>

#include "wording.hpp"

namespace vatwright {
namespace {

constexpr int deepest = 8;
constexpr double greatest_power = 20;
constexpr std::string_view dots[] = {"\xc2\xb7", "\xe2\x8b\x85"};  // middle dot, dot operator
constexpr std::pair<std::string_view, char> raised[] = {
    {"\xe2\x81\xb0", '0'}, {"\xc2\xb9", '1'},     {"\xc2\xb2", '2'},     {"\xc2\xb3", '3'},
    {"\xe2\x81\xb4", '4'}, {"\xe2\x81\xb5", '5'}, {"\xe2\x81\xb6", '6'}, {"\xe2\x81\xb7", '7'},
    {"\xe2\x81\xb8", '8'}, {"\xe2\x81\xb9", '9'}, {"\xe2\x81\xbb", '-'}, {"\xe2\x81\xba", '+'}};

bool is_digit(char c) { return c >= '0' && c <= '9'; }
bool is_letter(char c) { return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z'); }

/// Reads by descent: product of factors, factor = word or bracket with a power. The first fault ends it.
class Reader {
 public:
  explicit Reader(std::string_view text) : text_(text) {}

  std::variant<Compound, UnitFault> read() {
    Compound all;
    if (read_product(all, 0) && !at_end())
      fail(at_, at_ + 1, "an unmatched " + quoted(text_.substr(at_, 1)) + " in the unit");
    if (fault_) return *fault_;
    return all;
  }

 private:
  std::string_view text_;
  std::size_t at_ = 0;
  std::optional<UnitFault> fault_;

  [[nodiscard]] bool at_end() const { return at_ >= text_.size(); }
  [[nodiscard]] char next() const { return at_end() ? '\0' : text_[at_]; }
  [[nodiscard]] std::string_view rest() const { return text_.substr(at_); }

  bool fail(std::size_t begin, std::size_t end, std::string found, std::string instead = {}, std::string advice = {}) {
    if (!fault_) fault_ = UnitFault{std::move(found), begin, end, std::move(instead), std::move(advice)};
    return false;
  }

  std::size_t skip_space() {
    const std::size_t begin = at_;
    while (const std::size_t bytes = leading_space(rest())) at_ += bytes;
    return at_ - begin;
  }

  /// '*' for every sign of a product, '/' for a stroke, '\0' for neither; steps over it.
  char take_sign() {
    if (next() == '/') return ++at_, '/';
    if (next() == '.' || next() == '*') return ++at_, '*';
    for (const std::string_view dot : dots)
      if (rest().starts_with(dot)) return at_ += dot.size(), '*';
    return '\0';
  }

  bool read_product(Compound& product, int depth) {
    if (depth > deepest) return fail(at_, at_, "too many brackets in the unit");
    bool stroke = false;
    skip_space();
    if (next() != '/') {
      if (!read_factor(product, depth, false)) return false;
    } else {
      product.whole = nullptr;
    }
    for (;;) {
      const std::size_t end = at_;
      const std::size_t space = skip_space();
      if (at_end() || next() == ')') return true;
      const std::size_t sign_at = at_;
      const char sign = take_sign();
      if (sign == '\0') return fail_joined(end, space, stroke);
      if (sign == '*' && stroke) return fail(sign_at, at_, "a product after a stroke, which is read in two ways", "/");
      stroke = stroke || sign == '/';
      skip_space();
      Compound factor;
      if (!read_factor(factor, depth, stroke)) return false;
      product.factor = sign == '/' ? product.factor / factor.factor : product.factor * factor.factor;
      product.dimension = sign == '/' ? product.dimension / factor.dimension : product.dimension * factor.dimension;
      product.whole = nullptr;
    }
  }

  /// Two units without a sign between them.
  bool fail_joined(std::size_t end, std::size_t space, bool stroke) {
    if (next() == '^') return fail(at_, at_ + 1, "a power of a power in the unit");
    const std::string sign = stroke ? "/" : ".";
    if (space > 0) return fail_spaced(end, space, sign);
    if (next() == ',' || next() == ';') return fail(at_, at_ + 1, "a " + quoted(text_.substr(at_, 1)) + " in the unit");
    std::size_t begin = end, stop = end;
    while (begin > 0 && (is_letter(text_[begin - 1]) || is_digit(text_[begin - 1]))) --begin;
    while (stop < text_.size() && (is_letter(text_[stop]) || is_digit(text_[stop]))) ++stop;
    if (stop == end) return fail(end, end, "no sign between two units", sign);
    return fail(end, end, "no unit " + quoted(text_.substr(begin, stop - begin)), sign);
  }

  /// A power set apart ("m 3"), a word that must be asked about ("in sch40"), or a sign forgotten.
  bool fail_spaced(std::size_t end, std::size_t space, const std::string& sign) {
    const std::string_view word = rest().substr(0, rest().find_first_of(" /.*()^"));
    if (const auto question = question_about(word); !question.empty())
      return fail(end, end + space, quoted(word) + " after the unit", {}, question);
    return fail(end, end + space, "a space inside the unit", is_digit(next()) ? "" : sign,
                is_digit(next()) ? "expected the power next to its unit, such as \"6.3 m3\"" : "");
  }

  bool read_factor(Compound& factor, int depth, bool below_stroke) {
    if (at_end()) return fail(at_, at_, "a unit that ends in a sign");
    const std::size_t begin = at_;
    if (next() == '(') {
      ++at_;
      if (!read_product(factor, depth + 1)) return false;
      if (next() != ')') return fail(begin, begin + 1, "a bracket that is not closed in the unit");
      ++at_;
      factor.whole = nullptr;
    } else if (is_digit(next())) {
      if (!read_one()) return false;
    } else if (!read_word(factor, below_stroke)) {
      return false;
    }
    return read_power(factor, begin);
  }

  /// The only number in a unit is the 1 of "1/min".
  bool read_one() {
    const std::size_t begin = at_;
    while (is_digit(next()) || (next() == '.' && at_ + 1 < text_.size() && is_digit(text_[at_ + 1]))) ++at_;
    const std::string_view number = text_.substr(begin, at_ - begin);
    const std::size_t end = at_;
    skip_space();
    const bool before_stroke = next() == '/';
    at_ = end;
    if (number == "1" && before_stroke) return true;
    return fail(begin, end, "a number " + quoted(number) + " inside the unit", {},
                "expected units alone after the number; a broken power is written like mol^(1/2)");
  }

  [[nodiscard]] bool in_word() const {
    const char c = next();
    if (at_end() || is_digit(c) || leading_space(rest()) > 0) return false;
    if (c == '-') return at_ > 0 && is_letter(text_[at_ - 1]) && at_ + 1 < text_.size() && is_letter(text_[at_ + 1]);
    if (std::string_view("/.*()^+,;").find(c) != std::string_view::npos) return false;
    for (const std::string_view dot : dots)
      if (rest().starts_with(dot)) return false;
    for (const auto& [sign, digit] : raised)
      if (rest().starts_with(sign)) return false;
    return true;
  }

  bool read_word(Compound& factor, bool below_stroke) {
    const std::size_t begin = at_;
    while (in_word()) ++at_;
    const std::size_t letters = at_;
    if (rest().starts_with("(US)") && text_.substr(begin, at_ - begin) == "gal") at_ += 4;
    const std::string_view word = text_.substr(begin, letters - begin);
    if (word.empty()) return fail(begin, begin + 1, "no unit " + quoted(text_.substr(begin, 1)));
    const Unit* unit = find_unit(word);
    if (unit == nullptr) return fail_word(begin, letters, below_stroke);
    factor = {unit->factor, unit->dimension, unit};
    if (next() == '(') return fail_bracket(begin, below_stroke);
    return true;
  }

  /// "bar(g)" is one word; otherwise a sign is missing before the bracket.
  bool fail_bracket(std::size_t begin, bool below_stroke) {
    const std::size_t close = text_.find(')', at_);
    const std::size_t end = close == std::string_view::npos ? text_.size() : close + 1;
    const std::string_view word = text_.substr(begin, end - begin);
    if (std::string near = near_unit(word, '.'); !near.empty())
      return fail(begin, end, "no unit " + quoted(word), near);
    return fail(at_, at_, "no sign before the bracket in the unit", below_stroke ? "/" : ".");
  }

  bool fail_word(std::size_t begin, std::size_t letters, bool below_stroke) {
    std::size_t end = letters;  // with a power that is written on to it: "M3"
    while (end < text_.size() && is_digit(text_[end])) ++end;
    if (text_.substr(end).starts_with("(g)") || text_.substr(end).starts_with("(a)")) end += 3;
    if (text_.substr(begin).starts_with("deg C") || text_.substr(begin).starts_with("deg F")) end += 2;
    const std::string_view word = text_.substr(begin, end - begin);
    const std::string found = "no unit " + quoted(word);
    if (const auto question = question_about(word); !question.empty())
      return fail(begin, end, quoted(word) + " says too little", {}, question);
    return fail(begin, end, found, near_unit(word, below_stroke ? '/' : '.'));
  }

  bool read_power(Compound& factor, std::size_t begin) {
    std::optional<double> power;
    if (next() == '^') {
      ++at_;
      power = next() == '(' ? bracketed_power() : decimal();
      if (!power)
        return fail(begin, at_, "a power without a number in the unit", {}, "expected a power like m^2 or mol^-0.5");
    } else {
      power = written_on();
    }
    if (!power) return true;
    if (std::abs(*power) > greatest_power) return fail(begin, at_, "a power above 20 in the unit");
    factor = {std::pow(factor.factor, static_cast<long double>(*power)), pow(factor.dimension, *power), nullptr};
    return true;
  }

  /// Digits with a point only where another digit follows: in "m^2.K" the point is a product.
  std::optional<double> decimal() {
    const bool plus = next() == '+';
    if (plus) ++at_;
    const std::size_t begin = at_;
    if (next() == '-' && !plus) ++at_;
    const std::size_t digits = at_;
    while (is_digit(next())) ++at_;
    if (next() == '.' && at_ + 1 < text_.size() && is_digit(text_[at_ + 1]))
      for (++at_; is_digit(next());) ++at_;
    return at_ == digits ? std::nullopt : number(text_.substr(begin, at_ - begin));
  }

  /// "(1/2)", "(-0.5)"
  std::optional<double> bracketed_power() {
    ++at_;
    std::optional<double> power = decimal();
    if (power && next() == '/') {
      ++at_;
      const std::optional<double> below = decimal();
      power = below && *below != 0 ? std::optional(*power / *below) : std::nullopt;
    }
    if (next() != ')') return std::nullopt;
    ++at_;
    return power;
  }

  /// "m2", "s-1", "m²", "s⁻¹": whole powers written on to the unit.
  std::optional<double> written_on() {
    std::string digits;
    for (bool more = true; more;) {
      more = false;
      for (const auto& [sign, digit] : raised)
        if (rest().starts_with(sign)) digits += digit, at_ += sign.size(), more = true;
    }
    if (digits.empty()) {
      const bool signed_power = (next() == '-' || next() == '+') && at_ + 1 < text_.size() && is_digit(text_[at_ + 1]);
      if (signed_power) digits += text_[at_++];
      while (is_digit(next())) digits += text_[at_++];
    }
    if (digits.empty()) return std::nullopt;
    const std::optional<double> power = number(digits.starts_with('+') ? digits.substr(1) : digits);
    if (!power) fail(at_, at_, "a power that is no number in the unit");
    return power;
  }

  static std::optional<double> number(std::string_view digits) {
    double value = 0;
    const auto [end, error] = std::from_chars(digits.data(), digits.data() + digits.size(), value);
    return error == std::errc{} && end == digits.data() + digits.size() ? std::optional(value) : std::nullopt;
  }
};

}  // namespace

std::variant<Compound, UnitFault> read_compound(std::string_view text) { return Reader(text).read(); }

}  // namespace vatwright
