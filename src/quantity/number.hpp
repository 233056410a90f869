#pragma once
#include <string_view>
#include <variant>

#include "vatwright/quantity/quantity.hpp"

namespace vatwright {

/// A number at the front of a text, and what follows it.
struct Number {
  double value = 0;
  std::string_view digits;  ///< as written
  std::string_view rest;    ///< without the space between
};

/// Reads the number at the front of a trimmed text: decimal point, power of ten with e, one sign. Refused: commas,
/// marks or spaces between digits, a second number, ranges, NaN and infinity, what a double can not hold.
std::variant<Number, QuantityFault> read_number(std::string_view text);

}  // namespace vatwright
