#pragma once
#include <limits>
#include <optional>
#include <string>
#include <vector>

namespace vatwright {

/// A heating or cooling medium of the site.
struct Utility {
  std::string name;
  double supply_K = 0;
  std::optional<double> flow_m3_s;   ///< the most one vessel can draw
  std::optional<double> total_m3_s;  ///< the most all vessels of a hookup can draw together
  double density_kg_m3 = 997;        ///< left out: water
  double heat_capacity_J_kg_K = 4181;
  bool condensing = false;  ///< stays at its supply temperature whatever is drawn
};

enum class Passage { uniform, co_current, counter_current };

struct Jacket {
  std::vector<std::string> utilities;
  std::optional<double> area_m2;  ///< of a tank, wetted at the most working fill
  double U_W_m2_K = 0;            ///< clean
  double fouling_m2_K_W = 0;
  Passage passage = Passage::uniform;
  /// 1/(1/U + fouling); 0 for U = 0.
  [[nodiscard]] double U_fouled() const;
};

/// Heat per second and K of a medium's flow, W/K; infinity where it condenses or no flow limits it.
double capacity_rate(const Utility& utility, std::optional<double> flow_m3_s);

/// The most heat that a mixed jacket takes from a vessel at T (+) with the medium at its greatest flow:
///   Q = (T - supply)/(1/(U A) + 1/(m cp)),  W; negative where the medium is warmer (heating).
double most_heat_of_jacket(double T_K, const Utility& utility, double UA_W_K, std::optional<double> flow_m3_s);

/// The least flow that carries Q (same sign convention) out of a mixed jacket at T, m3/s; nullopt where no flow does, 0
/// for Q = 0 and for a condensing medium (its flow is not a volume of liquid).
std::optional<double> least_flow(double Q_W, double T_K, const Utility& utility, double UA_W_K);

}  // namespace vatwright
