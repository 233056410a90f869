#include "vatwright/rating/rating.hpp"

#include <algorithm>

namespace vatwright {

namespace {
void tell_figures(Rating& rating, const VesselPlace& place, const VesselOutcome& o) {
  const Duty& duty = place.problem.duty;
  rating.conversion = o.conversion;
  rating.yields = yields_of(duty, o.outlet);
  rating.outlet = o.outlet;
  rating.outlet_mol_s = outlet_flows(duty, o.outlet);
  rating.hottest_K = o.hottest_K;
  rating.start_peak_K = o.start_peak_K;
  rating.profile = o.profile;
  if (!o.heat) return;
  rating.cooling_W = o.heat->cooling_W;
  const bool tube = !std::holds_alternative<StirredTank>(place.vessel.kind);
  if (tube && place.operation.thermal == Thermal::hold) rating.preheat_W = o.heat->preheat_W;
}

/// Species that some equation makes, without figures: the keys of `yields` are there in any case.
void name_yields(Rating& rating, const Duty& duty) {
  rating.yields = yields_of(duty, whole_feed(duty));
  for (auto& [name, value] : rating.yields) value.reset();
}

/// Trials of a window share the run, so what serves all rates is worked out once.
class Trials {
 public:
  Trials(const Problem& problem, const Vessel& vessel, const Operation& operation, VesselRun& run)
      : place_{.problem = problem, .vessel = vessel, .operation = operation}, run_(run) {}

  Trial operator()(double feed_m3_s) {
    place_.feed_m3_s = feed_m3_s;
    const auto outcome = run_.at(feed_m3_s, Detail::full);
    const Judged judged = judge(place_, outcome);
    std::vector<TargetItem> items;
    if (judged.figures) items = check_target(place_.problem.duty, std::get<VesselOutcome>(outcome).outlet);
    if (!judged.no_answer) any_answer_ = true;
    return trial_of({{{}, &judged}}, {}, items);
  }
  [[nodiscard]] bool any_answer() const { return any_answer_; }

 private:
  VesselPlace place_;
  VesselRun& run_;
  bool any_answer_ = false;
};

double fluid_volume_of(const Duty& duty, const Vessel& vessel, const Operation& operation) {
  return fluid_volume(vessel.kind, duty.chemistry.feed.phase == Phase::gas ? 1 : operation.fill);
}

void add_windows(Rating& rating, const VesselPlace& place, VesselRun& run) {
  Trials trials(place.problem, place.vessel, place.operation, run);
  const auto [lo, hi] = search_range(fluid_volume_of(place.problem.duty, place.vessel, place.operation));
  Windows windows = find_windows([&](double v) { return trials(v); }, lo, hi);
  tell_windows(rating, std::move(windows), trials.any_answer());
}

double start_K(const VesselPlace& place) {
  const Duty& duty = place.problem.duty;
  if (place.operation.thermal == Thermal::hold) return place.operation.hold_K;
  return duty.start.temperature_K.value_or(duty.chemistry.feed.temperature_K);
}

std::string start_words(const VesselPlace& place) {
  const Duty& duty = place.problem.duty;
  const char* fill = "feed";
  if (duty.start.filled_with == Start::Filled::product) fill = "product";
  if (duty.start.filled_with == Start::Filled::solvent) fill = "solvent";
  return "filled with " + std::string(fill) + " at " + show(start_K(place), Shown::temperature);
}

Stream arriving_first(const Duty& duty, const Operation& operation) {
  Stream arrives = whole_feed(duty);
  arrives.pressure_Pa =
      operation.pressure_Pa.value_or(arrives.pressure_Pa);  // a first vessel is fed at its own pressure
  return arrives;
}
}  // namespace

void tell_windows(Rating& rating, Windows windows, bool any_answer) {
  if (windows.unsolved) {
    rating.unsolved = true;
    rating.stands_in_the_way.push_back("window not wholly known, " + windows.why);
  }
  if (!any_answer && !windows.why.empty()) return;
  if (auto fold = caution_window_at_fold(windows)) rating.cautions.push_back(*fold);
  rating.windows = std::move(windows);
}

void tell_vessel(Rating& rating, const VesselPlace& place, const Judged& judged, const VesselOutcome* outcome) {
  rating.tag = place.vessel.tag;
  rating.kind = std::string(kind_of(place.vessel));
  rating.limits = judged.limits;
  if (judged.medium) rating.medium = judged.medium->name;
  name_yields(rating, place.problem.duty);
  if (!outcome || judged.no_answer) return;
  const bool is_tank = std::holds_alternative<StirredTank>(place.vessel.kind);
  if (is_tank || !outcome->states.empty()) {
    rating.steady_states = outcome->states;
    rating.states_complete = outcome->states_complete;
  }
  if (is_tank) {
    rating.started = start_words(place);
    const double ends_K = std::max(outcome->hottest_K, start_K(place));
    rating.peaks = outcome->start_peak_K && *outcome->start_peak_K > ends_K + 1;
  }
  rating.heat_curve = outcome->heat_curve;
  if (!judged.figures) return;
  rating.residual = outcome->residual;
  tell_figures(rating, place, *outcome);
}

Rating rate(const Problem& problem, const Vessel& vessel, const RateOptions& options) {
  const Duty& duty = problem.duty;
  const Operation operation = operation_of(problem, vessel);
  VesselRun run(vessel, duty.chemistry, operation, duty.start, arriving_first(duty, operation));
  const VesselPlace place{problem, vessel, operation, duty.target.feed_m3_s};
  const auto outcome = run.at(place.feed_m3_s, options.detail);
  const Judged judged = judge(place, outcome);
  const VesselOutcome* answered = answer(outcome);

  Rating rating;
  tell_vessel(rating, place, judged, answered);
  if (judged.figures) rating.targets = check_target(duty, answered->outlet);
  const Finding finding = find_verdict({{{}, &judged}}, {}, rating.targets);
  rating.verdict = finding.verdict;
  rating.stands_in_the_way = finding.stands_in_the_way;
  rating.unsolved = finding.unsolved;
  if (judged.figures) {
    rating.cautions = cautions_of(place, *answered, judged.limits);
    const auto conversion_at = [&](double v) -> std::optional<double> {
      const auto there = run.at(v, Detail::map);
      const auto* o = answer(there);
      return o && !o->cycle ? std::optional(o->conversion) : std::nullopt;
    };
    if (auto fold = caution_near_fold(conversion_at, place.feed_m3_s)) rating.cautions.push_back(*fold);
  }
  if (options.windows) add_windows(rating, place, run);
  return rating;
}

}  // namespace vatwright
