#pragma once
#include <optional>
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

/// What is wrong with a text, as the two halves of a Diagnostic, each a whole phrase: `found "6.3 m2", an area` and
/// `expected a volume, such as "6.3 m3"`. Valid UTF-8 whatever the text; the text is cut to 60
/// characters.
struct QuantityFault {
  std::string found, expected;
};

/// Reads a number (the grammar of C, a plus sign too) and its unit by the rules of the file format: decimal point, one
/// number, units of the trade, products, quotients and powers ("W/m2/K", "W/(m2.K)", "m^2", "m²", "mol^-0.5"), a space
/// before the unit or none, "95 %". Refused with the nearest right word: a decimal comma, two numbers, an unknown unit
/// or wrong capitals, NaN and infinity, a temperature below absolute zero, a gauge pressure below full vacuum, gauge
/// inside a compound, a product after a stroke without brackets ("W/m2.K"), units that must be asked about first (Nm3,
/// scf, ppm). Factors: BIPM, The International System of Units, 9th ed. 2019; NIST SP 811, 2008, appendix B.
std::variant<Quantity, QuantityFault> parse_quantity(std::string_view text);

/// How a number of this dimension is meant.
enum class Sense {
  plain,        ///< a temperature is then an absolute one
  temperature,  ///< an absolute temperature: one whole unit, degC, degF, K or degR
  difference    ///< a difference: degC counts as K; a gauge pressure is refused
};

/// The SI value where the dimension fits, otherwise what was found and what is expected (`found "6.3 m2", an area`;
/// `expected a volume, such as "6.3 m3"`). A bare number fits `dim::none` only.
std::variant<double, QuantityFault> to_si(std::string_view text, Dimension expected, Sense sense = Sense::plain);

/// The same for a text that was read already; `text` is what messages show.
std::variant<double, QuantityFault> fit(const Quantity& quantity, std::string_view text, Dimension expected,
                                        Sense sense = Sense::plain);

/// The second half of such a message: `expected a volume, such as "6.3 m3"`.
std::string expectation(Dimension expected, Sense sense = Sense::plain);

/// The dimension with every mole counted as a kilogram: what a duty with amounts = "mass" expects.
Dimension moles_as_mass(Dimension dimension);

/// Whether `found` is `expected` with kilograms in place of some moles ("6 mg/L" where mol/m3 is expected), and how
/// many: the power p so that si / M^p, M in kg/mol, is the value expected. 0 where they are equal, empty where it does
/// not fit.
std::optional<double> mass_for_moles(Dimension found, Dimension expected);

/// "a volume", "a pressure", "a rate constant of order 2", or for a dimension without a name its SI units, "kg.m/s".
std::string name_of(Dimension dimension);
/// An example in trade units: "6.3 m3", "0.042 L/mol/min", or in SI units where there is no usual one. parse_quantity
/// reads it back with this dimension. Rate constants of any order, broken ones too, per fluid or per catalyst mass, in
/// concentrations or pressures, have theirs: "0.042 L2/mol/kg/min", "0.042 mol/L/min/bar^0.5".
std::string example_of(Dimension dimension, Sense sense = Sense::plain);

}  // namespace vatwright
