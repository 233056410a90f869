#include "number.hpp"

#include <charconv>
#include <cmath>
#include <string>

#include "wording.hpp"

namespace vatwright {
namespace {

bool is_digit(char c) { return c >= '0' && c <= '9'; }

QuantityFault fault(std::string_view text, const std::string& what, std::string expected) {
  return {"found " + quoted(text) + ", " + what, std::move(expected)};
}

/// Length of the figures at the front with whatever people put between them: "1,234.5", "6'300", "6 300". A space
/// counts only before exactly three digits.
std::size_t figures(std::string_view text) {
  std::size_t at = 0;
  const auto digits_from = [&](std::size_t i) {
    std::size_t count = 0;
    while (i + count < text.size() && is_digit(text[i + count])) ++count;
    return count;
  };
  while (at < text.size()) {
    if (const std::size_t count = digits_from(at); count > 0) {
      at += count;
      continue;
    }
    const std::size_t space = leading_space(text.substr(at));
    const bool mark = text[at] == ',' || text[at] == '.' || text[at] == '\'' || text[at] == '_';
    if (mark && digits_from(at + 1) > 0) {
      ++at;
    } else if (space > 0 && digits_from(at + space) == 3) {
      at += space;
    } else {
      break;
    }
  }
  return at;
}

struct Marks {
  int points = 0, commas = 0, others = 0;
  std::size_t last_point = 0, last_comma = 0, digits_after = 0;
};

Marks marks_in(std::string_view text) {
  Marks marks;
  for (std::size_t i = 0; i < text.size(); ++i) {
    if (text[i] == '.') ++marks.points, marks.last_point = i, marks.digits_after = 0;
    if (text[i] == ',') ++marks.commas, marks.last_comma = i, marks.digits_after = 0;
    if (is_digit(text[i])) ++marks.digits_after;
    if (!is_digit(text[i]) && text[i] != '.' && text[i] != ',') ++marks.others;
  }
  return marks;
}

/// Only digits, and a point in place of the mark at `decimal` (npos: none).
std::string cleaned(std::string_view text, std::size_t decimal) {
  std::string plain;
  for (std::size_t i = 0; i < text.size(); ++i)
    if (is_digit(text[i]))
      plain += text[i];
    else if (i == decimal)
      plain += '.';
  return plain;
}

/// "expected "6.3 m3"", with the sign and what follows the figures put back.
std::string write(std::string_view text, std::size_t begin, std::size_t end, const std::string& figures) {
  return quoted(std::string(text.substr(0, begin)) + figures + std::string(text.substr(end)));
}

std::variant<Number, QuantityFault> refuse_marks(std::string_view text, std::size_t begin, std::size_t end) {
  const std::string_view figure = text.substr(begin, end - begin);
  const Marks marks = marks_in(figure);
  const auto write_with = [&](std::size_t decimal) { return write(text, begin, end, cleaned(figure, decimal)); };
  constexpr std::size_t none = std::string_view::npos;
  if (marks.commas == 1 && marks.points == 0 && marks.others == 0) {
    if (marks.digits_after == 3 && figure.front() != '0')
      return fault(text, "a comma in the number",
                   "expected " + write_with(marks.last_comma) + " or " + write_with(none));
    return fault(text, "a decimal comma", "expected " + write_with(marks.last_comma));
  }
  if (marks.commas > 0) {
    std::size_t decimal = none;
    if (marks.points == 1 && (marks.commas > 1 || marks.last_point > marks.last_comma)) decimal = marks.last_point;
    if (marks.commas == 1 && marks.last_comma > marks.last_point) decimal = marks.last_comma;
    return fault(text, "commas in the number", "expected " + write_with(decimal));
  }
  if (marks.others > 0) {
    const bool spaced = leading_space(figure.substr(figure.find_first_not_of("0123456789."))) > 0;
    return fault(text, spaced ? "two numbers before the unit" : "a mark between digits",
                 "expected " + write_with(marks.points == 1 ? marks.last_point : none));
  }
  return fault(text, "two points in one number", "expected one decimal point");
}

/// The word at the front is one that the number grammar of C knows, but no quantity has.
bool is_not_finite(std::string_view text) {
  std::string word;
  for (const char c : text.substr(0, 9)) {
    const char small = c >= 'A' && c <= 'Z' ? static_cast<char>(c - 'A' + 'a') : c;
    if (small < 'a' || small > 'z') break;
    word += small;
  }
  return word == "inf" || word == "infinity" || word == "nan";
}

/// What begins like "10^-3" or "x10-3" after a number.
bool is_power_of_ten(std::string_view rest) {
  if (rest.starts_with("^")) return true;
  for (const std::string_view times : {"x", "*", "\xc3\x97", "\xc2\xb7"})
    if (rest.starts_with(times) && trimmed(rest.substr(times.size())).starts_with("10")) return true;
  return false;
}

std::variant<Number, QuantityFault> refuse_missing(std::string_view text) {
  if (text.empty()) return fault(text, "an empty text", "expected a number with its unit");
  for (const std::string_view minus : {"\xe2\x88\x92", "\xe2\x80\x93", "\xe2\x80\x94"})
    if (text.starts_with(minus) && text.size() > minus.size() && is_digit(text[minus.size()]))
      return fault(text, "a dash of a word processor",
                   "expected " + quoted(std::string(1, '-').append(text.substr(minus.size()))));
  for (const char sign : {'<', '>', '~', '='})
    if (text.front() == sign) return fault(text, "a sign before the number", "expected one number with its unit");
  return fault(text, "no number at the front", "expected a number with its unit");
}

/// What follows the number must begin a unit.
std::variant<Number, QuantityFault> check_rest(std::string_view text, const Number& number) {
  const std::string_view rest = number.rest;
  if (is_power_of_ten(rest)) return fault(text, "a power of ten", "expected it with an e, such as \"5e-3 mol/L\"");
  if (rest.empty()) return number;
  const bool one_over = rest.front() == '1' && trimmed(rest.substr(1)).starts_with("/");
  if ((is_digit(rest.front()) && !one_over) || (rest.front() == '.' && rest.size() > 1 && is_digit(rest[1])))
    return fault(text, "two numbers before the unit", "expected one number with its unit");
  const bool sign =
      rest.front() == '-' || rest.front() == '+' || rest.starts_with("..") || rest.starts_with("\xe2\x80\x93");
  if (sign || rest.starts_with("to ")) return fault(text, "more than one number", "expected one number with its unit");
  return number;
}

}  // namespace

std::variant<Number, QuantityFault> read_number(std::string_view text) {
  const std::size_t begin = !text.empty() && (text.front() == '+' || text.front() == '-') ? 1 : 0;
  if (is_not_finite(text.substr(begin))) return fault(text, "which is not finite", "expected a finite number");
  const std::size_t end = begin + figures(text.substr(begin));
  const Marks marks = marks_in(text.substr(begin, end - begin));
  if (marks.commas > 0 || marks.others > 0 || marks.points > 1) return refuse_marks(text, begin, end);

  Number number;
  const char* first = text.data() + (text.starts_with('+') ? 1 : 0);
  if (first != text.data() && text.substr(1).starts_with('-')) return refuse_missing(text);
  const auto [stop, error] = std::from_chars(first, text.data() + text.size(), number.value);
  if (error == std::errc::invalid_argument) return refuse_missing(text);
  if (error == std::errc::result_out_of_range)
    return fault(text, "a number out of range", "expected a size between 1e-300 and 1e300");
  if (!std::isfinite(number.value)) return fault(text, "which is not finite", "expected a finite number");
  const auto length = static_cast<std::size_t>(stop - text.data());
  number.digits = text.substr(0, length);
  number.rest = trimmed(text.substr(length));
  return check_rest(text, number);
}

}  // namespace vatwright
