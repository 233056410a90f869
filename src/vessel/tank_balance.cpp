#include "tank_balance.hpp"

#include <algorithm>
#include <cmath>

namespace vatwright {

TankBalance::TankBalance(const Setup& setup, double feed_m3_s)
    : setup_(setup),
      evaluator_(setup.chemistry.kinetics),
      broken_(broken_orders(setup.chemistry.kinetics)),
      R_(setup.capacity.size()),
      n_(static_cast<std::size_t>(setup.chemistry.kinetics.species())),
      tau_(setup.volume_m3 / feed_m3_s),
      added_(setup.agitator_W / feed_m3_s),
      moves_(!setup.is_held && setup.heat_known()),
      c_(n_), C_(n_), r_(R_), r_plus_(R_), dr_dc_(n_ * R_), dr_dT_(R_) {
  c_scale_ = 0;
  for (std::size_t i = 0; i < n_; ++i)
    for (std::size_t j = 0; j < R_; ++j)
      if (setup.chemistry.kinetics.nu(static_cast<int>(i), static_cast<int>(j)) != 0)
        c_scale_ = std::max(c_scale_, setup.chemistry.feed.c_mol_m3[i]);
  if (!(c_scale_ > 0)) c_scale_ = 1;
  gone_ = 1e-12 * c_scale_;
}

double TankBalance::temperature(std::span<const double> xi) const {
  if (!moves_) return setup_.inlet_K;
  return adiabatic_temperature(setup_.chemistry, setup_.arrives.xi_mol_m3, setup_.inlet_K, xi, added_);
}

void TankBalance::amounts(std::span<const double> xi, std::span<double> c) const {
  setup_.chemistry.kinetics.amounts(setup_.chemistry.feed.c_mol_m3, xi, c);
}

void TankBalance::rates(std::span<const double> c, double T, double X, std::span<double> r) {
  setup_.chemistry.concentrations_of_amounts(c, T, setup_.inlet_Pa, C_);
  evaluator_(C_, T, X, r);
  for (std::size_t j = 0; j < R_; ++j) r[j] *= setup_.capacity[j];
  for (const BrokenOrder& b : broken_) {
    const double nu = setup_.chemistry.kinetics.nu(static_cast<int>(b.species), static_cast<int>(b.reaction));
    const double left = std::max(0.0, c[b.species]);
    if (nu * r[b.reaction] < 0) r[b.reaction] *= left / (left + gone_);
  }
}

bool TankBalance::operator()(std::span<const double> xi, std::span<double> G) {
  const double T = temperature(xi);
  if (!(T > 1)) return false;
  amounts(xi, c_);
  rates(c_, T, setup_.chemistry.kinetics.conversion(xi), r_);
  for (std::size_t j = 0; j < R_; ++j) {
    G[j] = xi[j] - setup_.arrives.xi_mol_m3[j] - tau_ * r_[j];
    if (!std::isfinite(G[j])) return false;
  }
  return true;
}

bool TankBalance::jacobian(std::span<const double> xi, std::span<double> J) {
  const double T = temperature(xi);
  if (!(T > 1)) return false;
  const double X = setup_.chemistry.kinetics.conversion(xi);
  amounts(xi, c_);
  rates(c_, T, X, r_);
  for (std::size_t i = 0; i < n_; ++i) {
    const double kept = c_[i], h = std::max(1e-7 * std::abs(kept), 1e-3 * gone_);
    c_[i] = kept + h;
    rates(c_, T, X, r_plus_);
    c_[i] = kept;
    for (std::size_t j = 0; j < R_; ++j) dr_dc_[i * R_ + j] = (r_plus_[j] - r_[j]) / h;
  }
  if (moves_) {
    const double h = 1e-6 * T;
    rates(c_, T + h, X, r_plus_);
    for (std::size_t j = 0; j < R_; ++j) dr_dT_[j] = (r_plus_[j] - r_[j]) / h;
  }
  const double capacity = moves_ ? heat_capacity(setup_.chemistry, xi, T) : 1;
  for (std::size_t j = 0; j < R_; ++j)
    for (std::size_t k = 0; k < R_; ++k) {
      double dr = 0;
      for (std::size_t i = 0; i < n_; ++i)
        dr += dr_dc_[i * R_ + j] * setup_.chemistry.kinetics.nu(static_cast<int>(i), static_cast<int>(k));
      if (moves_) dr -= dr_dT_[j] * setup_.chemistry.kinetics.reaction(static_cast<int>(k)).heat->at(T) / capacity;
      J[j * R_ + k] = (j == k ? 1 : 0) - tau_ * dr;
    }
  return true;
}

double TankBalance::allowed(std::span<const double> xi, std::span<const double> step) const {
  double share = 1;
  for (std::size_t i = 0; i < n_; ++i) {
    double c = setup_.chemistry.feed.c_mol_m3[i], dc = 0;
    for (std::size_t j = 0; j < R_; ++j) {
      const double nu = setup_.chemistry.kinetics.nu(static_cast<int>(i), static_cast<int>(j));
      c += nu * xi[j];
      dc += nu * step[j];
    }
    if (dc < -0.01 * gone_ && c + share * dc < 0.01 * c) share = std::max(0.0, 0.99 * c / -dc);
  }
  return share;
}

double TankBalance::imbalance(std::span<const double> xi) {
  std::vector<double> G(R_);
  if (!(*this)(xi, G)) return 1;
  double worst = 0;
  for (std::size_t j = 0; j < R_; ++j) {
    const double terms = std::abs(xi[j]) + std::abs(setup_.arrives.xi_mol_m3[j]) + std::abs(tau_ * r_[j]);
    worst = std::max(worst, std::abs(G[j]) / std::max(terms, 1e-6 * c_scale_));
  }
  return worst;
}

}  // namespace vatwright
