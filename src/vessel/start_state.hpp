#pragma once
#include <vector>

#include "setup.hpp"

namespace vatwright {

/// What a tank is filled with before its feed is opened, per m3 of its working fluid.
struct StartState {
  std::vector<double> C;  ///< mol per m3 of fluid
  double temperature_K = 0;
  bool on_extents = true;      ///< the fill is the feed at some extents (not solvent)
  double xi = 0;               ///< of the one reaction, where there is one
  std::vector<double> xi_all;  ///< extents of the fill, where on_extents
};
StartState start_state(const Setup& setup);

}  // namespace vatwright
