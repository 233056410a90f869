#include "start_up.hpp"

#include <algorithm>
#include <cmath>
#include <numeric>

#include "least_squares.hpp"
#include "transient.hpp"
#include "uncooled.hpp"
#include "vatwright/numeric/march.hpp"

namespace vatwright {
namespace {

/// Extents (and for a gas also how many m3 of mixed feed fill 1 m3) by least squares; empty where the reactions are not
/// independent.
std::vector<double> extents_of(const Setup& setup, std::span<const double> C) {
  const Kinetics& kinetics = setup.chemistry.kinetics;
  const auto R = static_cast<std::size_t>(kinetics.reactions());
  std::vector<double> A, b;
  for (std::size_t i = 0; i < C.size(); ++i) {  // e C_i - nu xi = c_feed,i, e = 1 for a liquid
    for (std::size_t j = 0; j < R; ++j) A.push_back(-kinetics.nu(static_cast<int>(i), static_cast<int>(j)));
    if (setup.is_gas) A.push_back(C[i]);
    b.push_back(setup.chemistry.feed.c_mol_m3[i] - (setup.is_gas ? 0 : C[i]));
  }
  auto xi = least_squares(A, b, R + (setup.is_gas ? 1 : 0));
  if (!xi.empty()) xi.resize(R);
  return xi;
}

constexpr double creeps_on = 1e5;      // space times
constexpr double small_step = 1e-3;    // of the scale
constexpr double small_swing = 0.02;   // of the scale: near enough to a state for its own growth to rule
constexpr double rests_within = 1e-4;  // of the scale: nearer than that a start-up has come to a stable state
constexpr double first_stretch = 30, longest = 1e7;  // space times: near a fold a start-up creeps long
constexpr double at_rest = 1e-5;                     // largest change of the scale per space time

double apart(std::span<const double> a, std::span<const double> b, std::span<const double> scale) {
  double most = 0;
  for (std::size_t i = 0; i < a.size(); ++i) most = std::max(most, std::abs(a[i] - b[i]) / scale[i]);
  return most;
}

/// A start-up on its way, stretch by stretch.
class StartUp {
 public:
  StartUp(const Setup& setup, const StartState& start, double feed_m3_s, std::span<const RestingPlace> places,
          Places known)
      : setup_(setup),
        transient_(setup, feed_m3_s),
        y_(start.C),
        scale_(transient_.scale()),
        places_(places),
        others_may_be_(known == Places::some) {
    if (transient_.moves()) y_.push_back(start.temperature_K);
    end_.peak_K = start.temperature_K;
    for (const RestingPlace& place : places) {
      states_.push_back(place.C);
      if (transient_.moves()) states_.back().push_back(place.temperature_K);
    }
    for (std::size_t s = 0; s < states_.size(); ++s) {
      double nearest = 10 * rests_within;
      for (std::size_t other = 0; other < states_.size(); ++other)
        if (other != s) nearest = std::min(nearest, apart(states_[s], states_[other], scale_));
      within_.push_back(nearest / 10);
    }
  }

  Outcome<StartEnd> run() {
    double done = 0;
    for (double stretch = first_stretch; done < longest; done += stretch, stretch = done) {
      if (away_from_states(y_) <= 0) return arrived();
      if (auto failed = go(stretch)) return *failed;
      if (path_.ended_by()) return arrived();
      if (drift() < at_rest) {
        if (rests()) return end_;
        if (done > creeps_on) step_past();
      }
      const double first = swing(0.25, 0.5), before = swing(0.5, 0.75), last = swing(0.75, 1);
      if (shrinks_around_a_state(before, last)) return end_;
      if (goes_on(first, before, last)) {
        end_.cycle = true;
        return end_;
      }
    }
    return unsolved("the start-up has not come to rest after " + std::to_string(static_cast<int>(done)) +
                    " space times");
  }

 private:
  /// Above 0: no stable state is near.
  double away_from_states(std::span<const double> y) const {
    double least = 1;
    for (std::size_t s = 0; s < states_.size(); ++s)
      if (places_[s].stable()) least = std::min(least, apart(y, states_[s], scale_) - within_[s]);
    return least;
  }

  std::optional<NoAnswer> go(double space_times) {
    const auto f = [&](double, std::span<const double> at, std::span<double> dy) { transient_(at, dy); };
    const auto by_amounts = [&](double, std::span<const double> at, std::span<double> J) {
      transient_.jacobian(at, J);
    };
    const Jacobian jacobian(by_amounts);
    const auto near = [&](double, std::span<const double> at) { return away_from_states(at); };
    const Event event(near);
    const MarchOptions options{.rel_tol = 1e-8, .abs_tol = 1e-11, .scale = scale_, .most_calls = 2'000'000};
    auto track = march(f, y_, 0, space_times, options, {&event, 1}, &jacobian);
    if (const auto* no = std::get_if<NoAnswer>(&track))
      return unsolved("the start-up could not be followed: " + no->why);
    path_ = std::get<Track>(std::move(track));
    path_.read(path_.end(), y_);
    look_for_peak();
    return std::nullopt;
  }

  void look_for_peak() {
    if (!transient_.moves()) return;
    std::vector<double> there(y_.size());
    const auto& nodes = path_.nodes();
    if (cooling_can_fail(setup_)) look_for_worst_moment();
    for (std::size_t k = 0; k + 1 < nodes.size(); ++k)
      for (double part : {0.25, 0.5, 0.75, 1.0}) {
        path_.read(nodes[k] + part * (nodes[k + 1] - nodes[k]), there);
        end_.peak_K = std::max(end_.peak_K, there.back());
      }
  }

  void look_for_worst_moment() {
    const std::size_t n = transient_.species();
    std::vector<double> there(y_.size()), worst(y_);
    double most = 0;
    for (double t : path_.nodes()) {
      path_.read(t, there);
      const double potential = potential_K(setup_, std::span(there).first(n), there[n]);
      if (potential <= most) continue;
      most = potential;
      worst = there;
    }
    const double hottest = warmest_uncooled(setup_, std::span(worst).first(n), worst[n]);
    end_.uncooled_K = std::max(hottest, end_.uncooled_K.value_or(hottest));
  }

  double drift() {
    std::vector<double> dy(y_.size());
    transient_(y_, dy);
    double most = 0;
    for (std::size_t i = 0; i < dy.size(); ++i) most = std::max(most, std::abs(dy[i]) / scale_[i]);
    return most;
  }

  /// Three quarters of the stretch swing equally far.
  static bool goes_on(double first, double before, double last) {
    return last > 100 * rests_within && std::abs(before - last) <= 0.002 * last &&
           std::abs(first - last) <= 0.002 * last;
  }
  /// Small swings around one state that shrink: around a stable one at least half as fast as small ones do, so that
  /// they die down; around one that is not stable they end in a cycle.
  bool shrinks_around_a_state(double before, double last) {
    if (!(last > 0) || last > small_swing || !(last < before)) return false;
    const double rate = std::log(last / before) / (path_.end() / 4);
    for (std::size_t s = 0; s < states_.size(); ++s) {
      if (apart(y_, states_[s], scale_) > last) continue;
      if (places_[s].stable() && rate > places_[s].growth / 2) return false;
      if (places_[s].stable())
        end_.at = s;
      else
        end_.cycle = true;
      return true;
    }
    return false;
  }
  /// Where the temperature (a held tank: the last species) turns more than once: how far the contents swing.
  double swing(double from, double to) const {
    std::vector<double> low, high, there(y_.size());
    int turns = 0;
    double was = 0, went = 0;
    const auto& nodes = path_.nodes();
    for (std::size_t k = 0; k + 1 < nodes.size(); ++k) {
      if (nodes[k] < from * path_.end() || nodes[k] > to * path_.end()) continue;
      for (double part : {0.0, 0.25, 0.5, 0.75}) {
        path_.read(nodes[k] + part * (nodes[k + 1] - nodes[k]), there);
        if (low.empty()) {
          low = high = there;
          was = there.back();
        }
        for (std::size_t i = 0; i < there.size(); ++i) {
          low[i] = std::min(low[i], there[i]);
          high[i] = std::max(high[i], there[i]);
        }
        const double goes = there.back() - was;
        if (goes * went < 0) ++turns;
        if (goes != 0) went = goes;
        was = there.back();
      }
    }
    return turns > 1 ? apart(low, high, scale_) : 0;
  }

  StartEnd arrived() {
    double nearest = std::numeric_limits<double>::infinity();
    for (std::size_t s = 0; s < states_.size(); ++s)
      if (const double d = apart(y_, states_[s], scale_); places_[s].stable() && d < nearest) {
        nearest = d;
        end_.at = s;
      }
    end_.peak_K = std::max(end_.peak_K, places_[*end_.at].temperature_K);
    return end_;
  }
  /// Where a state was until a fold took it away, the contents creep, slower than a march can tell from rest: a step on
  /// towards the nearest stable state, which is where they go.
  void step_past() {
    const std::vector<double>* next = nullptr;
    for (std::size_t s = 0; s < states_.size(); ++s)
      if (places_[s].stable() && (next == nullptr || apart(y_, states_[s], scale_) < apart(y_, *next, scale_)))
        next = &states_[s];
    if (next == nullptr) return;
    const double share = small_step / apart(y_, *next, scale_);
    for (std::size_t i = 0; i < y_.size(); ++i) y_[i] += share * ((*next)[i] - y_[i]);
  }

  /// At a state, if not at one told stable (a start right on it); or at rest where other states may be. Where none can
  /// be, it creeps past what was a state a little way before a fold.
  bool rests() {
    const std::size_t n = transient_.species();
    end_.temperature_K = transient_.temperature(y_);
    end_.xi = extents_of(setup_, std::span(y_).first(n));
    double nearest = 10 * rests_within;
    bool stable = false;
    for (std::size_t s = 0; s < states_.size(); ++s)
      if (const double d = apart(y_, states_[s], scale_);
          d < 10 * rests_within && (places_[s].stable() > stable || (places_[s].stable() == stable && d < nearest))) {
        nearest = d;
        stable = places_[s].stable();
        end_.at = s;
      }
    return end_.at || others_may_be_;
  }

  const Setup& setup_;
  Transient transient_;
  std::vector<double> y_, scale_;
  std::span<const RestingPlace> places_;
  std::vector<std::vector<double>> states_;
  std::vector<double> within_;
  bool others_may_be_;
  Track path_;
  StartEnd end_;
};

}  // namespace

Outcome<StartEnd> follow_start(const Setup& setup, const StartState& start, double feed_m3_s,
                               std::span<const RestingPlace> places, Places known) {
  if (setup.is_gas && std::accumulate(start.C.begin(), start.C.end(), 0.0) <= 0)
    return cannot_tell("a gas without its reactants leaves nothing to fill the tank with at the start");
  return StartUp(setup, start, feed_m3_s, places, known).run();
}

}  // namespace vatwright
