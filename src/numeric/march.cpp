#include "vatwright/numeric/march.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

#include "number_text.hpp"
#include "stepper.hpp"
#include "vatwright/error/expects.hpp"
#include "vatwright/numeric/matrix.hpp"
#include "vatwright/numeric/root.hpp"

namespace vatwright {
namespace {

bool all_finite(const State& values) {
  return std::ranges::all_of(values, [](double v) { return std::isfinite(v); });
}

double at(std::span<const double> rows, std::size_t n, std::size_t i, double theta) {
  double value = 0;
  for (std::size_t row = rows_of_step; row-- > 0;) value = value * theta + rows[row * n + i];
  return value;
}

Tolerance tolerance(const MarchOptions& options, std::size_t n) {
  VATWRIGHT_EXPECTS(options.scale.empty() || options.scale.size() == n);
  Tolerance tol{options.rel_tol, State(n, options.abs_tol)};
  for (std::size_t i = 0; i < options.scale.size(); ++i) tol.abs[i] *= options.scale[i];
  return tol;
}

/// The fastest decay that a Jacobian shows, 1/time; 0 where none.
double fastest_decay(std::span<const double> J, std::size_t n) {
  double fastest = 0;
  for (const auto& lambda : eigenvalues(J, static_cast<int>(n))) fastest = std::max(fastest, -lambda.real());
  return fastest;
}

}  // namespace

class Marcher {
 public:
  Marcher(Rhs f, std::span<const double> y0, double t0, double t1, const MarchOptions& options,
          std::span<const Event> events, const Jacobian* jacobian)
      : f_(f),
        t1_(t1),
        n_(y0.size()),
        options_(options),
        events_(events),
        jacobian_(jacobian),
        tol_(tolerance(options, y0.size())),
        stiff_(n_, jacobian, tol_),
        rows_(rows_of_step * n_),
        place_(n_),
        J_(n_ * n_) {
    for (double each : tol_.abs) noise_.push_back(1e3 * each);
    step_.t = t0;
    step_.y.assign(y0.begin(), y0.end());
    step_.dydt.resize(n_);
    step_.y1 = step_.dydt1 = step_.error = step_.dydt;
    track_.n_ = static_cast<int>(n_);
    track_.t_ = {t0};
  }

  Outcome<Track> run() {
    if (auto failed = start()) return *failed;
    while (step_.t < t1_ && !track_.ended_by_) {
      if (auto failed = advance()) return *failed;
    }
    if (track_.t_.size() == 1) track_.coefficients_ = step_.y;
    track_.calls_ = f_.calls();
    track_.ended_stiff_ = is_stiff_;
    return std::move(track_);
  }

 private:
  NoAnswer stuck(const std::string& why) const {
    return {NoAnswer::Kind::unsolved,
            "the march stopped at " + number_text(step_.t) + " of " + number_text(t1_) + ": " + why};
  }

  std::optional<NoAnswer> start() {
    if (!std::isfinite(step_.t) || !std::isfinite(t1_) || !all_finite(step_.y)) return stuck("the start is not finite");
    f_(step_.t, step_.y, step_.dydt);
    if (!all_finite(step_.dydt)) return stuck("the rates have no value there");
    for (const Event& g : events_) {
      level_.push_back(g(step_.t, step_.y));
      if (!std::isfinite(level_.back())) return stuck("an event has no value there");
    }
    span_ = t1_ - step_.t;
    is_stiff_ = options_.starts_stiff;
    next_h_ = options_.first_step > 0 ? options_.first_step : first_step();
    return std::nullopt;
  }

  /// A step over which the solution and its slope, followed by Euler's method, hardly change (Hairer, Norsett, Wanner,
  /// Solving Ordinary Differential Equations I, sec. II.4, from memory).
  double first_step() {
    const double d0 = tol_.norm(step_.y, step_.y, step_.y), d1 = tol_.norm(step_.dydt, step_.y, step_.y);
    double h = d0 > 1e-5 && d1 > 1e-5 ? 0.01 * d0 / d1 : 1e-6 * span_;
    h = std::min(h, span_);
    State y1(step_.y), change(n_);
    for (std::size_t i = 0; i < n_; ++i) y1[i] += h * step_.dydt[i];
    f_(step_.t + h, y1, change);
    for (std::size_t i = 0; i < n_; ++i) change[i] = (change[i] - step_.dydt[i]) / h;
    const double steepest = std::max(d1, tol_.norm(change, step_.y, step_.y));
    if (!(steepest > 0)) return h;
    return std::isfinite(steepest) ? std::min(100 * h, std::pow(0.01 / steepest, 0.2)) : h;
  }

  std::optional<NoAnswer> advance() {
    if (f_.calls() >= options_.most_calls)
      return stuck("more than " + std::to_string(options_.most_calls) + " evaluations of the rates");
    const double rest = t1_ - step_.t;
    const bool last = next_h_ >= rest * (1 - 1e-12);
    step_.h = last ? rest : std::min(next_h_, rest / 2 < next_h_ ? rest / 2 : next_h_);
    attempt();
    const double error = tol_.norm(step_.error, step_.y, step_.y1);
    const bool sound =
        std::isfinite(error) && all_finite(step_.error) && all_finite(step_.y1) && all_finite(step_.dydt1);
    const double power = is_stiff_ ? RadauStepper::power : ExplicitStepper::power;
    const double factor = sound ? std::clamp(0.9 * std::pow(error, -power), 0.2, grow_) : 0.2;
    if (!sound || error > 1) {
      next_h_ = step_.h * std::min(factor, 0.9);
      grow_ = 1;  // not at once again
      const double least = 16 * std::numeric_limits<double>::epsilon() * std::abs(step_.t) + 1e-20 * span_;
      if (next_h_ < least) return stuck("the step fell below rounding");
      return std::nullopt;
    }
    grow_ = 5;
    next_h_ = step_.h * factor;
    return accept(last);
  }

  void attempt() {
    if (is_stiff_)
      stiff_.attempt(f_, step_);
    else
      explicit_.attempt(f_, step_);
  }

  std::optional<NoAnswer> accept(bool last) {
    if (is_stiff_)
      stiff_.dense(step_, rows_);
    else
      explicit_.dense(step_, rows_);
    if (auto failed = look_for_events()) return failed;
    if (event_at_ && !(step_.t + *event_at_ * step_.h > step_.t)) return std::nullopt;  // at the last node itself
    keep(last);
    weigh_methods();
    return std::nullopt;
  }

  /// Signs of the events at four points of the step; the first crossing ends the march there.
  std::optional<NoAnswer> look_for_events() {
    for (double before = 0; before < 1 && !events_.empty(); before += 0.25) {
      for (std::size_t e = 0; e < events_.size(); ++e) {
        const double was = level_[e], now = level(e, before + 0.25);
        if (!std::isfinite(now)) return stuck("an event has no value in the step ahead");
        level_[e] = now;
        if (!(was > 0 && now <= 0)) continue;
        const auto root = find_root([&](double theta) { return level(e, theta); }, before, before + 0.25);
        const double theta = answer(root) != nullptr ? *answer(root) : before + 0.25;
        if (event_at_ && theta >= *event_at_) continue;
        event_at_ = theta;
        track_.ended_by_ = static_cast<int>(e);
      }
      if (event_at_) break;
    }
    return std::nullopt;
  }

  double level(std::size_t e, double theta) {
    for (std::size_t i = 0; i < n_; ++i) place_[i] = vatwright::at(rows_, n_, i, theta);
    return events_[e](step_.t + theta * step_.h, place_);
  }

  void keep(bool last) {
    const double share = event_at_.value_or(1.0);
    double scale = 1;
    for (std::size_t row = 0; row < rows_of_step; ++row, scale *= share)
      for (std::size_t i = 0; i < n_; ++i) track_.coefficients_.push_back(rows_[row * n_ + i] * scale);
    track_.stiff_steps_ += is_stiff_ ? 1 : 0;
    step_.t = event_at_ || !last ? step_.t + share * step_.h : t1_;
    track_.t_.push_back(step_.t);
    std::swap(step_.y, step_.y1);
    std::swap(step_.dydt, step_.dydt1);
    stiff_.moved();
  }

  /// Is the step held by stability, or does the other method serve better? Asked every 25 steps; a clear answer twice
  /// running, or a weak one eight times, goes over.
  void weigh_methods() {
    if (++since_weighed_ < 25) return;
    since_weighed_ = 0;
    const double h_lambda = step_.h * decay();
    const int vote = is_stiff_ ? (h_lambda < 0.1 ? 4 : 0) : h_lambda > 0.7 ? 4 : h_lambda > 0.3 ? 1 : 0;
    votes_ = vote > 0 ? votes_ + vote : 0;
    if (votes_ < needed_) return;
    if (is_stiff_) needed_ *= 2;  // to and fro costs more each time
    is_stiff_ = !is_stiff_;
    stiff_.forget();
    votes_ = 0;
  }

  double decay() {
    if (is_stiff_) return fastest_decay(stiff_.jacobian(), n_);
    if (jacobian_ != nullptr)
      (*jacobian_)(step_.t, step_.y, J_);
    else
      difference_jacobian(f_, step_.t, step_.y, step_.dydt, step_.h, noise_, J_);
    return fastest_decay(J_, n_);
  }

  CountedRhs f_;
  double t1_, span_ = 0;
  std::size_t n_;
  const MarchOptions& options_;
  std::span<const Event> events_;
  const Jacobian* jacobian_;
  Tolerance tol_;
  ExplicitStepper explicit_;
  RadauStepper stiff_;
  State noise_, rows_, place_, J_, level_;
  std::optional<double> event_at_;
  Step step_;
  Track track_;
  double next_h_ = 0, grow_ = 5;
  bool is_stiff_ = false;
  int since_weighed_ = 0, votes_ = 0, needed_ = 8;
};

Outcome<Track> march(Rhs f, std::span<const double> y0, double t0, double t1, const MarchOptions& options,
                     std::span<const Event> events, const Jacobian* jacobian) {
  VATWRIGHT_EXPECTS(t1 >= t0);
  return Marcher(f, y0, t0, t1, options, events, jacobian).run();
}

}  // namespace vatwright
