#include "transient.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <numeric>

namespace vatwright {

Transient::Transient(const Setup& setup, double feed_m3_s)
    : setup_(setup),
      evaluator_(setup.chemistry.kinetics),
      broken_(broken_orders(setup.chemistry.kinetics)),
      mirror_(setup.chemistry.kinetics),
      exchange_(setup.exchange(feed_m3_s)),
      tau_(setup.volume_m3 / feed_m3_s),
      n_(static_cast<std::size_t>(setup.chemistry.kinetics.species())),
      c_in_(n_),
      C_(n_),
      r_(setup.capacity.size()),
      moves_(setup.T_moves()) {
  setup.chemistry.kinetics.amounts(setup.chemistry.feed.c_mol_m3, setup.arrives.xi_mol_m3, c_in_);
  for (double& c : c_in_) c = std::max(c, 0.0);  // rounding of what is gone
  total_in_ = std::accumulate(c_in_.begin(), c_in_.end(), 0.0);
  if (total_in_ > 0) c_scale_ = total_in_;
}

std::vector<double> Transient::scale() const {
  std::vector<double> all(n_, c_scale_);
  if (moves_) all.push_back(300);
  return all;
}

void Transient::operator()(std::span<const double> y, std::span<double> dy) {
  const double T = temperature(y);
  if (!(T > 1)) {  // a trial step gone astray: no value there
    std::ranges::fill(dy, std::numeric_limits<double>::quiet_NaN());
    return;
  }
  rates(y, T);
  double made = 0;
  for (std::size_t i = 0; i < n_; ++i) {
    dy[i] = c_in_[i];
    for (std::size_t j = 0; j < r_.size(); ++j)
      dy[i] += tau_ * setup_.chemistry.kinetics.nu(static_cast<int>(i), static_cast<int>(j)) * r_[j];
    made += dy[i];
  }
  const double dT = moves_ ? warming(y, T) : 0;
  double leaves = 1;
  if (setup_.is_gas) {
    const double held = setup_.inlet_Pa / (gas_constant * T);  // sum C_i
    leaves = (made + held / T * dT) / held;
  }
  for (std::size_t i = 0; i < n_; ++i) dy[i] -= leaves * y[i];
  if (moves_) dy[n_] = dT;
}

void Transient::jacobian(std::span<const double> y, std::span<double> J) {
  const std::size_t m = size();
  std::vector<double> moved(y.begin(), y.end()), dy(m), dy_moved(m);
  (*this)(y, dy);
  for (std::size_t k = 0; k < m; ++k) {
    const double h = k < n_ ? std::max(1e-7 * std::abs(y[k]), 1e-3 * fade * c_scale_) : 1e-6 * y[k];
    moved[k] = y[k] + h;
    (*this)(moved, dy_moved);
    for (std::size_t i = 0; i < m; ++i) J[i * m + k] = (dy_moved[i] - dy[i]) / h;
    moved[k] = y[k];
  }
}

void Transient::rates(std::span<const double> y, double T) {
  std::ranges::copy(y.first(n_), C_.begin());
  mirror_.turn_up(C_);
  const double X = 0;  // tables never come here: they are held and start on the line of their extents
  evaluator_(C_, T, X, r_);
  for (std::size_t j = 0; j < r_.size(); ++j) r_[j] *= setup_.capacity[j];
  for (const BrokenOrder& b : broken_) {
    const double c = C_[b.species], last = fade * c_scale_;
    const double nu = setup_.chemistry.kinetics.nu(static_cast<int>(b.species), static_cast<int>(b.reaction));
    if (nu * r_[b.reaction] < 0) r_[b.reaction] *= c / (c + last);
  }
  mirror_.turn_rates(r_);
}

double Transient::warming(std::span<const double> y, double T) const {
  double heat = exchange_.added_J_m3 - exchange_.per_K_J_m3_K * (T - exchange_.medium_K) - setup_.warming_of_inlet(T);
  for (std::size_t j = 0; j < r_.size(); ++j) heat -= tau_ * r_[j] * setup_.dH(j, T);
  return heat / capacity(y, T);
}

/// Of the contents, J/K per m3; a gas with one heat capacity for the mixture: in proportion to its moles.
double Transient::capacity(std::span<const double> y, double T) const {
  const Feed& feed = setup_.chemistry.feed;
  if (feed.heat_capacity_J_kg_K) {
    const double of_feed = setup_.capacity_at(setup_.arrives.xi_mol_m3, T);
    return setup_.is_gas ? of_feed * setup_.inlet_Pa / (gas_constant * T) / total_in_ : of_feed;
  }
  double sum = 0;
  for (std::size_t i = 0; i < n_; ++i)
    if (const auto& cp = feed.species[i].heat_capacity) sum += std::max(0.0, y[i]) * cp->at(T);
  return sum;
}

}  // namespace vatwright
