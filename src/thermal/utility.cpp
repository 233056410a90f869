#include "vatwright/thermal/utility.hpp"

#include <cmath>

namespace vatwright {

double Jacket::U_fouled() const { return U_W_m2_K > 0 ? 1 / (1 / U_W_m2_K + fouling_m2_K_W) : 0; }

double capacity_rate(const Utility& utility, std::optional<double> flow_m3_s) {
  if (utility.condensing || !flow_m3_s) return std::numeric_limits<double>::infinity();
  return *flow_m3_s * utility.density_kg_m3 * utility.heat_capacity_J_kg_K;
}

double most_heat_of_jacket(double T_K, const Utility& utility, double UA_W_K, std::optional<double> flow_m3_s) {
  const double capacity = capacity_rate(utility, flow_m3_s);
  if (!(UA_W_K > 0) || !(capacity > 0)) return 0;
  return (T_K - utility.supply_K) / (1 / UA_W_K + 1 / capacity);  // 1/infinity = 0
}

std::optional<double> least_flow(double Q_W, double T_K, const Utility& utility, double UA_W_K) {
  if (Q_W == 0) return 0;
  const double driving = T_K - utility.supply_K;
  if (!(UA_W_K > 0) || driving * Q_W <= 0) return std::nullopt;
  // Q = dT/(1/UA + 1/(m cp)):  1/(m cp) = dT/Q - 1/UA
  const double resistance_left = driving / Q_W - 1 / UA_W_K;
  if (utility.condensing) return resistance_left >= 0 ? std::optional<double>(0) : std::nullopt;
  if (!(resistance_left > 0)) return std::nullopt;
  return 1 / (resistance_left * utility.density_kg_m3 * utility.heat_capacity_J_kg_K);
}

}  // namespace vatwright
