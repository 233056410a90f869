#pragma once
#include <optional>
#include <string>
#include <vector>

#include "vatwright/stream/species.hpp"

namespace vatwright {

enum class Phase { liquid, gas };

/// moles: amounts in mol, concentrations in mol/m3. mass: amounts in kg, concentrations in kg/m3 (liquids only).
/// Every name that ends in mol means kg under `mass`.
enum class Amounts { moles, mass };

/// The whole feed, all streams of it mixed. Everything downstream is told per m3 of this feed at its own temperature and
/// pressure: concentrations of the mixed feed, and extents of reaction xi_j in mol per m3 of mixed feed, so that
///   c_i = c_i,feed + sum_j nu_ij xi_j     (mol per m3 of mixed feed)
/// holds anywhere in a hookup, mixing is linear, and mass can not drift.
struct Feed {
  Phase phase = Phase::liquid;
  Amounts amounts = Amounts::moles;
  std::vector<Species> species;   ///< in the order first met in feeds, then equations
  std::vector<double> c_mol_m3;   ///< one per species; 0 for what is only made
  double temperature_K = 298.15;
  double pressure_Pa = 101325;
  std::optional<double> density_kg_m3;          ///< of the mixed feed; a gas: from molar masses where all are known
  std::optional<double> heat_capacity_J_kg_K;   ///< of the mixture; then constant everywhere
  std::optional<double> viscosity_Pa_s;
  bool unnamed_solvent = false;   ///< a liquid whose named species do not add up to the density

  [[nodiscard]] int index_of(const std::string& name) const;   ///< -1 where there is none
};

/// What passes between vessels: a share of the feed with what has happened to it.
struct Stream {
  double feed_m3_s = 0;             ///< how much of the mixed feed this stream is, at feed conditions
  std::vector<double> xi_mol_m3;    ///< extents, one per reaction, per m3 of mixed feed
  double temperature_K = 0;
  double pressure_Pa = 0;
};

}  // namespace vatwright
