#pragma once
#include <map>
#include <optional>
#include <string>
#include <vector>

#include "builder.hpp"
#include "vatwright/field/given.hpp"
#include "vatwright/stream/feed.hpp"

namespace vatwright {

/// Turns figures whose dimension counts an amount into SI: moles, or kilograms under amounts = "mass"; mass units on a
/// species
/// ("6 mg/L") are turned by its molar mass.
class AmountReader {
 public:
  AmountReader(Amounts amounts, const Builder& builder) : amounts_(amounts), builder_(builder) {}

  void know(const std::string& species, double molar_mass_kg_mol) { molar_mass_[species] = molar_mass_kg_mol; }
  [[nodiscard]] std::optional<double> molar_mass(const std::string& species) const;
  [[nodiscard]] Amounts amounts() const { return amounts_; }
  /// `expected` in moles; what the files must say under these amounts.
  [[nodiscard]] Dimension dimension(Dimension expected) const;

  /// The SI figure, or nullopt with a message at raw's place. species: whose amount it counts; empty: nobody's.
  std::optional<double> read(const Raw& raw, Dimension expected, const std::string& species, const std::string& subject,
                             const std::string& key) const;

 private:
  Amounts amounts_;
  const Builder& builder_;
  std::map<std::string, double> molar_mass_;
};

}  // namespace vatwright
