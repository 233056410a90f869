#include <algorithm>
#include <cmath>

#include "solver.hpp"
#include "start_up.hpp"
#include "tank_newton.hpp"
#include "tank_outcome.hpp"

namespace vatwright {
namespace {

using Extents = std::vector<double>;

/// A tank with several reactions: every state found from a stated set of starts (the inlet, the start's fill, full extents of
/// each reaction and of all in turn, the branches that come from very short and from very long space times), and
/// where the start-up itself comes to rest. Which other states there are is not certain.
class TankOfReactions final : public Solver {
 public:
  explicit TankOfReactions(const Setup& setup) : setup_(setup), start_(start_state(setup)) {}

  Outcome<VesselOutcome> at(double feed_m3_s, Detail detail) override {
    TankBalance balance(setup_, feed_m3_s);
    std::vector<Extents> found = find_states(balance);
    auto outcome = judge(balance, found, feed_m3_s, detail);
    calls_ += balance.calls();
    if (balance.no_value() > 0) return cannot_tell("a rate has no finite value where a species that slows it is absent");
    return outcome;
  }
  std::optional<double> feed_at_conversion(double) override { return std::nullopt; }
  [[nodiscard]] long rate_calls() const override { return calls_; }

 private:
  static void add(std::vector<Extents>& found, const std::optional<Extents>& one, double scale) {
    if (!one) return;
    for (const Extents& other : found) {
      double apart = 0;
      for (std::size_t j = 0; j < other.size(); ++j) apart = std::max(apart, std::abs(other[j] - (*one)[j]));
      if (apart <= 1e-7 * scale) return;
    }
    found.push_back(*one);
  }

  /// From an extent, one reaction run to a share of what its reactants allow.
  Extents run_on(const TankBalance& balance, Extents xi, std::size_t j, double share) const {
    std::vector<double> c(static_cast<std::size_t>(setup_.chemistry.kinetics.species()));
    balance.amounts(xi, c);
    double most = std::numeric_limits<double>::infinity();
    for (std::size_t i = 0; i < c.size(); ++i)
      if (const double nu = setup_.chemistry.kinetics.nu(static_cast<int>(i), static_cast<int>(j)); nu < 0)
        most = std::min(most, std::max(0.0, c[i]) / -nu);
    if (std::isfinite(most)) xi[j] += share * most;
    return xi;
  }

  std::vector<Extents> starts(const TankBalance& balance) const {
    const Extents inlet = setup_.arrives.xi_mol_m3;
    std::vector<Extents> all{inlet};
    if (start_.on_extents) all.push_back(start_.xi_all);
    const std::size_t R = balance.size();
    for (double share : {0.5, 0.97}) {
      Extents forward = inlet, backward = inlet;
      for (std::size_t j = 0; j < R; ++j) {
        all.push_back(run_on(balance, inlet, j, share));
        forward = run_on(balance, forward, j, share);
        backward = run_on(balance, backward, R - 1 - j, share);
      }
      all.push_back(std::move(forward));
      all.push_back(std::move(backward));
    }
    return all;
  }

  /// Follows the state that is at hand at tau times ratio^steps back to tau.
  static std::optional<Extents> follow(TankBalance& balance, Extents xi, double ratio, int steps) {
    const double tau = balance.tau();
    std::optional<Extents> at = std::move(xi);
    for (int k = steps; k >= 0 && at; --k) {
      balance.set_tau(tau * std::pow(ratio, k));
      at = settle(balance, *at);
    }
    balance.set_tau(tau);
    return at;
  }

  std::vector<Extents> find_states(TankBalance& balance) {
    std::vector<Extents> found;
    for (const Extents& xi : starts(balance)) add(found, settle(balance, xi), balance.scale());
    add(found, follow(balance, setup_.arrives.xi_mol_m3, 0.4, 10), balance.scale());
    if (!found.empty()) {
      const auto furthest = std::ranges::max(found, {}, [&](const Extents& xi) { return balance.temperature(xi); });
      add(found, follow(balance, furthest, 4, 3), balance.scale());
    }
    return found;
  }

  /// The state that a start-up has come to; -1: none of them.
  int nearest(const TankBalance& balance, const std::vector<Extents>& found, const StartRun& run) const {
    int best = -1;
    double least = 1e-3;
    std::vector<double> C(run.C.size());
    for (std::size_t s = 0; s < found.size(); ++s) {
      const double T = balance.temperature(found[s]);
      setup_.chemistry.concentrations(found[s], T, setup_.inlet_Pa, C);
      double apart = std::abs(T - run.temperature_K) / T, total = 0;
      for (double c : C) total = std::max(total, c);
      for (std::size_t i = 0; i < C.size(); ++i) apart = std::max(apart, std::abs(C[i] - run.C[i]) / total);
      if (apart < least) {
        least = apart;
        best = static_cast<int>(s);
      }
    }
    return best;
  }

  /// Follows the start-up until it rests at a state (which may be one not found before).
  Outcome<StartRun> come_to_rest(TankBalance& balance, std::vector<Extents>& found, double feed_m3_s, int& reached) {
    StartState from = start_;
    double peak = from.temperature_K;
    for (double stretch : {30.0, 70.0, 200.0}) {
      auto run = run_start_up(setup_, from, feed_m3_s, stretch);
      if (std::holds_alternative<NoAnswer>(run)) return run;
      StartRun& end = std::get<StartRun>(run);
      peak = end.peak_K = std::max(peak, end.peak_K);
      if (end.drift < 1e-5) {
        if (!end.xi.empty()) add(found, settle(balance, end.xi), balance.scale());
        reached = nearest(balance, found, end);
        if (reached >= 0) return run;
      }
      from.C = end.C;
      from.temperature_K = end.temperature_K;
    }
    StartRun never;
    never.peak_K = peak;
    return never;
  }

  Outcome<VesselOutcome> judge(TankBalance& balance, std::vector<Extents>& found, double feed_m3_s, Detail detail) {
    VesselOutcome outcome;
    outcome.states_complete = false;
    outcome.start_peak_K = setup_.inlet_K;
    int reached = -1;
    const bool alone = found.size() == 1 && is_stable(balance, found[0]);
    if (alone && (setup_.is_held || detail == Detail::map)) {
      reached = 0;
      if (!setup_.is_held) outcome.start_peak_K.reset();
    } else {
      const auto run = come_to_rest(balance, found, feed_m3_s, reached);
      if (const auto* no = std::get_if<NoAnswer>(&run)) return *no;
      outcome.start_peak_K = std::get<StartRun>(run).peak_K;
    }
    if (found.empty()) return unsolved("no steady state found from any of the starts");
    for (std::size_t s = 0; s < found.size(); ++s)
      outcome.states.push_back({found[s], setup_.chemistry.kinetics.conversion(found[s]),
                                balance.temperature(found[s]), is_stable(balance, found[s]),
                                static_cast<int>(s) == reached});
    if (reached < 0) {
      outcome.cycle = true;
      outcome.isothermal = setup_.is_held;
    } else {
      outcome.residual = balance.imbalance(found[static_cast<std::size_t>(reached)]);
      tell_of_tank(setup_, feed_m3_s, outcome, detail);
      if (outcome.start_peak_K) outcome.start_peak_K = std::max(*outcome.start_peak_K, outcome.hottest_K);
    }
    std::ranges::stable_sort(outcome.states, {}, &SteadyState::conversion);
    return outcome;
  }

  const Setup& setup_;
  StartState start_;
  long calls_ = 0;
};

}  // namespace

std::unique_ptr<Solver> make_tank_of_reactions(const Setup& setup) { return std::make_unique<TankOfReactions>(setup); }

}  // namespace vatwright
