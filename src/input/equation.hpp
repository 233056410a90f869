#pragma once
#include <string>
#include <string_view>
#include <variant>
#include <vector>

#include "vatwright/quantity/quantity.hpp"

namespace vatwright {

struct Term {
  double coefficient = 1;
  std::string species;
};

/// A chemical equation as written.
struct Equation {
  std::vector<Term> left, right;
  bool reversible = false;
  /// Coefficient on a side, 0 where it does not stand there; the same species written twice counts together.
  [[nodiscard]] double left_of(std::string_view species) const;
  [[nodiscard]] double right_of(std::string_view species) const;
  [[nodiscard]] double net(std::string_view species) const { return right_of(species) - left_of(species); }
  /// Every species once, in the order of writing.
  [[nodiscard]] std::vector<std::string> species() const;
};

/// Words of the format that no species may be called: source, note, spread, and reaction (see `of`).
bool is_common_name(const std::string& name);

/// Reads "2 A + B -> C + D" or "A <-> B": terms joined by + with spaces, coefficients above zero, with a decimal point
/// and a space behind; the same species may stand on both sides ("A + R -> 2 R").
std::variant<Equation, QuantityFault> parse_equation(std::string_view text);

}  // namespace vatwright
