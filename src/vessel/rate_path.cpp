#include "rate_path.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

namespace vatwright {
namespace {

constexpr double rounding = 1e-14;

bool rate_falls(const Kinetics& kinetics, const Setup& setup) {
  const Reaction& reaction = kinetics.reaction(0);
  const auto* law = std::get_if<RateLaw>(&reaction.forward);
  if (law == nullptr || setup.is_gas || !setup.is_held || reaction.equilibrium || reaction.reverse) return false;
  if (!law->adsorption.empty()) return false;
  const auto* power = std::get_if<PowerLaw>(&law->law);
  if (power == nullptr) {
    const auto& half = std::get<Saturating>(law->law).half;
    return std::ranges::all_of(half, [&](const SpeciesFigure& h) { return kinetics.nu(h.species, 0) <= 0; });
  }
  return std::ranges::all_of(power->orders,
                             [&](const SpeciesFigure& n) { return n.value * kinetics.nu(n.species, 0) <= 0; });
}

}  // namespace

RatePath::RatePath(const Setup& setup, const Exchange& exchange)
    : setup_(setup), evaluator_(setup.chemistry.kinetics), exchange_(exchange) {
  const Chemistry& chemistry = setup.chemistry;
  const Kinetics& kinetics = chemistry.kinetics;
  const auto n = static_cast<std::size_t>(kinetics.species());
  nu_.resize(n);
  C_.resize(n);
  inlet_ = {setup.arrives.xi_mol_m3[0], std::vector<double>(n)};
  kinetics.amounts(chemistry.feed.c_mol_m3, setup.arrives.xi_mol_m3, inlet_.c);
  for (std::size_t i = 0; i < n; ++i) {
    nu_[i] = kinetics.nu(static_cast<int>(i), 0);
    const double scale = chemistry.feed.c_mol_m3[i] + std::abs(nu_[i] * inlet_.xi);
    if (std::abs(inlet_.c[i]) <= rounding * scale) inlet_.c[i] = 0;  // gone before it came here
  }
  reversible_ = kinetics.reaction(0).equilibrium || kinetics.reaction(0).reverse;
  falls_ = rate_falls(kinetics, setup);
  if (const auto range = table_range(kinetics)) {
    table_ = true;
    table_X_ = *range;
  }
  X_per_xi_ = kinetics.c_of_feed() > 0 ? -kinetics.nu(kinetics.of(), 0) / kinetics.c_of_feed() : 0;
  T_at_inlet_ = setup.inlet_K;
  if (!setup.T_moves()) return;
  linear_ = heat_is_constant(chemistry);
  if (!linear_) return;
  const double capacity = heat_capacity(chemistry, setup.arrives.xi_mol_m3, setup.inlet_K) + exchange.per_K_J_m3_K;
  T_at_inlet_ += (exchange.added_J_m3 - exchange.per_K_J_m3_K * (setup.inlet_K - exchange.medium_K)) / capacity;
  dT_dxi_ = -setup.dH(0, setup.inlet_K) / capacity;
}

double RatePath::temperature(double xi) const {
  if (linear_) return T_at_inlet_ + dT_dxi_ * (xi - inlet_.xi);
  return mixed_temperature(setup_.chemistry, {&inlet_.xi, 1}, setup_.inlet_K, {&xi, 1}, exchange_);
}

double RatePath::rate(const Anchor& from, double offset) {
  for (std::size_t i = 0; i < C_.size(); ++i) C_[i] = from.c[i] + nu_[i] * offset;
  const double xi = from.xi + offset;
  const double T = temperature(xi);
  if (setup_.is_gas) setup_.chemistry.concentrations_of_amounts(C_, T, setup_.inlet_Pa, C_);
  double X = X_per_xi_ * xi;
  if (table_) X = std::clamp(X, table_X_.first, table_X_.second);  // ways end there, only rounding is taken off
  double r = 0;
  evaluator_(C_, T, X, {&r, 1});
  return setup_.capacity[0] * r;
}

Anchor RatePath::at(const Anchor& from, double offset) const {
  Anchor there{from.xi + offset, from.c};
  for (std::size_t i = 0; i < nu_.size(); ++i) there.c[i] += nu_[i] * offset;
  return there;
}

RatePath::Reach RatePath::reach(double sign) const {
  Reach reach{std::numeric_limits<double>::infinity(), EndKind::depleted, "", {}};
  for (std::size_t i = 0; i < nu_.size(); ++i)
    if (sign * nu_[i] < 0) reach.distance = std::min(reach.distance, std::max(0.0, inlet_.c[i]) / std::abs(nu_[i]));
  if (!std::isfinite(reach.distance)) {  // nothing on that side: there is no way
    reach.distance = 0;
    reach.end = inlet_;
    return reach;
  }
  if (table_) confine_to_table(reach, sign);
  if (!setup_.is_held) confine_to_temperature(reach, sign);
  reach.end = at(inlet_, sign * reach.distance);
  for (std::size_t i = 0; i < nu_.size(); ++i)
    if (sign * nu_[i] < 0 && reach.end.c[i] <= rounding * inlet_.c[i]) reach.end.c[i] = 0;
  return reach;
}

void RatePath::confine_to_table(Reach& reach, double sign) const {
  const double X_end = sign * X_per_xi_ > 0 ? table_X_.second : table_X_.first;
  const double distance = std::max(0.0, sign * (X_end / X_per_xi_ - inlet_.xi));
  if (distance >= reach.distance * (1 - rounding)) return;
  reach.distance = distance;
  reach.kind = EndKind::confined;
  reach.why = "the measured table of rates ends before the conversion that is reached here";
}

void RatePath::confine_to_temperature(Reach& reach, double sign) const {
  const auto has_temperature = [&](double distance) { return temperature(inlet_.xi + sign * distance) >= 1; };
  if (has_temperature(reach.distance)) return;
  double good = 0, bad = reach.distance;
  for (int i = 0; i < 60; ++i) {
    const double middle = (good + bad) / 2;
    (has_temperature(middle) ? good : bad) = middle;
  }
  reach.distance = good;
  reach.kind = EndKind::confined;
  reach.why = "the reaction would cool its fluid to 0 K before it is through: heat and heat capacity do not fit";
}

std::vector<double> RatePath::kinks(double sign) const {
  std::vector<double> all;
  const auto* table = std::get_if<RateTable>(&setup_.chemistry.kinetics.reaction(0).forward);
  if (table == nullptr || X_per_xi_ == 0) return all;
  for (double X : table->conversion)
    if (const double d = sign * (X / X_per_xi_ - inlet_.xi); d > 0) all.push_back(d);
  std::ranges::sort(all);
  return all;
}

}  // namespace vatwright
