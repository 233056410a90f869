#include "measure_of_amount.hpp"

#include <cmath>

namespace vatwright {

std::optional<double> AmountReader::molar_mass(const std::string& species) const {
  const auto found = molar_mass_.find(species);
  return found == molar_mass_.end() ? std::nullopt : std::optional(found->second);
}

Dimension AmountReader::dimension(Dimension expected) const {
  return amounts_ == Amounts::mass ? moles_as_mass(expected) : expected;
}

std::optional<double> AmountReader::read(const Raw& raw, Dimension expected, const std::string& species,
                                         const std::string& subject, const std::string& key) const {
  const Dimension wanted = dimension(expected);
  if (amounts_ == Amounts::moles && !species.empty() && !(raw.quantity.dimension == wanted)) {
    const std::optional<double> power = mass_for_moles(raw.quantity.dimension, wanted);
    if (power && *power != 0) {
      if (const auto M = molar_mass(species)) return raw.quantity.si / std::pow(*M, *power);
      builder_.about(subject).error(raw.place, key,
                                    "found " + quoted(raw.text) + ", by mass, of a species without a molar mass",
                                    "expected species." + species + ".molar_mass, or moles");
      return std::nullopt;
    }
  }
  const auto si = fit(raw.quantity, raw.text, wanted);
  if (const auto* value = std::get_if<double>(&si)) return *value;
  const auto& fault = std::get<QuantityFault>(si);
  builder_.about(subject).error(raw.place, key, fault.found, fault.expected);
  return std::nullopt;
}

}  // namespace vatwright
