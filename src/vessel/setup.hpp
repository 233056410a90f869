#pragma once
#include <optional>
#include <vector>

#include "vatwright/vessel/run.hpp"

namespace vatwright {

/// What one vessel is given to work with, settled once: sizes, shares and the state at its inlet.
struct Setup {
  Setup(const Vessel& v, const Chemistry& c, const Operation& o, const Start& st, const Stream& in)
      : vessel(v), chemistry(c), operation(o), start(st), arrives(in) {}

  const Vessel& vessel;
  const Chemistry& chemistry;
  const Operation& operation;
  const Start& start;
  Stream arrives;  ///< as it arrives
  bool is_tank = false, is_gas = false, is_held = true;
  double inlet_K = 0;   ///< held: the hold temperature
  double inlet_Pa = 0;  ///< after a let-down
  std::optional<double> let_down_above_Pa;
  double volume_m3 = 0;          ///< that the coordinate counts: working fluid, inside of tubes, bed
  std::vector<double> capacity;  ///< per reaction, fluid volume, bed volume or catalyst mass per m3 of `volume_m3`
  double agitator_W = 0;
  HeatKnowledge heat;

  [[nodiscard]] bool heat_known() const { return heat.state == HeatKnowledge::State::known; }
};

/// cannot_tell where the vessel can not serve the rate laws as they are told (`per`), heat is missing where T moves, or
/// the mode is not modelled.
Outcome<Setup> make_setup(const Vessel& vessel, const Chemistry& chemistry, const Operation& operation,
                          const Start& start, const Stream& arrives);

NoAnswer cannot_tell(std::string why);
NoAnswer unsolved(std::string why);

}  // namespace vatwright
