#include <cmath>

#include "simplex.hpp"
#include "vatwright/error/expects.hpp"
#include "vatwright/kinetics/kinetics.hpp"

namespace vatwright {

std::optional<double> moles_needed(const Kinetics& kinetics, const std::vector<bool>& fed, int species) {
  VATWRIGHT_EXPECTS(kinetics.of() >= 0 && species >= 0 && species < kinetics.species());
  VATWRIGHT_EXPECTS(fed.size() == static_cast<std::size_t>(kinetics.species()));
  if (species == kinetics.of()) return std::nullopt;
  if (kinetics.fed_ == fed) return kinetics.needed_[static_cast<std::size_t>(species)];

  // Columns: extents, then one surplus for each species that may not be used up because nobody feeds it.
  std::vector<int> kept;
  for (int i = 0; i < kinetics.species(); ++i)
    if (!fed[static_cast<std::size_t>(i)] && i != species && i != kinetics.of()) kept.push_back(i);
  const auto reactions = static_cast<std::size_t>(kinetics.reactions());
  const std::size_t n = reactions + kept.size(), m = kept.size() + 1;
  std::vector<double> c(n, 0.0), A(n * m, 0.0), b(m, 0.0);
  for (std::size_t j = 0; j < reactions; ++j) {
    c[j] = -kinetics.nu(kinetics.of(), static_cast<int>(j));  // consumption of A
    A[j] = kinetics.nu(species, static_cast<int>(j));         // makes one mole of S
    for (std::size_t i = 0; i < kept.size(); ++i) A[(i + 1) * n + j] = kinetics.nu(kept[i], static_cast<int>(j));
  }
  b[0] = 1;
  for (std::size_t i = 0; i < kept.size(); ++i) A[(i + 1) * n + reactions + i] = -1;

  const auto consumed = least(c, A, b);
  if (!consumed || *consumed <= 1e-9) return std::nullopt;  // not made, or made without A
  const double whole = std::round(*consumed);
  return std::abs(*consumed - whole) < 1e-9 ? whole : *consumed;
}

}  // namespace vatwright
