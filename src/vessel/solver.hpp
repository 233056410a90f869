#pragma once
#include <memory>

#include "setup.hpp"

namespace vatwright {

/// One way to solve one vessel with one inlet; which one serves is decided in run.cpp.
class Solver {
 public:
  virtual ~Solver() = default;
  virtual Outcome<VesselOutcome> at(double feed_m3_s, Detail detail) = 0;
  virtual std::optional<double> feed_at_conversion(double X) = 0;
  [[nodiscard]] virtual long rate_calls() const = 0;
};

std::unique_ptr<Solver> make_one_reaction_tube(const Setup& setup);
std::unique_ptr<Solver> make_one_reaction_tank(const Setup& setup);
std::unique_ptr<Solver> make_marched_tube(const Setup& setup);
std::unique_ptr<Solver> make_tank_of_reactions(const Setup& setup);

}  // namespace vatwright
