#include "tank_curve.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

#include "vatwright/numeric/root.hpp"

namespace vatwright {

TankCurve::TankCurve(Way way) : way_(std::move(way)) {
  if (way_.path().falls()) {  // h rises all the way: nothing to look for
    y_ = {-y_most, y_most};
    f_ = {log_time(y_[0]), log_time(y_[1])};
    return;
  }
  sample();
  refine_extrema();
}

double TankCurve::log_time(double y) { return log_time(place_at(y, way_.length())); }

double TankCurve::log_time(Place p) {
  const double rate = way_.rate(p.d, p.s);
  return rate > 0 ? std::log(p.d / rate) : std::numeric_limits<double>::infinity();
}

void TankCurve::sample() {
  y_ = graded_places();
  f_.reserve(y_.size() + 8);
  const double L = way_.length();
  for (const Place& share : graded_shares()) f_.push_back(log_time(Place{L * share.d, L * share.s}));
  for (double d : way_.path().kinks(way_.sign())) {
    if (!(d < L)) continue;
    const double y = std::log(d / (L - d));
    const auto at = std::ranges::upper_bound(y_, y) - y_.begin();
    y_.insert(y_.begin() + at, y);
    f_.insert(f_.begin() + at, log_time(y));
  }
  // equilibrium: the last samples are rounding of the rate
  while (y_.size() > 2 && way_.kind() == EndKind::equilibrium && y_[y_.size() - 2] > 28) {
    y_.pop_back();
    f_.pop_back();
  }
  // A pair of extrema may hide in one interval: where the slope is least there, look closer.
  for (std::size_t i = f_.size() - 2; i >= 2; --i) look_closer(i);
}

void TankCurve::look_closer(std::size_t i) {
  const auto slope = [&](std::size_t k) { return (f_[k + 1] - f_[k]) / (y_[k + 1] - y_[k]); };
  const double before = slope(i - 2), here = slope(i - 1), after = slope(i);
  const bool all_rise = before > 0 && here > 0 && after > 0, all_fall = before < 0 && here < 0 && after < 0;
  const bool least = std::abs(here) <= std::abs(before) && std::abs(here) <= std::abs(after);
  if (!(all_rise || all_fall) || !least || std::abs(here) > 0.2) return;
  constexpr int parts = 8;
  std::vector<double> y, f;
  for (int k = 1; k < parts; ++k) {
    y.push_back(y_[i - 1] + (y_[i] - y_[i - 1]) * k / parts);
    f.push_back(log_time(y.back()));
  }
  const auto place = static_cast<std::ptrdiff_t>(i);
  y_.insert(y_.begin() + place, y.begin(), y.end());
  f_.insert(f_.begin() + place, f.begin(), f.end());
}

void TankCurve::refine_extrema() {
  std::vector<std::pair<double, double>> found;
  const double noise = 1e-13;
  for (std::size_t i = 1; i + 1 < f_.size(); ++i) {
    const double up = f_[i] - f_[i - 1], down = f_[i] - f_[i + 1];
    const double sign = up > noise && down > -noise ? 1 : up < -noise && down < noise ? -1 : 0;
    if (sign == 0 || !std::isfinite(f_[i - 1]) || !std::isfinite(f_[i + 1])) continue;
    const Peak peak = find_peak([&](double y) { return sign * log_time(y); }, y_[i - 1], y_[i + 1], 1e-7);
    found.emplace_back(peak.at, sign * peak.value);
  }
  for (const auto& [y, f] : found) {
    fold_y_.push_back(y);
    const auto at = std::ranges::lower_bound(y_, y);
    const auto index = at - y_.begin();
    if (at != y_.end() && *at == y) continue;
    y_.insert(at, y);
    f_.insert(f_.begin() + index, f);
  }
}

std::vector<TankCurve::Fold> TankCurve::folds() const {
  std::vector<Fold> all;
  for (double y : fold_y_) {
    const auto at = std::ranges::lower_bound(y_, y);
    all.push_back({place_at(y, way_.length()).d, std::exp(f_[static_cast<std::size_t>(at - y_.begin())])});
  }
  return all;
}

/// Where ln h passes log_tau between two samples: inverse quadratic steps where they are safe, else halves (T. R.
/// Chandrupatla, Adv. Eng. Software 28 (1997) 145, from memory).
bool TankCurve::add_state(std::size_t i, double log_tau, Answer& answer) {
  double a = y_[i + 1], b = y_[i], c = a;
  double fa = std::min(f_[i + 1] - log_tau, 1e6), fb = std::min(f_[i] - log_tau, 1e6), fc = fa;
  const double close = 4e-16 * std::max(1.0, std::abs(log_tau));
  for (int calls = 0; calls < 200; ++calls) {
    const double best = std::abs(fa) < std::abs(fb) ? a : b;
    const double room = 2e-16 * std::max(1.0, std::abs(best));
    if (std::min(std::abs(fa), std::abs(fb)) <= close || std::abs(b - a) <= 2 * room) {
      answer.states.push_back({place_at(best, way_.length()), f_[i + 1] > f_[i], false});
      return true;
    }
    double share = 0.5;
    if (calls > 0) {
      const double x = (a - b) / (c - b), q = (fa - fb) / (fc - fb);
      if (q * q < x && (1 - q) * (1 - q) < 1 - x)
        share = fa / (fb - fa) * fc / (fb - fc) + (c - a) / (b - a) * fa / (fc - fa) * fb / (fc - fb);
    } else {
      share = fa / (fa - fb);
    }
    const double least = room / std::abs(b - a);
    share = std::clamp(share, least, 1 - least);
    const double y = a + share * (b - a);
    const double f = std::min(log_time(y) - log_tau, 1e6);
    if (std::isnan(f)) return false;
    if ((f > 0) == (fa > 0)) {
      c = a;
      fc = fa;
    } else {
      c = b;
      fc = fb;
      b = a;
      fb = fa;
    }
    a = y;
    fa = f;
  }
  return false;
}

TankCurve::Answer TankCurve::states(double tau) {
  Answer answer;
  const double log_tau = std::log(tau);
  if (log_tau < f_.front()) {  // next to the inlet: d = tau R(inlet)
    const double d = tau * way_.rate(0, way_.length());
    if (d > 0) answer.states.push_back({{d, way_.length() - d}, true, false});
  }
  for (std::size_t i = 0; i + 1 < f_.size(); ++i) {
    const bool between = (f_[i] <= log_tau && log_tau < f_[i + 1]) || (f_[i + 1] < log_tau && log_tau <= f_[i]);
    if (between && !add_state(i, log_tau, answer)) answer.failed = true;
  }
  if (log_tau >= f_.back()) {
    if (way_.kind() == EndKind::confined)
      answer.confined_hit = true;
    else
      answer.states.push_back({{way_.length(), 0}, true, true});
  }
  return answer;
}

}  // namespace vatwright
