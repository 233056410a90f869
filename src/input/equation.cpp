#include "equation.hpp"

#include <algorithm>
#include <charconv>
#include <cmath>

#include "vatwright/field/scope.hpp"

namespace vatwright {
namespace {

using Fault = QuantityFault;
constexpr const char* arrows = "expected \"->\" (one way) or \"<->\" (reversible)";

double sum_of(const std::vector<Term>& side, std::string_view species) {
  double sum = 0;
  for (const Term& t : side)
    if (t.species == species) sum += t.coefficient;
  return sum;
}

std::vector<std::string> words_of(std::string_view text) {
  std::vector<std::string> words;
  std::string word;
  for (const char c : std::string(text) + ' ') {
    const bool space = c == ' ' || c == '\t' || c == '\n' || c == '\r';
    if (!space)
      word += c;
    else if (!word.empty())
      words.push_back(std::exchange(word, {}));
  }
  return words;
}

bool is_digit(char c) { return c >= '0' && c <= '9'; }

/// The number that the whole word is, or NaN.
double number_of(const std::string& word) {
  double x = 0;
  const auto [end, error] = std::from_chars(word.data(), word.data() + word.size(), x);
  const bool whole = error == std::errc() && end == word.data() + word.size();
  return whole && (is_digit(word.back()) || word.back() == '.') ? x : std::nan("");
}

/// "2A" or "0.5O2": a coefficient stuck to its species. "2-butanol" and "1,2-diol" are names.
std::string::size_type stuck_digits(const std::string& word) {
  std::size_t n = 0;
  while (n < word.size() && (is_digit(word[n]) || word[n] == '.')) ++n;
  if (n == 0 || n == word.size() || word[n] == '-' || word[n] == ',' || word[n] == '\'') return 0;
  return n;
}

std::string fault_of_name(const std::string& name) {
  if (is_common_name(name)) return "found a species called " + quoted(name) + ", which is a word of the file format";
  if (const auto plus = name.find('+');
      plus != name.npos && plus + 1 < name.size() && plus > 0 && name[plus + 1] != '+')
    return "found " + quoted(name) + ": one species, or two?";
  return {};
}

/// Reads one side; what stands before it in messages: "at the beginning", "after ->".
std::variant<std::vector<Term>, Fault> parse_side(std::string_view text, const std::string& where) {
  std::vector<Term> terms;
  Term term;
  bool has_number = false, has_name = false;
  const auto missing = [&](const std::string& place) { return Fault{"a species is missing " + place, "expected one"}; };
  std::string last = where;
  for (const std::string& word : words_of(text)) {
    if (word == "+") {
      if (!has_name) return missing(has_number ? "after the coefficient" : last);
      terms.push_back(term), term = {}, has_number = has_name = false, last = "after \"+\"";
    } else if (const double x = number_of(word); !std::isnan(x)) {
      if (has_number || has_name)
        return Fault{"found " + quoted(word) + " where \"+\" should be", "expected \"2 A + B\""};
      if (!(x > 0) || !std::isfinite(x)) return Fault{"found a coefficient of " + word, "expected one above zero"};
      term.coefficient = x, has_number = true;
    } else if (const std::size_t n = stuck_digits(word); n > 0) {
      const std::string apart = word.substr(0, n) + " " + word.substr(n);
      return Fault{
          "found " + quoted(word) + ": a species of that name, or " + word.substr(0, n) + " of " + word.substr(n) + "?",
          "expected " + quoted(apart)};
    } else if (has_name) {
      return Fault{"found " + quoted(term.species + " " + word),
                   "expected \"+\" between two species; a name has no space"};
    } else if (const std::string fault = fault_of_name(word); !fault.empty()) {
      return Fault{fault, "expected a name, or \"+\" with spaces around it"};
    } else {
      term.species = word, has_name = true;
    }
  }
  if (!has_name) return missing(has_number ? "after the coefficient" : last);
  terms.push_back(term);
  return terms;
}

}  // namespace

bool is_common_name(const std::string& name) {
  return name == "source" || name == "note" || name == "spread" || name == "reaction";
}

double Equation::left_of(std::string_view s) const { return sum_of(left, s); }
double Equation::right_of(std::string_view s) const { return sum_of(right, s); }

std::vector<std::string> Equation::species() const {
  std::vector<std::string> all;
  for (const auto* side : {&left, &right})
    for (const Term& t : *side)
      if (std::find(all.begin(), all.end(), t.species) == all.end()) all.push_back(t.species);
  return all;
}

std::variant<Equation, QuantityFault> parse_equation(std::string_view text) {
  Equation equation;
  std::size_t at = text.find("<->"), length = 3;
  equation.reversible = at != text.npos;
  if (!equation.reversible) at = text.find("->"), length = 2;
  for (const std::string_view other : {"<=>", "=>", "=", "\u2192", "\u21cc", "\u21c4", "\u27f6"})
    if (at == text.npos && text.find(other) != text.npos)
      return Fault{"found \"" + std::string(other) + "\" between the sides", arrows};
  if (at == text.npos) return Fault{"found " + quoted(text) + ", without an arrow", arrows};
  if (text.find("->", at + length) != text.npos)
    return Fault{"found two arrows", "expected one equation for each reaction"};
  auto left = parse_side(text.substr(0, at), "before the arrow");
  if (auto* fault = std::get_if<Fault>(&left)) return *fault;
  auto right = parse_side(text.substr(at + length), "after the arrow");
  if (auto* fault = std::get_if<Fault>(&right)) return *fault;
  equation.left = std::get<0>(std::move(left));
  equation.right = std::get<0>(std::move(right));
  return equation;
}

}  // namespace vatwright
