#include "vatwright/kinetics/kinetics.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

#include "rate_part.hpp"
#include "vatwright/error/expects.hpp"
#include "vatwright/numeric/matrix.hpp"

namespace vatwright {

Kinetics::Kinetics(std::vector<Reaction> reactions, int species, int of, double c_of_feed_mol_m3, std::vector<bool> fed)
    : reactions_(std::move(reactions)), species_(species), of_(of), c_of_feed_(c_of_feed_mol_m3) {
  VATWRIGHT_EXPECTS(species >= 0 && of < species);
  const std::size_t width = reactions_.size();
  nu_.assign(static_cast<std::size_t>(species) * width, 0.0);
  for (std::size_t j = 0; j < width; ++j)
    for (const SpeciesFigure& part : reactions_[j].nu) {
      VATWRIGHT_EXPECTS(part.species >= 0 && part.species < species);
      nu_[static_cast<std::size_t>(part.species) * width + j] += part.value;
    }
  independent_ = rank_of(nu_, species_, static_cast<int>(width));
  compiled_ = std::make_shared<const RateEvaluator>(*this);
  if (fed.empty() || of < 0) return;
  std::vector<std::optional<double>> needed;
  for (int i = 0; i < species; ++i) needed.push_back(moles_needed(*this, fed, i));
  needed_ = std::move(needed), fed_ = std::move(fed);
}

double Kinetics::left_to_run(int j, std::span<const double> c) const {
  double extent = std::numeric_limits<double>::infinity();
  for (int i = 0; i < species_; ++i)
    if (const double net = nu(i, j); net < 0) extent = std::min(extent, c[static_cast<std::size_t>(i)] / -net);
  return std::isfinite(extent) ? std::max(extent, 0.0) : 0;
}

bool Kinetics::has_table() const {
  return std::ranges::any_of(reactions_,
                             [](const Reaction& r) { return std::holds_alternative<RateTable>(r.forward); });
}

double Kinetics::mole_change(int j) const {
  double change = 0;
  for (int i = 0; i < species_; ++i) change += nu(i, j);
  return change;
}

double Kinetics::conversion(std::span<const double> xi) const {
  VATWRIGHT_EXPECTS(of_ >= 0 && c_of_feed_ > 0);
  double made = 0;
  for (int j = 0; j < reactions(); ++j) made += nu(of_, j) * xi[static_cast<std::size_t>(j)];
  return made == 0 ? 0 : -made / c_of_feed_;
}

void Kinetics::amounts(std::span<const double> c_feed, std::span<const double> xi, std::span<double> c) const {
  const double* nu_ij = nu_.data();
  for (std::size_t i = 0; i < c.size(); ++i) {
    c[i] = c_feed[i];
    for (std::size_t j = 0; j < xi.size(); ++j) c[i] += *nu_ij++ * xi[j];
  }
}

std::optional<std::pair<int, int>> Kinetics::absent_with_negative_order(std::span<const double> C) const {
  for (int j = 0; j < reactions(); ++j)
    for (const RatePart& part : parts_of(*this, j))
      if (part.runs(C))
        for (const auto& [species, order] : part.orders)
          if (order < 0 && C[static_cast<std::size_t>(species)] <= 0) return std::pair{j, species};
  return std::nullopt;
}

std::optional<std::pair<double, double>> table_range(const Kinetics& kinetics) {
  for (int j = 0; j < kinetics.reactions(); ++j)
    if (const auto* table = std::get_if<RateTable>(&kinetics.reaction(j).forward))
      return std::pair{table->conversion.front(), table->conversion.back()};
  return std::nullopt;
}

}  // namespace vatwright
