#pragma once
#include <optional>
#include <vector>

#include "vatwright/vessel/run.hpp"

namespace vatwright {

/// What passes between the contents of a jacketed vessel and its medium.
struct JacketSide {
  double UA_W_K = 0;  ///< of the whole vessel; 0: nothing passes
  double supply_K = 0;
  double capacity_W_K = 0;  ///< of the medium's flow; infinite where it condenses or nothing limits it
  Passage passage = Passage::uniform;
  /// Heat per K of a mixed jacket, whose medium is at the temperature at which it leaves: 1/(1/(U A) + 1/(m cp)).
  [[nodiscard]] double mixed_W_K() const;
};

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
  JacketSide jacket;
  /// Where heat capacity and heats of reaction are the same at any temperature: J/K per m3 of mixed feed, J/mol.
  struct ConstantHeat {
    double capacity_J_m3_K = 0;
    std::vector<double> dH_J_mol;
  };
  std::optional<ConstantHeat> constant_heat;

  [[nodiscard]] bool heat_known() const { return heat.state == HeatKnowledge::State::known; }
  [[nodiscard]] bool is_jacketed() const { return jacket.UA_W_K > 0; }
  /// The temperature is a result.
  [[nodiscard]] bool T_moves() const { return !is_held && (heat_known() || is_jacketed()); }
  /// Heat capacity of what 1 m3 of mixed feed has become at xi and T, J/K.
  [[nodiscard]] double capacity_at(std::span<const double> xi, double T_K) const {
    return constant_heat ? constant_heat->capacity_J_m3_K : heat_capacity(chemistry, xi, T_K);
  }
  /// Heat that what arrives takes up from its temperature to T, J per m3 of mixed feed.
  [[nodiscard]] double warming_of_inlet(double T_K) const {
    return constant_heat ? constant_heat->capacity_J_m3_K * (T_K - arrives.temperature_K)
                         : sensible_heat(chemistry, arrives.xi_mol_m3, arrives.temperature_K, T_K);
  }
  /// What a tank exchanges with agitator and jacket.
  [[nodiscard]] Exchange exchange(double feed_m3_s) const {
    return {agitator_W / feed_m3_s, jacket.mixed_W_K() / feed_m3_s, jacket.supply_K};
  }
  /// Heat of reaction j, J/mol; 0 where none has one.
  [[nodiscard]] double dH(std::size_t j, double T_K) const {
    if (constant_heat) return constant_heat->dH_J_mol[j];
    const auto& heat_of = chemistry.kinetics.reaction(static_cast<int>(j)).heat;
    return heat_of ? heat_of->at(T_K) : 0;
  }
};

/// cannot_tell where the vessel can not serve the rate laws as they are told (`per`), heat is missing where T moves, or
/// the mode is not modelled.
Outcome<Setup> make_setup(const Vessel& vessel, const Chemistry& chemistry, const Operation& operation,
                          const Start& start, const Stream& arrives);

NoAnswer cannot_tell(std::string why);
NoAnswer unsolved(std::string why);

}  // namespace vatwright
