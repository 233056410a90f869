#include "vatwright/stream/species.hpp"

#include <cmath>
#include <limits>

namespace vatwright {

double HeatCapacity::at(double T_K) const {
  double cp = 0;
  for (auto c = a.rbegin(); c != a.rend(); ++c) cp = cp * T_K + *c;
  return cp;
}

double HeatCapacity::integral(double from_K, double to_K) const {
  // T2^(n+1) - T1^(n+1) = (T2 - T1) sum_m T2^m T1^(n-m): no cancellation where the two are close.
  double total = 0;
  double sum_of_products = 1;
  double power_of_from = 1;
  for (std::size_t n = 0; n < a.size(); ++n) {
    total += a[n] / static_cast<double>(n + 1) * sum_of_products;
    power_of_from *= from_K;
    sum_of_products = sum_of_products * to_K + power_of_from;
  }
  return total * (to_K - from_K);
}

double Antoine::pressure_Pa(double T_K) const {
  const double below = T_K - offset_K + C;
  if (!(below > 0)) return 0;  // the limit from above where B > 0
  const double pressure = unit_Pa * std::pow(10.0, A - B / below);
  return std::isfinite(pressure) ? pressure : std::numeric_limits<double>::max();
}

}  // namespace vatwright
