#include <algorithm>
#include <cmath>

#include "start_up.hpp"
#include "tank_curve.hpp"
#include "tank_newton.hpp"
#include "tank_outcome.hpp"

namespace vatwright {
namespace {

/// One steady state with what is needed to judge it.
struct Found {
  double xi = 0, distance_out = 0;  // distance from the inlet, signed as xi, to full digits
  double left = 0;                  // distance from the end of the way, to full digits
  bool stable = false, at_end = false;
  double growth = 0;  // of small departures, per space time; without a jacket its sign alone
};

/// All states of a tank with one reaction: those along the way that the reaction goes, and the inlet itself where the
/// rate there is zero.
class OneReactionTank final : public Solver {
 public:
  explicit OneReactionTank(const Setup& setup) : setup_(setup) {
    if (!moves_with_feed()) build({});
  }

  Outcome<VesselOutcome> at(double feed_m3_s, Detail detail) override {
    if (moves_with_feed()) build(setup_.exchange(feed_m3_s));
    if (path_->no_value() > 0) return cannot_tell("a rate has no finite value where a species that slows it is absent");
    const double tau = setup_.volume_m3 / feed_m3_s;
    bool confined = false;
    std::vector<Found> found;
    if (auto failed = find_states(tau, found, confined)) return *failed;
    for (Found& state : found) state.growth = state.stable ? -1 : 1;
    if (setup_.is_jacketed()) judge_stability(feed_m3_s, found);
    const auto reached = reached_of(tau, feed_m3_s, found, confined, detail);
    if (const auto* no = std::get_if<NoAnswer>(&reached)) return *no;
    return outcome_of(found, std::get<Arrival>(reached), feed_m3_s, detail);
  }

  std::optional<double> feed_at_conversion(double X) override {
    if (moves_with_feed() || !curve_) return std::nullopt;
    Way& way = curve_->way();
    const double xi_end = way.xi_end();
    const double X_in = conversion(setup_.arrives.xi_mol_m3[0]), X_end = conversion(xi_end);
    const double share = (X - X_in) / (X_end - X_in);
    if (!(share > 0 && share < 1)) return std::nullopt;
    const double d = share * way.length(), s = (X_end - X) / (X_end - X_in) * way.length();
    const double feed = setup_.volume_m3 * way.rate(d, s) / d;
    if (!(feed > 0) || !std::isfinite(feed)) return std::nullopt;
    if (way.path().falls()) return feed;  // one state alone
    auto there = at(feed, Detail::map);
    const auto* outcome = answer(there);
    if (outcome == nullptr || std::abs(outcome->conversion - X) > 1e-9) return std::nullopt;
    return feed;
  }

  [[nodiscard]] long rate_calls() const override { return calls_before_ + path_->calls(); }

 private:
  struct Arrival {
    std::optional<std::size_t> state;  ///< absent: a cycle
    std::optional<double> peak_K;      ///< absent: not asked
    std::optional<double> uncooled_K = {};
  };

  bool moves_with_feed() const { return setup_.T_moves() && (setup_.agitator_W != 0 || setup_.is_jacketed()); }

  void build(const Exchange& exchange) {
    if (path_) calls_before_ += path_->calls();
    curve_.reset();
    path_.emplace(setup_, exchange);
    for (double sign : {1.0, -1.0})
      if (!curve_)
        if (auto way = Way::find(*path_, sign)) curve_.emplace(*way);
    idle_inlet_ = path_->rate(path_->inlet(), 0) == 0 || !curve_;
  }

  double conversion(double xi) const { return setup_.chemistry.kinetics.conversion({&xi, 1}); }

  std::optional<NoAnswer> find_states(double tau, std::vector<Found>& found, bool& confined) {
    const double xi_in = setup_.arrives.xi_mol_m3[0];
    TankCurve::Answer along;
    if (curve_) along = curve_->states(tau);
    if (along.failed) return unsolved("a steady state between two samples could not be pinned down");
    confined = along.confined_hit;
    if (idle_inlet_) {
      // stable unless the reaction starts by itself: the slope of the rate against -1/tau
      const bool starts = curve_ && curve_->log_time(-y_most + 1) < std::log(tau);
      found.push_back({xi_in, 0, 0, !starts, false});
    }
    for (const auto& state : along.states)
      found.push_back({state.at_end ? curve_->way().xi_end() : curve_->way().xi(state.place.d, state.place.s),
                       curve_->way().sign() * state.place.d, state.place.s, state.stable, state.at_end});
    std::ranges::sort(found, {}, &Found::distance_out);
    return std::nullopt;
  }

  /// dxi/dt tau = xi_in - xi + tau R, at any extent.
  double drive(double xi, double tau) {
    const double xi_in = setup_.arrives.xi_mol_m3[0];
    return tau * path_->rate(path_->inlet(), xi - xi_in) - (xi - xi_in);
  }

  std::size_t nearest_from(double xi, double tau, const std::vector<Found>& found, bool& leaves) {
    const double scale = std::max(std::abs(xi), curve_ ? curve_->way().length() : 0);
    for (std::size_t i = 0; i < found.size(); ++i)
      if (std::abs(found[i].xi - xi) <= 1e-13 * scale) return i;
    const double drives = drive(xi, tau);
    leaves = false;
    if (drives > 0) {
      for (std::size_t i = 0; i < found.size(); ++i)
        if (found[i].xi > xi) return i;
    } else {
      for (std::size_t i = found.size(); i-- > 0;)
        if (found[i].xi < xi) return i;
    }
    leaves = true;
    return 0;
  }

  /// A jacket makes heat and composition move apart: stable is what the eigenvalues of both balances say.
  void judge_stability(double feed_m3_s, std::vector<Found>& found) {
    TankBalance balance(setup_, feed_m3_s);
    Transient transient(setup_, feed_m3_s);
    for (Found& state : found) {
      const auto place = place_of(state);
      std::vector<double> y = place.C;
      y.push_back(place.temperature_K);
      state.growth = setup_.is_gas ? growth(transient, y) : growth(balance, y);
      state.stable = state.growth < 0;
    }
    calls_before_ += balance.calls();
  }

  /// Concentrations at a state, to full digits near either end of the way.
  RestingPlace place_of(const Found& state) {
    const bool from_end = curve_ && state.left < std::abs(state.distance_out);
    const double sign = curve_ ? curve_->way().sign() : 1;
    const Anchor there =
        from_end ? path_->at(curve_->way().end(), -sign * state.left) : path_->at(path_->inlet(), state.distance_out);
    RestingPlace place{there.c, path_->temperature(state.xi), state.growth};
    for (double& c : place.C) c = std::max(c, 0.0);
    setup_.chemistry.concentrations_of_amounts(place.C, place.temperature_K, setup_.inlet_Pa, place.C);
    return place;
  }

  Outcome<Arrival> reached_of(double tau, double feed_m3_s, const std::vector<Found>& found, bool confined,
                              Detail detail) {
    const NoAnswer beyond = cannot_tell(confined ? curve_->way().why() : "no steady state in the range of the model");
    if (found.empty()) return beyond;
    if (setup_.is_jacketed() && detail == Detail::map && found.size() == 1 && found[0].stable) return Arrival{0, {}};
    const StartState start = start_state(setup_);
    if (!on_line(start)) return follow(start, feed_m3_s, found);
    bool leaves = false;
    const std::size_t i = nearest_from(start.xi, tau, found, leaves);
    if (leaves) return beyond;
    if (setup_.is_held) return Arrival{i, setup_.inlet_K};
    return Arrival{i, std::max(path_->temperature(start.xi), path_->temperature(found[i].xi))};
  }

  Outcome<Arrival> follow(const StartState& start, double feed_m3_s, const std::vector<Found>& found) {
    if (setup_.chemistry.kinetics.has_table())
      return cannot_tell("a table of measured rates says nothing of a tank that starts filled with solvent");
    std::vector<RestingPlace> places;
    for (const Found& state : found) places.push_back(place_of(state));
    const auto end = follow_start(setup_, start, feed_m3_s, places, Places::all);
    if (const auto* no = std::get_if<NoAnswer>(&end)) return *no;
    const StartEnd& rest = std::get<StartEnd>(end);
    return Arrival{rest.at, rest.peak_K, rest.uncooled_K};
  }

  /// The start lies on the line that the states lie on, so that the tank moves along it.
  bool on_line(const StartState& start) const {
    if (!start.on_extents || setup_.is_jacketed()) return false;
    if (setup_.is_held) return true;
    return std::abs(path_->temperature(start.xi) - start.temperature_K) <= 1e-9 * start.temperature_K;
  }

  /// |xi_in + tau R - xi| over the sum of the terms, the rate reckoned anew from the state as it is told.
  double residual_of(const Found& state, double tau) {
    const double xi_in = setup_.arrives.xi_mol_m3[0];
    if (state.at_end && curve_) {  // a reactant is gone: the rate just before must be enough
      const double L = curve_->way().length();
      const double made = tau * curve_->way().rate(L, place_at(y_most, L).s);
      if (curve_->way().kind() == EndKind::equilibrium) return 0;
      return std::max(0.0, L - made) / (L + made);
    }
    const double d = std::abs(state.distance_out);
    if (d == 0) return 0;
    const double made = tau * (curve_ ? curve_->way().rate(d, state.left) : 0);
    // near equilibrium what is made and unmade is far more than the difference: both are terms of the balance
    const bool cancels = curve_ && curve_->way().kind() == EndKind::equilibrium && state.left > 0;
    const double both_ways = cancels ? made * curve_->way().length() / state.left : made;
    return std::abs(made - d) / (both_ways + d + std::abs(xi_in));
  }

  Outcome<VesselOutcome> outcome_of(const std::vector<Found>& found, const Arrival& arrival, double feed_m3_s,
                                    Detail detail) {
    VesselOutcome outcome;
    for (std::size_t i = 0; i < found.size(); ++i)
      outcome.states.push_back({{found[i].xi},
                                conversion(found[i].xi),
                                path_->temperature(found[i].xi),
                                found[i].stable,
                                i == arrival.state});
    outcome.start_peak_K = arrival.peak_K;
    outcome.isothermal = setup_.is_held;
    outcome.cycle = !arrival.state;
    if (arrival.state) outcome.residual = residual_of(found[*arrival.state], setup_.volume_m3 / feed_m3_s);
    outcome.uncooled_K = arrival.uncooled_K;
    tell_of_tank(setup_, feed_m3_s, outcome, detail, path_->evaluator());
    std::ranges::stable_sort(outcome.states, {}, &SteadyState::conversion);
    return outcome;
  }

  const Setup& setup_;
  std::optional<RatePath> path_;
  std::optional<TankCurve> curve_;
  bool idle_inlet_ = false;
  long calls_before_ = 0;
};

}  // namespace

std::unique_ptr<Solver> make_one_reaction_tank(const Setup& setup) { return std::make_unique<OneReactionTank>(setup); }

}  // namespace vatwright
