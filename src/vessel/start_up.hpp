#pragma once
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

/// Where the tank is after a time, told in space times, and how hot it got on the way.
struct StartRun {
  std::vector<double> xi;  ///< extents that fit the contents best, per m3 of mixed feed
  std::vector<double> C;
  double temperature_K = 0, peak_K = 0;
  double drift = 0;  ///< how fast it still moves: largest relative change per space time
};
Outcome<StartRun> run_start_up(const Setup& setup, const StartState& start, double feed_m3_s, double space_times);

}  // namespace vatwright
