#include <algorithm>
#include <cmath>

#include "solver.hpp"
#include "start_up.hpp"
#include "tank_newton.hpp"
#include "tank_outcome.hpp"
#include "vatwright/thermal/adiabatic.hpp"

namespace vatwright {
namespace {

using Extents = std::vector<double>;
using Contents = std::vector<double>;  // amounts and temperature, see TankBalance

/// A tank with several reactions: every state found from a stated set of starts (the inlet, the start's fill, full
/// extents of each reaction and of all in turn, the branches that come from very short and from very long space times,
/// the heat balance scanned over temperature where that moves),
/// and where the start-up itself comes to rest. Which other states there are is not certain.
class TankOfReactions final : public Solver {
 public:
  explicit TankOfReactions(const Setup& setup)
      : setup_(setup), start_(start_state(setup)), tell_rate_(setup.chemistry.kinetics) {}

  Outcome<VesselOutcome> at(double feed_m3_s, Detail detail) override {
    TankBalance balance(setup_, feed_m3_s);
    std::vector<Contents> found = find_states(balance);
    auto outcome = judge(balance, found, feed_m3_s, detail);
    calls_ += balance.calls();
    if (balance.no_value() > 0)
      return cannot_tell("a rate has no finite value where a species that slows it is absent");
    return outcome;
  }
  std::optional<double> feed_at_conversion(double) override { return std::nullopt; }
  [[nodiscard]] long rate_calls() const override { return calls_; }

 private:
  static void add(const TankBalance& balance, std::vector<Contents>& found, const std::optional<Contents>& one) {
    if (!one) return;
    for (const Contents& other : found) {
      double apart = 0;
      for (std::size_t i = 0; i < other.size(); ++i)
        apart = std::max(apart, std::abs(other[i] - (*one)[i]) / balance.scale(i));
      if (apart <= 1e-7) return;
    }
    found.push_back(*one);
  }

  /// From an extent, one reaction run to a share of what its reactants allow.
  Extents run_on(Extents xi, std::size_t j, double share) const {
    std::vector<double> c(static_cast<std::size_t>(setup_.chemistry.kinetics.species()));
    setup_.chemistry.kinetics.amounts(setup_.chemistry.feed.c_mol_m3, xi, c);
    xi[j] += share * setup_.chemistry.kinetics.left_to_run(static_cast<int>(j), c);
    return xi;
  }

  std::vector<Extents> starts() const {
    const Extents inlet = setup_.arrives.xi_mol_m3;
    std::vector<Extents> all{inlet};
    if (start_.on_extents) all.push_back(start_.xi_all);
    const std::size_t R = setup_.capacity.size();
    for (double share : {0.5, 0.97}) {
      Extents forward = inlet, backward = inlet;
      for (std::size_t j = 0; j < R; ++j) {
        all.push_back(run_on(inlet, j, share));
        forward = run_on(forward, j, share);
        backward = run_on(backward, R - 1 - j, share);
      }
      all.push_back(std::move(forward));
      all.push_back(std::move(backward));
    }
    return all;
  }

  /// Follows the state that is at hand at tau times ratio^steps back to tau.
  static std::optional<Contents> follow(TankBalance& balance, Contents y, double ratio, int steps) {
    const double tau = balance.tau();
    std::optional<Contents> at = std::move(y);
    for (int k = steps; k >= 0 && at; --k) {
      balance.set_tau(tau * std::pow(ratio, k));
      at = settle(balance, *at);
    }
    balance.set_tau(tau);
    return at;
  }

  /// The composition balances closed at one temperature after another, from cold to hot; where the heat balance changes
  /// sign between two, a state lies there.
  void scan_temperatures(TankBalance& balance, std::vector<Contents>& found) {
    Setup held = setup_;
    held.is_held = true;
    const Exchange exchange = setup_.exchange(setup_.volume_m3 / balance.tau());
    const auto& xi_in = setup_.arrives.xi_mol_m3;
    double low = setup_.inlet_K, high = low;
    if (setup_.is_jacketed()) low = std::min(low, exchange.medium_K), high = std::max(high, exchange.medium_K);
    low = std::max(1.0, adiabatic_range(setup_.chemistry, xi_in, low).coldest_K - 1);
    high = adiabatic_range(setup_.chemistry, xi_in, high).warmest_K + 1;
    held.inlet_K = low;
    TankBalance at(held, setup_.volume_m3 / balance.tau());
    Contents c = at.contents(xi_in), F(balance.size()), before;
    double excess_before = 0;
    for (int k = 0; k <= scanned; ++k) {
      held.inlet_K = low + (high - low) * k / scanned;
      const auto closed = settle(at, c);
      if (!closed) continue;
      c = *closed;
      Contents y = c;
      y.push_back(held.inlet_K);
      if (!balance(y, F)) continue;
      if (!before.empty() && excess_before * F.back() <= 0) {
        const double share = excess_before / (excess_before - F.back());
        Contents between = y;
        for (std::size_t i = 0; i < y.size(); ++i) between[i] = before[i] + share * (y[i] - before[i]);
        add(balance, found, settle(balance, between));
        add(balance, found, settle(balance, before));
        add(balance, found, settle(balance, y));
      }
      before = y;
      excess_before = F.back();
    }
    calls_ += at.calls();
  }

  std::vector<Contents> find_states(TankBalance& balance) {
    std::vector<Contents> found;
    for (const Extents& xi : starts()) add(balance, found, settle(balance, balance.contents(xi)));
    add(balance, found, follow(balance, balance.contents(setup_.arrives.xi_mol_m3), 0.4, 10));
    if (setup_.T_moves()) scan_temperatures(balance, found);
    if (!found.empty()) {
      const auto hottest = std::ranges::max(found, {}, [&](const Contents& y) { return balance.temperature(y); });
      add(balance, found, follow(balance, hottest, 4, 3));
    }
    return found;
  }

  /// Concentrations and stability of the states, for the start-up to come to.
  std::vector<RestingPlace> places_of(TankBalance& balance, const std::vector<Contents>& found,
                                      double feed_m3_s) const {
    std::vector<RestingPlace> places;
    for (const Contents& y : found) {
      RestingPlace place{std::vector<double>(balance.species()), balance.temperature(y), 0};
      setup_.chemistry.concentrations_of_amounts(std::span(y).first(balance.species()), place.temperature_K,
                                                 setup_.inlet_Pa, place.C);
      place.growth = growth_at(balance, y, place, feed_m3_s);
      places.push_back(std::move(place));
    }
    return places;
  }
  double growth_at(TankBalance& balance, const Contents& y, const RestingPlace& place, double feed_m3_s) const {
    if (!(setup_.is_gas && setup_.T_moves())) return growth(balance, y);
    Transient transient(setup_, feed_m3_s);
    std::vector<double> at = place.C;
    at.push_back(place.temperature_K);
    return growth(transient, at);
  }

  /// Follows the start-up until it rests at a state (which may be one not found before: it is added).
  Outcome<StartEnd> come_to_rest(TankBalance& balance, std::vector<Contents>& found, std::vector<RestingPlace>& places,
                                 double feed_m3_s) {
    auto end = follow_start(setup_, start_, feed_m3_s, places, Places::some);
    const auto* rests = answer(end);
    if (rests == nullptr || rests->at || rests->cycle || rests->xi.empty()) return end;
    const std::size_t known = found.size();
    add(balance, found, settle(balance, balance.contents(rests->xi)));
    if (found.size() > known) places = places_of(balance, found, feed_m3_s);
    return follow_start(setup_, start_, feed_m3_s, places, Places::all);
  }

  Outcome<VesselOutcome> judge(TankBalance& balance, std::vector<Contents>& found, double feed_m3_s, Detail detail) {
    VesselOutcome outcome;
    outcome.states_complete = false;
    outcome.start_peak_K = setup_.inlet_K;
    auto places = places_of(balance, found, feed_m3_s);
    std::optional<std::size_t> reached;
    if (found.size() == 1 && places[0].stable() && (setup_.is_held || detail == Detail::map)) {
      reached = 0;
      if (!setup_.is_held) outcome.start_peak_K.reset();
    } else {
      const auto end = come_to_rest(balance, found, places, feed_m3_s);
      if (const auto* no = std::get_if<NoAnswer>(&end)) return *no;
      const auto& rest = std::get<StartEnd>(end);
      if (found.empty()) return unsolved("no steady state found from any of the starts");
      if (!rest.at && !rest.cycle) return unsolved("the start-up rests where no steady state was found");
      reached = rest.at;
      outcome.start_peak_K = rest.peak_K;
      outcome.uncooled_K = rest.uncooled_K;
    }
    for (std::size_t s = 0; s < found.size(); ++s) {
      Extents xi = balance.extents(found[s]);
      const double X = setup_.chemistry.kinetics.conversion(xi);
      outcome.states.push_back({std::move(xi), X, balance.temperature(found[s]), places[s].stable(), s == reached});
    }
    if (!reached) {
      outcome.cycle = true;
      outcome.isothermal = setup_.is_held;
    } else {
      outcome.residual = balance.imbalance(found[*reached]);
      tell_of_tank(setup_, feed_m3_s, outcome, detail, tell_rate_);
      if (outcome.start_peak_K) outcome.start_peak_K = std::max(*outcome.start_peak_K, outcome.hottest_K);
    }
    std::ranges::stable_sort(outcome.states, {}, &SteadyState::conversion);
    return outcome;
  }

  const Setup& setup_;
  static constexpr int scanned = 120;  // temperatures
  StartState start_;
  RateEvaluator tell_rate_;
  long calls_ = 0;
};

}  // namespace

std::unique_ptr<Solver> make_tank_of_reactions(const Setup& setup) { return std::make_unique<TankOfReactions>(setup); }

}  // namespace vatwright
