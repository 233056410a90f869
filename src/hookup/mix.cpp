#include "vatwright/hookup/mix.hpp"

#include <algorithm>
#include <cmath>

#include "vatwright/error/expects.hpp"
#include "vatwright/numeric/root.hpp"

namespace vatwright {
namespace {

Outcome<double> mixed_temperature(const Chemistry& chemistry, std::span<const Stream> branches, double q) {
  const auto [low, high] = std::minmax_element(branches.begin(), branches.end(), [](const Stream& a, const Stream& b) {
    return a.temperature_K < b.temperature_K;
  });
  if (low->temperature_K == high->temperature_K) return low->temperature_K;
  double mean = 0;
  for (const Stream& s : branches) mean += s.feed_m3_s / q * s.temperature_K;
  if (!heat_capacity_known(chemistry) || chemistry.feed.heat_capacity_J_kg_K)
    return mean;  // constant: exactly the mean
  const auto missing = [&](double T) {
    double H = 0;
    for (const Stream& s : branches) H += s.feed_m3_s / q * sensible_heat(chemistry, s.xi_mol_m3, s.temperature_K, T);
    return H;
  };
  return find_root(missing, low->temperature_K, high->temperature_K);
}

}  // namespace

bool heat_capacity_known(const Chemistry& chemistry) {
  const Feed& feed = chemistry.feed;
  if (feed.heat_capacity_J_kg_K) return chemistry.feed_mass().has_value();
  return !feed.unnamed_solvent && std::all_of(feed.species.begin(), feed.species.end(),
                                              [](const Species& s) { return s.heat_capacity.has_value(); });
}

Outcome<Stream> mix(const Chemistry& chemistry, std::span<const Stream> branches) {
  VATWRIGHT_EXPECTS(!branches.empty());
  Stream out = branches.front();
  out.feed_m3_s = 0;
  for (const Stream& s : branches) {
    VATWRIGHT_EXPECTS(s.feed_m3_s > 0);
    out.feed_m3_s += s.feed_m3_s;
    out.pressure_Pa = std::min(out.pressure_Pa, s.pressure_Pa);
  }
  for (std::size_t j = 0; j < out.xi_mol_m3.size(); ++j) {
    const double first = branches.front().xi_mol_m3[j];  // counted from there, what is equal in all stays exactly that
    for (const Stream& s : branches) out.xi_mol_m3[j] += s.feed_m3_s / out.feed_m3_s * (s.xi_mol_m3[j] - first);
  }
  const auto T = mixed_temperature(chemistry, branches, out.feed_m3_s);
  if (const auto* why = std::get_if<NoAnswer>(&T)) return NoAnswer{why->kind, "temperature after mixing: " + why->why};
  out.temperature_K = std::get<double>(T);
  return out;
}

}  // namespace vatwright
