#pragma once
// Heat of a held vessel against one medium: what heat removal, heating and the choice of a medium share.
#include "vatwright/limits/limit.hpp"

namespace vatwright {

/// Heat in one direction: W of a tank, W/m2 at the worst place of a tube.
struct OneWay {
  double need = 0;                    ///< at least 0
  double takes = 0;                   ///< what the medium takes at its greatest flow, at least 0
  std::optional<double> signed_need = {};  ///< smooth where the direction turns; absent: it can not be had (tubes)
};
struct HeatBalance {
  OneWay removal = {}, heating = {};
  std::string_view unit = {};  ///< "W" or "W/m2"
  double area_m2 = 0;
};
/// medium null, or no jacket: nothing is taken. Precondition: outcome.heat is known.
///   tank: need = +-cooling_W, takes = (T - supply)/(1/(U A) + 1/(m cp)) at the greatest flow
///   tube: need = the worst flux, takes = U (T - supply), medium at supply
HeatBalance balance_heat(const Vessel& vessel, const Operation& operation, const Utility* medium,
                         const VesselOutcome& outcome);

/// Whether the heat limits are asked: held, and some reaction has a heat.
bool heat_is_asked(const LimitInput& input);
/// One of the two limits, as its balance says.
std::optional<Limit> check_heat(const LimitInput& input, std::string_view name);

}  // namespace vatwright
