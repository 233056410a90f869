#include <algorithm>
#include <cmath>

#include "counter_current.hpp"
#include "runaway.hpp"
#include "solver.hpp"
#include "tube_march.hpp"
#include "tube_outcome.hpp"
#include "vatwright/vessel/pressure_drop.hpp"

namespace vatwright {
namespace {

using Coordinate = TubeBalance::Coordinate;

/// A tube with several reactions, on its jacket, or with a gas that loses pressure. Where nothing but V/v matters one
/// march, made in standing stages, serves all feed rates; else each rate is marched by itself.
class MarchedTube final : public Solver {
 public:
  explicit MarchedTube(const Setup& setup) : setup_(setup), tell_rate_(setup.chemistry.kinetics), runaway_(setup) {
    if (TubeBalance::serves_all_rates(setup))
      shared_.emplace(TubeBalance(setup, Coordinate::space_time, 1), setup.jacket.supply_K);
  }

  Outcome<VesselOutcome> at(double feed_m3_s, Detail detail) override {
    const double length = length_of(setup_.vessel.kind);
    const double loss =
        TubeBalance::pressure_acts(setup_)
            ? 0
            : loss_per_length(setup_, feed_m3_s, setup_.arrives.xi_mol_m3, setup_.inlet_K, setup_.inlet_Pa).value_or(0);
    if (setup_.inlet_Pa - loss * length <= 0) return pressure_used_up(setup_.inlet_Pa / (loss * length), length);
    if (shared_) {
      const double end = setup_.volume_m3 / feed_m3_s;
      go_in_stages(*shared_, end);
      return tell_march(*shared_, end, loss, feed_m3_s, detail);
    }
    if (is_counter_current()) return at_counter_current(loss, feed_m3_s, detail);
    TubeMarch march(TubeBalance(setup_, Coordinate::length, feed_m3_s), setup_.jacket.supply_K);
    march.go_to(1);
    calls_before_ += march.balance().calls();
    return tell_march(march, 1, loss, feed_m3_s, detail);
  }

  std::optional<double> feed_at_conversion(double) override { return std::nullopt; }
  [[nodiscard]] long rate_calls() const override {
    return calls_before_ + tell_rate_.calls() + (shared_ ? shared_->balance().calls() : 0);
  }

 private:
  bool is_counter_current() const {
    return setup_.is_jacketed() && setup_.jacket.passage == Passage::counter_current &&
           std::isfinite(setup_.jacket.capacity_W_K);
  }

  Outcome<VesselOutcome> at_counter_current(double loss, double feed_m3_s, Detail detail) {
    auto found = find_counter_current(setup_, feed_m3_s);
    if (const auto* no = std::get_if<NoAnswer>(&found)) return *no;
    auto& all = std::get<CounterCurrent>(found);
    calls_before_ += all.calls;
    auto outcome = tell_march(all.solutions.front().march, 1, loss, feed_m3_s, detail);
    auto* told = std::get_if<VesselOutcome>(&outcome);
    if (told == nullptr) return outcome;
    told->residual = std::max(told->residual, all.solutions.front().mismatch);
    if (all.solutions.size() == 1) return outcome;
    for (const auto& solution : all.solutions) {
      const auto& y = solution.march.state();
      const TubeBalance& balance = solution.march.balance();
      std::vector<double> xi(y.begin(), y.begin() + static_cast<std::ptrdiff_t>(balance.extents()));
      const double X = setup_.chemistry.kinetics.conversion(xi);
      told->states.push_back({std::move(xi), X, balance.temperature(y), {}, {}});
    }
    return outcome;
  }

  Outcome<VesselOutcome> tell_march(TubeMarch& march, double end, double loss, double feed_m3_s, Detail detail) {
    const double length = length_of(setup_.vessel.kind);
    if (march.used_up()) return pressure_used_up(march.reached(), length);
    if (march.failed() && march.reached() < end) return *march.failed();
    if (march.balance().no_value() > 0)
      return cannot_tell("a rate has no finite value where a species that slows it is absent");
    std::vector<double> y(march.balance().size());
    const auto stream_at = [&](double z) {
      march.read(z * end, y);
      const TubeBalance& balance = march.balance();
      const double P = balance.with_pressure() ? balance.pressure(y) : setup_.inlet_Pa - loss * length * z;
      return Stream{feed_m3_s,
                    {y.begin(), y.begin() + static_cast<std::ptrdiff_t>(balance.extents())},
                    balance.temperature(y),
                    P};
    };
    const auto medium_at = [&](double z) {
      march.read(z * end, y);
      return march.balance().medium(y);
    };
    VesselOutcome outcome = tell({setup_, feed_m3_s, stream_at, medium_at, places(march, end), tell_rate_}, detail);
    if (detail == Detail::map) return outcome;
    outcome.residual = march.residual(end);
    if (setup_.is_jacketed() && setup_.heat_known()) tell_runaway(stream_at, medium_at, outcome);
    return outcome;
  }

  /// Where there is a hot spot inside: how much of its U it stands on.
  void tell_runaway(FunctionRef<Stream(double)> stream_at, FunctionRef<double(double)> medium_at,
                    VesselOutcome& outcome) {
    const Stream inlet = stream_at(0);
    if (!(outcome.hottest_K > std::max(inlet.temperature_K, outcome.outlet.temperature_K))) return;
    outcome.runaway_share = runaway_.share(medium_at(outcome.hottest_at));
  }

  /// Stages double from a hundredth of the time in which the inlet's rates would change everything, whatever was asked
  /// before: the same answer in any order of asking.
  void go_in_stages(TubeMarch& march, double end) {
    if (!(first_stage_s_ > 0)) first_stage_s_ = 0.01 * march.time_scale();
    double stage = first_stage_s_;
    while (stage < end) stage *= 2;
    for (double s = first_stage_s_; s <= stage; s *= 2)
      if (s > march.reached()) march.go_to(s);
  }

  /// A few of the marcher's own places: it steps finely where things happen.
  static std::vector<double> places(const TubeMarch& march, double end) {
    std::vector<double> all;
    const auto nodes = march.nodes();
    const std::size_t stride = std::max<std::size_t>(1, nodes.size() / 40);
    for (std::size_t k = 0; k < nodes.size(); k += stride)
      if (nodes[k] > 0 && nodes[k] < end) all.push_back(nodes[k] / end);
    return all;
  }

  const Setup& setup_;
  RateEvaluator tell_rate_;
  std::optional<TubeMarch> shared_;
  double first_stage_s_ = 0;
  Runaway runaway_;
  long calls_before_ = 0;
};

}  // namespace

std::unique_ptr<Solver> make_marched_tube(const Setup& setup) { return std::make_unique<MarchedTube>(setup); }

}  // namespace vatwright
