#pragma once
#include <string>
#include <string_view>
#include <variant>

#include "unit.hpp"

namespace vatwright {

/// What a text of units comes to.
struct Compound {
  long double factor = 1;  ///< one of it in SI
  Dimension dimension;
  const Unit* whole = nullptr;  ///< the one unit that the text consists of, without a power; null for compounds
};

/// What is wrong with a text of units, and where.
struct UnitFault {
  std::string found;      ///< `no unit "M3"`
  std::size_t begin = 0;  ///< bytes of the text that are wrong
  std::size_t end = 0;
  std::string instead;  ///< what to put there, empty where nothing is near
  std::string advice;   ///< where no nearest text can be given
};

/// Units joined by . * or · and by /, with powers (m2, m^2, m², s-1, mol^-0.5, mol^(1/2)), brackets, and 1 before a
/// stroke; a stroke at the front counts as 1/. After a stroke a product needs brackets, since W/m2.K is read in two
/// ways. In compounds degC, degF are differences.
std::variant<Compound, UnitFault> read_compound(std::string_view text);

}  // namespace vatwright
