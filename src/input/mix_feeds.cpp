#include "mix_feeds.hpp"

#include <algorithm>
#include <cmath>
#include <optional>

#include "vatwright/kinetics/kinetics.hpp"
#include "vatwright/quantity/show.hpp"

namespace vatwright {
namespace {

/// Heat that 1 m3 of a stream takes up per K between two temperatures, the mean; nullopt where it is not known.
std::optional<double> capacity_of(const Feed& f, double from_K, double to_K) {
  if (f.heat_capacity_J_kg_K)
    return f.density_kg_m3 ? std::optional(*f.heat_capacity_J_kg_K * *f.density_kg_m3) : std::nullopt;
  double sum = 0;
  for (std::size_t i = 0; i < f.species.size(); ++i) {
    if (f.c_mol_m3[i] <= 0) continue;
    if (!f.species[i].heat_capacity) return std::nullopt;
    const HeatCapacity& cp = *f.species[i].heat_capacity;
    sum += f.c_mol_m3[i] * (from_K == to_K ? cp.at(to_K) : cp.integral(from_K, to_K) / (to_K - from_K));
  }
  return sum > 0 && !f.unnamed_solvent ? std::optional(sum) : std::nullopt;
}

/// Temperature of the mixture by enthalpy; heat capacities that move are taken again at the mixed temperature until it
/// stands.
double mixed_temperature(const std::vector<Feed>& streams, const std::vector<double>& v, const Builder& builder) {
  double T = 0, weight = 0;
  for (std::size_t k = 0; k < streams.size(); ++k) T += v[k] * streams[k].temperature_K, weight += v[k];
  T /= weight;
  bool same = true;
  for (const Feed& f : streams) same = same && f.temperature_K == streams[0].temperature_K;
  if (same) return streams[0].temperature_K;
  for (int pass = 0; pass < 60; ++pass) {
    double heat = 0, capacity = 0;
    for (std::size_t k = 0; k < streams.size(); ++k) {
      const auto cp = capacity_of(streams[k], streams[k].temperature_K, T);
      if (!cp) {
        builder.assume("feed.temperature", show(T, Shown::temperature),
                       "heat capacities of the streams are not all known: mixed by volume");
        return T;
      }
      heat += v[k] * *cp * streams[k].temperature_K, capacity += v[k] * *cp;
    }
    const double next = heat / capacity;
    if (std::abs(next - T) < 1e-12 * T) return next;
    T = next;
  }
  return T;
}

template <class Get>
std::optional<double> weighted(const std::vector<Feed>& streams, const std::vector<double>& weight, Get get) {
  double sum = 0, all = 0;
  for (std::size_t k = 0; k < streams.size(); ++k) {
    const std::optional<double> value = get(streams[k]);
    if (!value) return std::nullopt;
    sum += weight[k] * *value, all += weight[k];
  }
  return sum / all;
}

}  // namespace

double mix_feeds(const std::vector<Feed>& streams, const std::vector<double>& v_m3_s, Feed& mixed,
                 const Builder& builder) {
  const std::vector<double>& v = v_m3_s;
  mixed = streams[0];
  const auto all = [&](auto get) {
    double least = get(streams[0]);
    for (const Feed& f : streams) least = std::min(least, get(f));
    return least;
  };
  mixed.pressure_Pa = all([](const Feed& f) { return f.pressure_Pa; });
  mixed.temperature_K = mixed_temperature(streams, v, builder);
  std::vector<double> mass(v.size());
  bool weighed = true;
  for (std::size_t k = 0; k < v.size(); ++k)
    weighed = weighed && streams[k].density_kg_m3, mass[k] = v[k] * streams[k].density_kg_m3.value_or(0);
  mixed.heat_capacity_J_kg_K =
      weighed ? weighted(streams, mass, [](const Feed& f) { return f.heat_capacity_J_kg_K; }) : std::nullopt;
  mixed.viscosity_Pa_s = weighted(streams, v, [](const Feed& f) { return f.viscosity_Pa_s; });
  std::fill(mixed.c_mol_m3.begin(), mixed.c_mol_m3.end(), 0.0);
  double moles = 0, volume = 0;
  for (std::size_t k = 0; k < v.size(); ++k) {
    volume += v[k];
    mixed.unnamed_solvent = mixed.unnamed_solvent || streams[k].unnamed_solvent;
    for (std::size_t i = 0; i < mixed.c_mol_m3.size(); ++i)
      mixed.c_mol_m3[i] += v[k] * streams[k].c_mol_m3[i], moles += v[k] * streams[k].c_mol_m3[i];
  }
  if (mixed.phase == Phase::gas) volume = moles * gas_constant * mixed.temperature_K / mixed.pressure_Pa;
  for (double& c : mixed.c_mol_m3) c /= volume;
  double total_mass = 0;
  for (const double m : mass) total_mass += m;
  mixed.density_kg_m3 = weighed ? std::optional(total_mass / volume) : std::nullopt;
  return volume;
}

}  // namespace vatwright
