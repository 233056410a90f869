#include "vatwright/vessel/run.hpp"

#include <sstream>

#include "heat_curve.hpp"
#include "solver.hpp"
#include "tube_balance.hpp"

namespace vatwright {
namespace {

/// Bounds on the relative imbalance of what is given out as an answer.
constexpr double most_residual_isothermal = 1e-9, most_residual = 1e-6;

std::unique_ptr<Solver> choose_solver(const Setup& setup) {
  const bool one = setup.chemistry.kinetics.reactions() == 1;
  if (setup.is_tank) return one ? make_one_reaction_tank(setup) : make_tank_of_reactions(setup);
  const bool on_one_way = one && !setup.is_jacketed() && !TubeBalance::pressure_acts(setup);
  return on_one_way ? make_one_reaction_tube(setup) : make_marched_tube(setup);
}

NoAnswer imbalance(double residual, double bound) {
  std::ostringstream why;
  why.precision(2);
  why << "the balances do not close: relative imbalance " << residual << ", at most " << bound << " is allowed";
  return unsolved(why.str());
}

}  // namespace

struct VesselRun::Model {
  Outcome<Setup> setup;
  std::unique_ptr<Solver> solver;
};

VesselRun::VesselRun(const Vessel& vessel, const Chemistry& chemistry, const Operation& operation, const Start& start,
                     const Stream& arrives)
    : model_(new Model{make_setup(vessel, chemistry, operation, start, arrives), nullptr}) {
  if (const Setup* setup = answer(model_->setup)) model_->solver = choose_solver(*setup);
}
VesselRun::~VesselRun() = default;
VesselRun::VesselRun(VesselRun&&) noexcept = default;
VesselRun& VesselRun::operator=(VesselRun&&) noexcept = default;

Outcome<VesselOutcome> VesselRun::at(double feed_m3_s, Detail detail) {
  if (!model_->solver) return std::get<NoAnswer>(model_->setup);
  if (!(feed_m3_s > 0)) return cannot_tell("a feed rate above zero is needed");
  auto outcome = model_->solver->at(feed_m3_s, detail);
  auto* told = std::get_if<VesselOutcome>(&outcome);
  const Setup& setup = std::get<Setup>(model_->setup);
  if (told != nullptr && detail == Detail::profile && setup.is_tank && setup.T_moves())
    told->heat_curve = heat_curve(setup, feed_m3_s, told->states);
  if (told == nullptr || told->cycle) return outcome;
  const double bound = told->isothermal ? most_residual_isothermal : most_residual;
  if (!(told->residual <= bound)) return imbalance(told->residual, bound);
  return outcome;
}

std::optional<double> VesselRun::feed_at_conversion(double X) {
  return model_->solver ? model_->solver->feed_at_conversion(X) : std::nullopt;
}

long VesselRun::rate_calls() const { return model_->solver ? model_->solver->rate_calls() : 0; }

}  // namespace vatwright
