#include "vatwright/kinetics/reaction.hpp"

#include <cmath>

#include "vatwright/kinetics/kinetics.hpp"

namespace vatwright {
namespace {

/// integral of T^n from a to b, without cancellation where the two are close.
double integral_of_power(std::size_t n, double a, double b) {
  double sum = 1, power_of_a = 1;  // (b^(n+1) - a^(n+1))/(b - a) = sum_m b^m a^(n-m)
  for (std::size_t m = 0; m < n; ++m) {
    power_of_a *= a;
    sum = sum * b + power_of_a;
  }
  return sum * (b - a) / static_cast<double>(n + 1);
}

/// ln K(T) - ln K(T0) = integral from T0 to T of dH(T)/(R T^2) dT, dH(T) = H0 + sum_n dCp_n T^(n+1)/(n+1), where H0 is
/// what dH would be at 0 K.
double van_t_hoff(const HeatOfReaction& heat, double from_K, double to_K) {
  double H0 = heat.dH_J_mol;
  for (std::size_t n = 0; n < heat.dCp.size(); ++n) H0 -= heat.dCp[n] * integral_of_power(n, 0, heat.at_K);
  double integral = H0 * (to_K - from_K) / (to_K * from_K);  // H0/T^2
  for (std::size_t n = 0; n < heat.dCp.size(); ++n) {
    const double factor = heat.dCp[n] / static_cast<double>(n + 1);  // dCp_n/(n+1) T^(n-1)
    integral += factor * (n == 0 ? std::log(to_K / from_K) : integral_of_power(n - 1, from_K, to_K));
  }
  return integral / gas_constant;
}

}  // namespace

double RateConstant::at(double T_K) const {
  if (moves == Moves::not_at_all || !at_K) return k;
  if (moves == Moves::theta) return k * std::pow(theta, T_K - *at_K);
  if (!(T_K > 0)) return activation_J_mol > 0 ? 0 : k;
  // 1/T - 1/T0 = (T0 - T)/(T T0): exact where T is near T0
  return k * std::exp(-activation_J_mol / gas_constant * (*at_K - T_K) / (T_K * *at_K));
}

double HeatOfReaction::at(double T_K) const {
  double dH = dH_J_mol;
  for (std::size_t n = 0; n < dCp.size(); ++n) dH += dCp[n] * integral_of_power(n, at_K, T_K);
  return dH;
}

double Equilibrium::at(double T_K) const {
  if (!heat || !at_K || !(T_K > 0)) return K;
  return K * std::exp(van_t_hoff(*heat, *at_K, T_K));
}

}  // namespace vatwright
