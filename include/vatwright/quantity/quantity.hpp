#pragma once
#include <string>
#include <string_view>
#include <variant>

#include "vatwright/quantity/dimension.hpp"

namespace vatwright {

/// What a text such as "6.3 m3" says, in SI.
struct Quantity {
  double si = 0;
  Dimension dimension;
  std::string unit;          ///< as written, "" for a bare number
  bool temperature = false;  ///< the whole unit is degC, degF or K: si is then the absolute temperature
  double difference = 0;     ///< si read as a difference (degC: the number itself), where `temperature`
  bool gauge = false;        ///< barg, psig, kPag: si is absolute already
  bool plain_bar = false;    ///< "bar" alone: absolute, worth a word where a pressure above atmosphere is meant
};

/// What is wrong with a text, as the two halves of a Diagnostic.
struct QuantityFault {
  std::string found, expected;
};

/// Reads a number and its unit by the rules of the file format: decimal point, one number, units of the trade, products,
/// quotients and powers ("W/m2/K", "W/(m2.K)", "m^2", "m²", "mol^-0.5"), a space before the unit or none, "95 %".
/// Refused with the nearest right word: a decimal comma, two numbers, an unknown unit or wrong capitals, NaN and
/// infinity, a temperature below absolute zero, units that must be asked about first (Nm3, scf, ppm).
std::variant<Quantity, QuantityFault> parse_quantity(std::string_view text);

/// How a number of this dimension is meant.
enum class Sense {
  plain,
  temperature,  ///< an absolute temperature
  difference    ///< a temperature difference
};

/// The SI value where the dimension fits, otherwise what was found and what is expected ("found "6.3 m2", an area";
/// "a volume, such as "6.3 m3""). A bare number fits `dim::none` only.
std::variant<double, QuantityFault> to_si(std::string_view text, Dimension expected, Sense sense = Sense::plain);

/// "a volume", "a pressure", or for a dimension without a name its SI units, "m3/mol/s".
std::string name_of(Dimension dimension);
/// An example in trade units: "6.3 m3", "0.042 L/mol/min", or in SI units where there is no usual one.
std::string example_of(Dimension dimension, Sense sense = Sense::plain);

}  // namespace vatwright
