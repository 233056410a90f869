#include "vatwright/quantity/quantity.hpp"

#include <cmath>
#include <utility>

#include "compound.hpp"
#include "number.hpp"
#include "wording.hpp"

namespace vatwright {
namespace {

constexpr std::size_t longest_text = 200;
constexpr int most_mends = 6;  // faults put right one after the other, to show the whole text as it should be
constexpr long double standard_atmosphere = 101325;

using Read = std::variant<Quantity, QuantityFault>;

QuantityFault fault(std::string_view text, const std::string& what, std::string expected) {
  return {"found " + quoted(text) + ", " + what, std::move(expected)};
}

/// The unit text with every fault replaced by the nearest right text; empty where that does not lead to a unit.
std::string mended(std::string unit, UnitFault wrong) {
  for (int i = 0; i < most_mends; ++i) {
    if (wrong.instead.empty()) return {};
    unit.replace(wrong.begin, wrong.end - wrong.begin, wrong.instead);
    const auto again = read_compound(unit);
    const auto* next = std::get_if<UnitFault>(&again);
    if (next == nullptr) return unit;
    wrong = *next;
  }
  return {};
}

QuantityFault unit_fault(std::string_view text, const Number& number, const UnitFault& wrong) {
  const std::string unit = mended(std::string(number.rest), wrong);
  if (!wrong.advice.empty()) return fault(text, wrong.found, wrong.advice);
  if (unit.empty() && wrong.instead.empty())
    return fault(text, wrong.found, "expected a unit such as \"m3\", \"degC\", \"bar\", \"kJ/mol\", \"W/m2/K\"");
  if (unit.empty()) return fault(text, wrong.found, "expected units joined by . and /, such as \"W/m2/K\"");
  const bool capitals = unit.size() == number.rest.size() && small_letters(unit) == small_letters(number.rest);
  return fault(text, wrong.found,
               "expected " + quoted(std::string(number.digits) + " " + unit) + (capitals ? " (capitals count)" : ""));
}

Read below_zero(std::string_view text, long double below, const Unit& unit) {
  const auto by = static_cast<double>(-below);
  if (unit.kind == Unit::Kind::gauge)
    return fault(text, brief(by / 1e5) + " bar below full vacuum", "expected at least \"-1.01325 barg\"");
  return fault(text, brief(by) + " K below absolute zero", "expected at least \"0 K\" or \"-273.15 degC\"");
}

/// A temperature below absolute zero is let through where only its difference counts.
enum class BelowZero { fault, difference };

Read whole_unit(std::string_view text, Quantity quantity, double number, const Unit& unit, BelowZero below) {
  const auto value = static_cast<long double>(number);
  quantity.plain_bar = unit.name == "bar";
  if (unit.kind == Unit::Kind::part)
    return fault(text, "a unit that counts inside compounds only", "expected \"MPa\" or \"Pa\" (capitals count)");
  if (unit.kind == Unit::Kind::temperature) {
    const long double si = (value + unit.zero) * unit.factor;
    if (si < 0 && below == BelowZero::fault) return below_zero(text, si, unit);
    quantity.temperature = true;
    quantity.difference = quantity.si;
    quantity.si = static_cast<double>(si);
  }
  if (unit.kind == Unit::Kind::gauge) {
    const long double si = value * unit.factor + standard_atmosphere;
    const bool rounded = std::abs(si) < 1e-9L * standard_atmosphere;  // -1.01325 barg is no pressure at all
    if (si < 0 && !rounded) return below_zero(text, si, unit);
    quantity.gauge = true;
    quantity.si = rounded ? 0 : static_cast<double>(si);
  }
  return quantity;
}

bool has_gauge(std::string_view unit) {
  for (const std::string_view gauge : {"barg", "psig", "kPag"})
    if (unit.find(gauge) != std::string_view::npos) return true;
  return false;
}

Read read_quantity(std::string_view text, BelowZero below) {
  if (text.size() > longest_text)
    return fault(text, "a text of " + std::to_string(text.size()) + " bytes", "expected a number with its unit");
  text = trimmed(text);
  const auto front = read_number(text);
  if (const auto* wrong = std::get_if<QuantityFault>(&front)) return *wrong;
  const Number& number = std::get<Number>(front);
  Quantity quantity;
  quantity.si = number.value + 0.0;  // -0 is 0
  quantity.unit = std::string(number.rest);
  if (number.rest.empty()) return quantity;

  const auto unit = read_compound(number.rest);
  if (const auto* wrong = std::get_if<UnitFault>(&unit)) return unit_fault(text, number, *wrong);
  const Compound& compound = std::get<Compound>(unit);
  if (compound.whole == nullptr && has_gauge(number.rest))
    return fault(text, "a gauge pressure inside a compound unit", "expected an absolute one there, such as \"bar\"");
  quantity.si = static_cast<double>(static_cast<long double>(number.value) * compound.factor) + 0.0;
  quantity.dimension = compound.dimension;
  if (!std::isfinite(quantity.si) || (quantity.si == 0 && number.value != 0))
    return fault(text, "a number out of range", "expected a size between 1e-300 and 1e300 in SI units");
  if (compound.whole == nullptr) return quantity;
  return whole_unit(text, quantity, number.value, *compound.whole, below);
}

std::string unit_missing(std::string_view text, Dimension expected, Sense sense) {
  const bool temperature = expected == dim::temperature && sense != Sense::difference;
  if (!temperature) return expectation(expected, sense);
  const std::string number(trimmed(text));
  return "expected " + quoted(number + " K") + " or " + quoted(number + " degC");
}

}  // namespace

std::variant<Quantity, QuantityFault> parse_quantity(std::string_view text) {
  return read_quantity(text, BelowZero::fault);
}

std::variant<double, QuantityFault> fit(const Quantity& quantity, std::string_view text, Dimension expected,
                                        Sense sense) {
  if (quantity.unit.empty() && !(expected == dim::none))
    return fault(text, "a number without a unit", unit_missing(text, expected, sense));
  if (!(quantity.dimension == expected)) return fault(text, name_of(quantity.dimension), expectation(expected, sense));
  if (expected == dim::temperature && sense == Sense::difference)
    return quantity.temperature ? quantity.difference : quantity.si;
  if (expected == dim::temperature && !quantity.temperature)
    return fault(text, "a compound that makes a temperature difference", expectation(expected, Sense::temperature));
  if (quantity.gauge && sense == Sense::difference)
    return fault(text, "a gauge pressure where a difference is meant", expectation(expected, sense));
  return quantity.si;
}

std::variant<double, QuantityFault> to_si(std::string_view text, Dimension expected, Sense sense) {
  const auto read = read_quantity(text, sense == Sense::difference ? BelowZero::difference : BelowZero::fault);
  if (const auto* wrong = std::get_if<QuantityFault>(&read)) return *wrong;
  return fit(std::get<Quantity>(read), text, expected, sense);
}

std::string expectation(Dimension expected, Sense sense) {
  if (expected == dim::none) return "expected a number without a unit, such as 0.95 or \"95 %\"";
  const bool difference = sense == Sense::difference;
  const bool kind = difference && (expected == dim::temperature || expected == dim::pressure);
  return "expected " + name_of(expected) + (kind ? " difference" : "") + ", such as " +
         quoted(example_of(expected, sense));
}

Dimension moles_as_mass(Dimension d) { return {d.mass + d.amount, d.length, d.time, 0, d.temperature}; }

std::optional<double> mass_for_moles(Dimension found, Dimension expected) {
  if (!(moles_as_mass(found) == moles_as_mass(expected))) return std::nullopt;
  return expected.amount - found.amount;
}

}  // namespace vatwright
