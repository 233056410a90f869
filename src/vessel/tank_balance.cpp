#include "tank_balance.hpp"

#include <algorithm>
#include <cmath>

#include "least_squares.hpp"

namespace vatwright {

TankBalance::TankBalance(const Setup& setup, double feed_m3_s)
    : setup_(setup),
      evaluator_(setup.chemistry.kinetics),
      broken_(broken_orders(setup.chemistry.kinetics)),
      R_(setup.capacity.size()),
      n_(static_cast<std::size_t>(setup.chemistry.kinetics.species())),
      exchange_(setup.exchange(feed_m3_s)),
      tau_(setup.volume_m3 / feed_m3_s),
      moves_(setup.T_moves()),
      nu_(n_ * R_),
      c_in_(n_),
      c_(n_),
      C_(n_),
      r_(R_),
      r_plus_(R_),
      dr_dc_(n_ * R_),
      dr_dT_(R_) {
  c_scale_ = 0;
  for (std::size_t i = 0; i < n_; ++i)
    for (std::size_t j = 0; j < R_; ++j) {
      nu_[i * R_ + j] = setup.chemistry.kinetics.nu(static_cast<int>(i), static_cast<int>(j));
      if (nu(i, j) != 0) c_scale_ = std::max(c_scale_, setup.chemistry.feed.c_mol_m3[i]);
    }
  if (!(c_scale_ > 0)) c_scale_ = 1;
  gone_ = 1e-12 * c_scale_;
  setup.chemistry.kinetics.amounts(setup.chemistry.feed.c_mol_m3, setup.arrives.xi_mol_m3, c_in_);
  for (double& c : c_in_) c = c < 1e-15 * c_scale_ ? 0 : c;  // rounding of what is gone
}

std::vector<double> TankBalance::contents(std::span<const double> xi) const {
  std::vector<double> y(n_);
  setup_.chemistry.kinetics.amounts(setup_.chemistry.feed.c_mol_m3, xi, y);
  for (double& c : y) c = std::max(c, 0.0);
  if (moves_) y.push_back(mixed_temperature(setup_.chemistry, setup_.arrives.xi_mol_m3, setup_.inlet_K, xi, exchange_));
  return y;
}

std::vector<double> TankBalance::extents(std::span<const double> y) {
  std::vector<double> change(n_);
  for (std::size_t i = 0; i < n_; ++i) change[i] = y[i] - setup_.chemistry.feed.c_mol_m3[i];
  auto xi = least_squares(nu_, change, R_);
  if (!xi.empty()) return xi;
  rates(y, temperature(y), r_);
  xi = setup_.arrives.xi_mol_m3;
  for (std::size_t j = 0; j < R_; ++j) xi[j] += tau_ * r_[j];
  return xi;
}

void TankBalance::rates(std::span<const double> y, double T, std::span<double> r) {
  const auto c = y.first(n_);
  setup_.chemistry.concentrations_of_amounts(c, T, setup_.inlet_Pa, C_);
  evaluator_(C_, T, 0, r);
  for (std::size_t j = 0; j < R_; ++j) r[j] *= setup_.capacity[j];
  for (const BrokenOrder& b : broken_) {
    const double left = std::max(0.0, c[b.species]);
    if (nu(b.species, b.reaction) * r[b.reaction] < 0) r[b.reaction] *= left / (left + gone_);
  }
}

bool TankBalance::operator()(std::span<const double> y, std::span<double> F) {
  const double T = temperature(y);
  if (!(T > 1)) return false;
  rates(y, T, r_);
  for (std::size_t i = 0; i < n_; ++i) {
    F[i] = y[i] - c_in_[i];
    for (std::size_t j = 0; j < R_; ++j) F[i] -= tau_ * nu(i, j) * r_[j];
  }
  if (moves_) {
    double heat = setup_.warming_of_inlet(T) - exchange_.added_J_m3 + exchange_.per_K_J_m3_K * (T - exchange_.medium_K);
    for (std::size_t j = 0; j < R_; ++j) heat += tau_ * r_[j] * setup_.dH(j, T);
    F[n_] = heat / setup_.capacity_at(setup_.arrives.xi_mol_m3, T);
  }
  return std::ranges::all_of(F, [](double f) { return std::isfinite(f); });
}

/// dr_j/dc_i and dr_j/dT at y; r_ is left at y.
void TankBalance::differences(std::span<const double> y, double T) {
  rates(y, T, r_);
  std::vector<double> c(y.begin(), y.end());
  for (std::size_t i = 0; i < n_; ++i) {
    const double h = c[i] > 0 ? 1e-7 * c[i] : 1e-9 * gone_;
    c[i] = y[i] + h;
    rates(c, T, r_plus_);
    for (std::size_t j = 0; j < R_; ++j) dr_dc_[i * R_ + j] = (r_plus_[j] - r_[j]) / (c[i] - y[i]);
    c[i] = y[i];
  }
  if (!moves_) return;
  const double h = 1e-6 * T;
  rates(y, T + h, r_plus_);
  for (std::size_t j = 0; j < R_; ++j) dr_dT_[j] = (r_plus_[j] - r_[j]) / h;
}

bool TankBalance::jacobian(std::span<const double> y, std::span<double> J) {
  const double T = temperature(y);
  if (!(T > 1)) return false;
  differences(y, T);
  const std::size_t m = size();
  for (std::size_t i = 0; i < n_; ++i) {
    for (std::size_t k = 0; k < n_; ++k) {
      double sum = i == k ? 1 : 0;
      for (std::size_t j = 0; j < R_; ++j) sum -= tau_ * nu(i, j) * dr_dc_[k * R_ + j];
      J[i * m + k] = sum;
    }
    if (!moves_) continue;
    J[i * m + n_] = 0;
    for (std::size_t j = 0; j < R_; ++j) J[i * m + n_] -= tau_ * nu(i, j) * dr_dT_[j];
  }
  if (!moves_) return true;
  const double capacity = setup_.capacity_at(setup_.arrives.xi_mol_m3, T), h = 1e-5 * T;
  for (std::size_t k = 0; k < n_; ++k) {
    double heat = 0;
    for (std::size_t j = 0; j < R_; ++j) heat += tau_ * dr_dc_[k * R_ + j] * setup_.dH(j, T);
    J[n_ * m + k] = heat / capacity;
  }
  double heat = capacity + exchange_.per_K_J_m3_K;
  for (std::size_t j = 0; j < R_; ++j)
    heat += tau_ * (dr_dT_[j] * setup_.dH(j, T) + r_[j] * (setup_.dH(j, T + h) - setup_.dH(j, T)) / h);
  J[n_ * m + n_] = heat / capacity;
  return true;
}

double TankBalance::warms_slower(std::span<const double> y) const {
  if (!moves_ || setup_.chemistry.feed.heat_capacity_J_kg_K) return 1;
  const double T = temperature(y);
  double contents = 0;
  for (std::size_t i = 0; i < n_; ++i)
    if (const auto& cp = setup_.chemistry.feed.species[i].heat_capacity) contents += y[i] * cp->at(T);
  return contents > 0 ? setup_.capacity_at(setup_.arrives.xi_mol_m3, T) / contents : 1;
}

double TankBalance::allowed(std::span<const double> step) const {
  return moves_ && std::abs(step[n_]) > 50 ? 50 / std::abs(step[n_]) : 1;
}

double TankBalance::imbalance(std::span<const double> y) {
  std::vector<double> F(size());
  if (!(*this)(y, F)) return 1;
  const double T = temperature(y);
  differences(y, T);
  std::vector<double> both_ways(R_);  // forward and back together, from how each amount drives the rate
  for (std::size_t j = 0; j < R_; ++j) {
    both_ways[j] = std::abs(r_[j]);
    for (std::size_t i = 0; i < n_; ++i) both_ways[j] = std::max(both_ways[j], std::abs(dr_dc_[i * R_ + j]) * y[i]);
  }
  double worst = 0;
  for (std::size_t i = 0; i < n_; ++i) {
    double terms = std::abs(y[i]) + c_in_[i];
    for (std::size_t j = 0; j < R_; ++j) terms += tau_ * std::abs(nu(i, j)) * both_ways[j];
    if (terms > 0) worst = std::max(worst, std::abs(F[i]) / terms);
  }
  if (moves_) {
    const double capacity = setup_.capacity_at(setup_.arrives.xi_mol_m3, T);
    double terms = T + exchange_.per_K_J_m3_K * (T + exchange_.medium_K) / capacity;
    for (std::size_t j = 0; j < R_; ++j) terms += tau_ * both_ways[j] * std::abs(setup_.dH(j, T)) / capacity;
    worst = std::max(worst, std::abs(F[n_]) / terms);
  }
  return worst;
}

}  // namespace vatwright
