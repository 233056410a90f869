#include <algorithm>
#include <cmath>

#include "tube_balance.hpp"
#include "tube_outcome.hpp"
#include "vatwright/numeric/march.hpp"
#include "vatwright/numeric/matrix.hpp"
#include "vatwright/numeric/quadrature.hpp"
#include "vatwright/vessel/pressure_drop.hpp"

namespace vatwright {
namespace {

/// A stretch in which the same species are exhausted.
struct Stretch {
  Track track;
  std::vector<bool> exhausted;
};

/// Marches the balances of a tube through every place where something runs out or comes back, and keeps what it
/// marched.
class TubeMarch {
  using Rates = std::vector<double>;

 public:
  explicit TubeMarch(TubeBalance balance) : balance_(std::move(balance)), y_(balance_.at_inlet()) {}

  /// Goes on to s (from where it is). An error ends it for good.
  void go_to(double s) {
    int turns = 0;
    while (s_ < s && !failed_ && !used_up_) {
      if (++turns > 200) {
        failed_ = unsolved("species run out and come back without end along the tube");
        return;
      }
      step_to(s);
    }
  }

  void read(double s, std::span<double> y) const {
    if (stretches_.empty()) {
      std::ranges::copy(y_, y.begin());
      return;
    }
    auto at = std::ranges::lower_bound(stretches_, s, {}, [](const Stretch& one) { return one.track.end(); });
    if (at == stretches_.end()) --at;
    at->track.read(std::clamp(s, at->track.begin(), at->track.end()), y);
  }

  /// Largest imbalance of an extent up to s over the largest sum of terms: step by step the change that is kept against
  /// the integral of the rates along the track. Where reactions are much faster than the step, a slip of the track
  /// shows many times over in them; it is told as the shift of the state that closes the balance, (I - h J) shift =
  /// slip.
  double residual(double s) {
    Rates total(extents()), from(balance_.size()), to(balance_.size());
    const auto kept = balance_.exhausted();
    for (const Stretch& stretch : stretches_) {
      balance_.set_exhausted(stretch.exhausted);
      const auto& nodes = stretch.track.nodes();
      for (std::size_t k = 0; k + 1 < nodes.size() && nodes[k] < s; ++k) {
        const double a = nodes[k], b = std::min(nodes[k + 1], s);
        Rates slip(balance_.size());
        add_integral(stretch.track, a, b, gauss(stretch.track, a, b), 14, slip);
        stretch.track.read(a, from);
        stretch.track.read(b, to);
        for (std::size_t i = 0; i < slip.size(); ++i) slip[i] = to[i] - from[i] - slip[i];
        close_by_shift(to, b - a, slip);
        for (std::size_t j = 0; j < total.size(); ++j) total[j] += slip[j];
      }
    }
    balance_.set_exhausted(kept);
    read(s, to);
    const auto start = balance_.at_inlet();
    double worst = 0, terms = balance_.scale()[0];  // of what is fed
    for (std::size_t j = 0; j < total.size(); ++j) {
      worst = std::max(worst, std::abs(total[j]));
      terms = std::max(terms, std::abs(start[j]) + std::abs(to[j]) + std::abs(to[j] - start[j]));
    }
    return worst / terms;
  }

  [[nodiscard]] double reached() const { return s_; }
  [[nodiscard]] const std::optional<NoAnswer>& failed() const { return failed_; }
  [[nodiscard]] bool used_up() const { return used_up_; }
  [[nodiscard]] std::vector<double> nodes() const {
    std::vector<double> all;
    for (const Stretch& stretch : stretches_)
      all.insert(all.end(), stretch.track.nodes().begin(), stretch.track.nodes().end());
    return all;
  }
  TubeBalance& balance() { return balance_; }

 private:
  /// Five-point Gauss rule on [a, b], all extents at once.
  Rates gauss(const Track& track, double a, double b) {
    static constexpr double x[] = {0, 0.5384693101056831, 0.9061798459386640};
    static constexpr double w[] = {0.5688888888888889, 0.4786286704993665, 0.2369268850561891};
    const double middle = (a + b) / 2, half = (b - a) / 2;
    Rates sum(y_.size()), there(y_.size()), dy(y_.size());
    for (int k = 0; k < 3; ++k)
      for (double sign : {-1.0, 1.0}) {
        if (k == 0 && sign < 0) continue;
        track.read(middle + sign * half * x[k], there);
        balance_(there, dy);
        for (std::size_t j = 0; j < sum.size(); ++j) sum[j] += half * w[k] * dy[j];
      }
    return sum;
  }
  /// Halved until both halves say the same: a rate may end like a root where something runs out.
  void add_integral(const Track& track, double a, double b, const Rates& whole, int depth, Rates& sum) {
    const double middle = (a + b) / 2;
    const Rates left = gauss(track, a, middle), right = gauss(track, middle, b);
    double apart = 0;
    for (std::size_t j = 0; j < sum.size(); ++j)
      apart = std::max(apart, std::abs(left[j] + right[j] - whole[j]) / balance_.scale()[j]);
    if (apart <= 1e-12 || depth == 0) {
      for (std::size_t j = 0; j < sum.size(); ++j) sum[j] += left[j] + right[j];
      return;
    }
    add_integral(track, a, middle, left, depth - 1, sum);
    add_integral(track, middle, b, right, depth - 1, sum);
  }

  [[nodiscard]] std::size_t extents() const { return balance_.size() - (balance_.with_pressure() ? 1 : 0); }

  void close_by_shift(const Rates& y, double h, Rates& slip) {
    double largest = 0;
    for (std::size_t i = 0; i < slip.size(); ++i) largest = std::max(largest, std::abs(slip[i]) / balance_.scale()[i]);
    if (largest <= 1e-12) return;
    const std::size_t n = y.size();
    Rates J(n * n), shift = slip;
    balance_.jacobian(y, J);
    for (std::size_t i = 0; i < n; ++i)
      for (std::size_t k = 0; k < n; ++k) J[i * n + k] = (i == k ? 1 : 0) - h * J[i * n + k];
    if (solve_linear(J, shift)) slip = shift;
  }

  /// What is made faster than it could be used comes back before the next step.
  std::vector<bool> still_exhausted() {
    std::vector<bool> exhausted = balance_.exhausted();
    for (std::size_t i : balance_.can_run_out())
      if (exhausted[i] && balance_.wanting(i, y_) < 0) exhausted[i] = false;
    balance_.set_exhausted(exhausted);
    return exhausted;
  }

  void step_to(double s) {
    const std::vector<bool> exhausted = still_exhausted();
    const auto f = [&](double, std::span<const double> y, std::span<double> dy) { balance_(y, dy); };
    struct Watch {
      TubeBalance* balance;
      std::size_t species;
      bool is_exhausted;
      double operator()(double, std::span<const double> y) const {
        // neither made nor used counts as wanting, so that being made is a crossing
        return is_exhausted ? balance->wanting(species, y) + 1e-300 : balance->left(species, y);
      }
    };
    std::vector<Watch> watches;
    for (std::size_t i : balance_.can_run_out()) watches.push_back({&balance_, i, exhausted[i]});
    const auto pressure = [&](double, std::span<const double> y) { return y.back() - TubeBalance::no_pressure; };
    std::vector<Event> events;
    for (Watch& watch : watches) events.emplace_back(watch);
    if (balance_.with_pressure()) events.emplace_back(pressure);

    const auto scale = balance_.scale();
    const MarchOptions options{.rel_tol = 1e-11, .abs_tol = 1e-13, .scale = scale};
    const auto by_amounts = [&](double, std::span<const double> y, std::span<double> J) { balance_.jacobian(y, J); };
    const Jacobian jacobian(by_amounts);
    auto track = march(f, y_, s_, s, options, events, &jacobian);
    if (const auto* no = std::get_if<NoAnswer>(&track)) {
      failed_ = unsolved("the balances along the tube could not be followed: " + no->why);
      return;
    }
    stretches_.push_back({std::get<Track>(std::move(track)), exhausted});
    const Track& made = stretches_.back().track;
    s_ = made.end();
    made.read(s_, y_);
    if (!made.ended_by()) return;
    const auto which = static_cast<std::size_t>(*made.ended_by());
    if (which >= watches.size()) {
      used_up_ = true;
      return;
    }
    auto next = exhausted;
    next[watches[which].species] = !watches[which].is_exhausted;
    if (!watches[which].is_exhausted) balance_.finish(watches[which].species, y_);
    balance_.set_exhausted(std::move(next));
  }

  TubeBalance balance_;
  std::vector<double> y_;
  double s_ = 0;
  std::vector<Stretch> stretches_;
  std::optional<NoAnswer> failed_;
  bool used_up_ = false;
};

/// A tube with several reactions, or a gas that loses pressure. Without that loss one march in V/v, made in standing
/// stages, serves all feed rates; with it each rate is marched by itself.
class MarchedTube final : public Solver {
 public:
  explicit MarchedTube(const Setup& setup)
      : setup_(setup),
        with_pressure_(setup.is_gas &&
                       loss_per_length(setup, 1, setup.arrives.xi_mol_m3, setup.inlet_K, setup.inlet_Pa)),
        tell_rate_(setup.chemistry.kinetics) {
    if (!with_pressure_) shared_.emplace(TubeBalance(setup, false, 1));
  }

  Outcome<VesselOutcome> at(double feed_m3_s, Detail detail) override {
    const double length = length_of(setup_.vessel.kind), t = setup_.volume_m3 / feed_m3_s;
    const double loss =
        with_pressure_
            ? 0
            : loss_per_length(setup_, feed_m3_s, setup_.arrives.xi_mol_m3, setup_.inlet_K, setup_.inlet_Pa).value_or(0);
    if (setup_.inlet_Pa - loss * length <= 0) return pressure_used_up(setup_.inlet_Pa / (loss * length), length);
    std::optional<TubeMarch> own;
    if (with_pressure_) own.emplace(TubeBalance(setup_, true, feed_m3_s));
    TubeMarch& march = with_pressure_ ? *own : *shared_;
    const double end = with_pressure_ ? 1 : t;
    go(march, end);
    if (own) calls_before_ += march.balance().calls();
    if (march.used_up()) return pressure_used_up(march.reached(), length);
    if (march.failed() && march.reached() < end) return *march.failed();
    if (march.balance().no_value() > 0)
      return cannot_tell("a rate has no finite value where a species that slows it is absent");
    std::vector<double> y(march.balance().size());
    const auto stream_at = [&](double z) {
      march.read(z * end, y);
      const TubeBalance& balance = march.balance();
      const double P = with_pressure_ ? balance.pressure(y) : setup_.inlet_Pa - loss * length * z;
      return Stream{feed_m3_s,
                    {y.begin(), y.begin() + static_cast<std::ptrdiff_t>(setup_.capacity.size())},
                    balance.temperature(y),
                    P};
    };
    VesselOutcome outcome = tell({setup_, feed_m3_s, stream_at, places(march, end), tell_rate_}, detail);
    if (detail != Detail::map) outcome.residual = march.residual(end);
    return outcome;
  }

  std::optional<double> feed_at_conversion(double) override { return std::nullopt; }
  [[nodiscard]] long rate_calls() const override {
    return calls_before_ + tell_rate_.calls() + (shared_ ? shared_->balance_calls() : 0);
  }

 private:
  struct Shared : TubeMarch {
    using TubeMarch::TubeMarch;
    long balance_calls() const { return const_cast<Shared*>(this)->balance().calls(); }
  };

  /// Stages end at powers of 4 of a second, whatever was asked before: the same answer in any order of asking.
  static void go(TubeMarch& march, double end) {
    if (march.balance().with_pressure()) return march.go_to(end);
    double stage = 1e-6;
    while (stage < end) stage *= 4;
    for (double s = 1e-6; s <= stage; s *= 4)
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
  bool with_pressure_;
  RateEvaluator tell_rate_;
  std::optional<Shared> shared_;
  long calls_before_ = 0;
};

}  // namespace

std::unique_ptr<Solver> make_marched_tube(const Setup& setup) { return std::make_unique<MarchedTube>(setup); }

}  // namespace vatwright
