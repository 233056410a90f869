#include "tube_balance.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

#include "tube_outcome.hpp"
#include "vatwright/vessel/pressure_drop.hpp"

namespace vatwright {
namespace {

/// The largest concentration of what takes part, mol per m3 of mixed feed.
double scale_of(const Chemistry& chemistry) {
  double largest = 0;
  for (int i = 0; i < chemistry.kinetics.species(); ++i)
    for (int j = 0; j < chemistry.kinetics.reactions(); ++j)
      if (chemistry.kinetics.nu(i, j) != 0)
        largest = std::max(largest, chemistry.feed.c_mol_m3[static_cast<std::size_t>(i)]);
  return largest > 0 ? largest : 1;
}

}  // namespace

bool TubeBalance::pressure_acts(const Setup& setup) {
  return !setup.is_tank && setup.is_gas &&
         loss_per_length(setup, 1, setup.arrives.xi_mol_m3, setup.inlet_K, setup.inlet_Pa).has_value();
}

bool TubeBalance::serves_all_rates(const Setup& setup) {
  const bool medium_moves =
      setup.is_jacketed() && setup.jacket.passage != Passage::uniform && std::isfinite(setup.jacket.capacity_W_K);
  return !pressure_acts(setup) && !medium_moves;
}

TubeBalance::TubeBalance(const Setup& setup, Coordinate coordinate, double feed_m3_s)
    : setup_(setup),
      evaluator_(setup.chemistry.kinetics),
      broken_(broken_orders(setup.chemistry.kinetics)),
      mirror_(setup.chemistry.kinetics),
      R_(setup.capacity.size()),
      coordinate_(coordinate),
      factor_(coordinate == Coordinate::length ? setup.volume_m3 / feed_m3_s : 1),
      feed_m3_s_(feed_m3_s),
      length_m_(length_of(setup.vessel.kind)),
      c_scale_(scale_of(setup.chemistry)),
      gone_(1e-10 * c_scale_),
      C_(static_cast<std::size_t>(setup.chemistry.kinetics.species())),
      r_(R_),
      dT_(R_) {
  exhausted_.assign(C_.size(), false);
  setup.chemistry.kinetics.amounts(setup.chemistry.feed.c_mol_m3, setup.arrives.xi_mol_m3, C_);
  for (const BrokenOrder& b : broken_) {
    if (std::ranges::find(can_run_out_, b.species) == can_run_out_.end()) can_run_out_.push_back(b.species);
    if (C_[b.species] <= gone_) exhausted_[b.species] = true;
  }
  size_ = R_;
  if (setup.is_jacketed()) {
    const JacketSide& jacket = setup.jacket;
    temperature_ = size_++;
    u_ = jacket.UA_W_K / setup.volume_m3;
    if (coordinate == Coordinate::length && jacket.passage != Passage::uniform && std::isfinite(jacket.capacity_W_K)) {
      medium_ = size_++;
      medium_u_ = u_ * feed_m3_s / jacket.capacity_W_K * (jacket.passage == Passage::co_current ? 1 : -1);
    }
  }
  if (coordinate == Coordinate::length && pressure_acts(setup)) pressure_ = size_++;
  if (temperature_) return;
  if (setup.is_held || !setup.heat_known()) return;
  linear_ = heat_is_constant(setup.chemistry);
  if (!linear_) return;
  const double capacity = heat_capacity(setup.chemistry, setup.arrives.xi_mol_m3, setup.inlet_K);
  for (std::size_t j = 0; j < R_; ++j)
    dT_[j] = -setup.chemistry.kinetics.reaction(static_cast<int>(j)).heat->dH_J_mol / capacity;
}

std::vector<double> TubeBalance::at_inlet(double medium_K) const {
  std::vector<double> y = setup_.arrives.xi_mol_m3;
  y.resize(size_);
  if (temperature_) y[*temperature_] = setup_.inlet_K;
  if (medium_) y[*medium_] = medium_K;
  if (pressure_) y[*pressure_] = 1;
  return y;
}

std::vector<double> TubeBalance::scale() const {
  std::vector<double> all(size_, 100.0);  // K
  std::fill_n(all.begin(), R_, c_scale_);
  if (pressure_) all[*pressure_] = 1;
  return all;
}

double TubeBalance::temperature(std::span<const double> y) const {
  if (temperature_) return y[*temperature_];
  if (!linear_) return adiabatic_temperature(setup_.chemistry, setup_.arrives.xi_mol_m3, setup_.inlet_K, y.first(R_));
  double T = setup_.inlet_K;
  for (std::size_t j = 0; j < R_; ++j) T += dT_[j] * (y[j] - setup_.arrives.xi_mol_m3[j]);
  return T;
}

double TubeBalance::pressure(std::span<const double> y) const {
  return pressure_ ? setup_.inlet_Pa * std::sqrt(std::max(y[*pressure_], 0.01 * no_pressure)) : setup_.inlet_Pa;
}

double TubeBalance::left(std::size_t species, std::span<const double> y) const {
  double c = setup_.chemistry.feed.c_mol_m3[species];
  for (std::size_t j = 0; j < R_; ++j)
    c += setup_.chemistry.kinetics.nu(static_cast<int>(species), static_cast<int>(j)) * y[j];
  return (c - gone_) / c_scale_;
}

/// Rates with what can run out never below what counts as gone: those just above zero.
void TubeBalance::rates_just_above(std::span<const double> y, double T, std::optional<std::size_t> raised) {
  setup_.chemistry.kinetics.amounts(setup_.chemistry.feed.c_mol_m3, y.first(R_), C_);
  for (std::size_t i : can_run_out_) C_[i] = std::max(C_[i], raised == i ? 4 * gone_ : gone_);
  rates_of_amounts(T, setup_.chemistry.kinetics.conversion(y.first(R_)), pressure(y));
}

/// From amounts in C_, which become concentrations.
void TubeBalance::rates_of_amounts(double T, double X, double P) {
  mirror_.turn_up(C_);
  setup_.chemistry.concentrations_of_amounts(C_, T, P, C_);
  evaluator_(C_, T, X, r_);
  for (std::size_t j = 0; j < R_; ++j) r_[j] *= setup_.capacity[j];
  mirror_.turn_rates(r_);
}

double TubeBalance::made(std::size_t species) const {
  double sum = 0;
  for (std::size_t j = 0; j < R_; ++j)
    sum += std::max(0.0, setup_.chemistry.kinetics.nu(static_cast<int>(species), static_cast<int>(j)) * r_[j]);
  return sum;
}

double TubeBalance::used(std::size_t species) const {
  double sum = 0;
  for (std::size_t j = 0; j < R_; ++j)
    sum += std::max(0.0, -setup_.chemistry.kinetics.nu(static_cast<int>(species), static_cast<int>(j)) * r_[j]);
  return sum;
}

/// Reactions that use up what is exhausted are cut to what is made of it; a cut may cut what another one makes, hence
/// the rounds.
void TubeBalance::share_out() {
  for (int round = 0; round < 4; ++round) {
    for (std::size_t i : can_run_out_) {
      if (!exhausted_[i]) continue;
      const double use = used(i), make = made(i);
      if (!(use > make)) continue;
      for (std::size_t j = 0; j < R_; ++j)
        if (setup_.chemistry.kinetics.nu(static_cast<int>(i), static_cast<int>(j)) * r_[j] < 0) r_[j] *= make / use;
    }
  }
}

void TubeBalance::finish(std::size_t species, std::span<double> y) {
  rates_just_above(y, temperature(y));
  std::size_t most = R_;
  double rate = 0;
  for (std::size_t j = 0; j < R_; ++j)
    if (const double use = -setup_.chemistry.kinetics.nu(static_cast<int>(species), static_cast<int>(j)) * r_[j];
        use > rate) {
      rate = use;
      most = j;
    }
  if (most == R_) return;
  const double c = left(species, y) * c_scale_ + gone_;
  y[most] -= c / setup_.chemistry.kinetics.nu(static_cast<int>(species), static_cast<int>(most));
}

double TubeBalance::wanting(std::size_t species, std::span<const double> y) {
  // asked at four times what counts as gone: what comes back does not run out again at once
  rates_just_above(y, temperature(y), species);
  const bool was = exhausted_[species];
  exhausted_[species] = false;  // the others stay cut
  share_out();
  exhausted_[species] = was;
  return used(species) - made(species);
}

void TubeBalance::operator()(std::span<const double> y, std::span<double> dy) {
  const double T = temperature(y);
  if (!(T > 1)) {
    std::ranges::fill(dy, std::numeric_limits<double>::quiet_NaN());
    return;
  }
  rates_just_above(y, T);
  share_out();
  for (std::size_t j = 0; j < R_; ++j) dy[j] = factor_ * r_[j];
  if (temperature_) dy[*temperature_] = factor_ * warming(y, T);
  if (medium_) dy[*medium_] = factor_ * medium_u_ * (T - y[*medium_]);
  if (!pressure_) return;
  const double P = pressure(y);
  const double loss = loss_per_length(setup_, feed_m3_s_, y.first(R_), T, P).value_or(0);
  dy[*pressure_] = -2 * P / (setup_.inlet_Pa * setup_.inlet_Pa) * length_m_ * loss;
}

/// dT per space time, K/s, at the rates in r_.
double TubeBalance::warming(std::span<const double> y, double T) const {
  double heat = -u_ * (T - medium(y));
  for (std::size_t j = 0; j < R_; ++j) heat -= r_[j] * setup_.dH(j, T);
  return heat / setup_.capacity_at(y.first(R_), T);
}

/// By differences in the amount of each species, in proportion to it, so that what is nearly gone is felt at its own
/// size.
void TubeBalance::jacobian(std::span<const double> y, std::span<double> J) {
  const Kinetics& kinetics = setup_.chemistry.kinetics;
  const double T = std::max(1.0, temperature(y)), X = kinetics.conversion(y.first(R_)), P = pressure(y);
  const std::size_t m = size(), n = C_.size();
  std::vector<double> c(n), r(R_), dr(R_);
  kinetics.amounts(setup_.chemistry.feed.c_mol_m3, y.first(R_), c);
  const auto rates = [&](double T_K, double P_Pa) {
    C_ = c;
    for (std::size_t i : can_run_out_) C_[i] = std::max(C_[i], gone_);
    rates_of_amounts(T_K, X, P_Pa);
    share_out();
  };
  std::ranges::fill(J, 0.0);
  // rates at (T, P) against what is moved: d(rates)/d(that), and what follows for T at those rates
  const double warms = temperature_ ? (rates(T, P), warming(y, T)) : 0;
  rates(T, P);
  r = r_;
  const auto add_column = [&](std::size_t k, double h, double weight) {
    for (std::size_t j = 0; j < R_; ++j) J[j * m + k] += factor_ * (r_[j] - r[j]) / h * weight;
    if (temperature_) J[*temperature_ * m + k] += factor_ * (warming(y, T) - warms) / h * weight;
  };
  for (std::size_t i = 0; i < n; ++i) {
    const double kept = c[i], h = std::max(1e-7 * std::abs(kept), 1e-6 * gone_);
    c[i] = kept + h;
    rates(T, P);
    for (std::size_t k = 0; k < R_; ++k)
      if (const double nu = kinetics.nu(static_cast<int>(i), static_cast<int>(k)); nu != 0) add_column(k, h, nu);
    c[i] = kept;
  }
  if (setup_.T_moves()) {
    const double h = 1e-6 * T;
    rates(T + h, P);
    if (temperature_) {
      for (std::size_t j = 0; j < R_; ++j) J[j * m + *temperature_] = factor_ * (r_[j] - r[j]) / h;
      J[*temperature_ * m + *temperature_] = factor_ * (warming(y, T + h) - warms) / h;
    } else {
      const double capacity = setup_.capacity_at(y.first(R_), T);
      for (std::size_t k = 0; k < R_; ++k) add_column(k, h, -setup_.dH(k, T) / capacity);
    }
  }
  if (medium_) {
    J[*temperature_ * m + *medium_] = factor_ * u_ / setup_.capacity_at(y.first(R_), T);
    J[*medium_ * m + *temperature_] = factor_ * medium_u_;
    J[*medium_ * m + *medium_] = -factor_ * medium_u_;
  }
  if (!pressure_) return;
  const double w = std::max(y[*pressure_], 0.01 * no_pressure);  // P = P_in sqrt(w)
  rates(T, P * std::sqrt(1 + 1e-6));
  add_column(*pressure_, 1e-6 * w, 1);
}

}  // namespace vatwright
