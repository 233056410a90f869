#pragma once
#include <span>
#include <string>
#include <string_view>

#include "vatwright/quantity/dimension.hpp"

namespace vatwright {

/// One unit of the trade.
struct Unit {
  enum class Kind {
    plain,
    temperature,  ///< as a whole unit an absolute temperature: (number + zero) * factor
    gauge,        ///< whole unit only: number * factor + 1 atm
    part          ///< only inside a compound: mPa alone is a slip for MPa far more often than it is meant
  };
  std::string_view name;
  /// One unit in SI. Long, so that "52.5 mm" becomes the double nearest to 0.0525 and not its neighbour.
  long double factor = 1;
  Dimension dimension;
  Kind kind = Kind::plain;
  double zero = 0;  ///< temperature: absolute zero lies at minus this number
};

/// The one list of units.
std::span<const Unit> all_units();

/// Null where the word is not a unit; capitals count.
const Unit* find_unit(std::string_view word);

/// What the writer of a word that is no unit may have meant ("M3" -> "m3", "C" -> "degC", "kWh" -> "kW.h"), empty where
/// nothing is near. `separator` joins units that were run together ("m2K" -> "m2/K" below a stroke).
std::string near_unit(std::string_view word, char separator);

std::string small_letters(std::string_view word);

/// A unit that says too little: the question to be answered before it can be used, worded as what is expected; empty
/// for all others.
std::string question_about(std::string_view word);

}  // namespace vatwright
