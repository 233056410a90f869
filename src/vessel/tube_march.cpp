#include "tube_march.hpp"

#include <algorithm>
#include <cmath>

#include "vatwright/numeric/matrix.hpp"

namespace vatwright {

void TubeMarch::go_to(double s) {
  int turns = 0;
  while (s_ < s && !failed_ && !used_up_ && medium_left_ == 0) {
    if (++turns > 200) {
      failed_ = unsolved("species run out and come back without end along the tube");
      return;
    }
    step_to(s);
  }
}

double TubeMarch::time_scale() {
  Rates dy(balance_.size());
  balance_(start_, dy);
  const auto scale = balance_.scale();
  double fastest = 0;
  for (std::size_t i = 0; i < dy.size(); ++i) fastest = std::max(fastest, std::abs(dy[i]) / scale[i]);
  return fastest > 0 && std::isfinite(fastest) ? 1 / fastest : 1;
}

void TubeMarch::read(double s, std::span<double> y) const {
  if (stretches_.empty()) {
    std::ranges::copy(y_, y.begin());
    return;
  }
  auto at = std::ranges::lower_bound(stretches_, s, {}, [](const Stretch& one) { return one.track.end(); });
  if (at == stretches_.end()) --at;
  at->track.read(std::clamp(s, at->track.begin(), at->track.end()), y);
}

/// The slip of one step from a to b (which may lie inside it), as the shift that closes it.
TubeMarch::Rates TubeMarch::slip_of(const Stretch& stretch, double a, double b) {
  balance_.set_exhausted(stretch.exhausted);
  Rates slip(balance_.size()), from(balance_.size()), to(balance_.size());
  add_integral(stretch.track, a, b, gauss(stretch.track, a, b), 14, slip);
  stretch.track.read(a, from);
  stretch.track.read(b, to);
  for (std::size_t i = 0; i < slip.size(); ++i) slip[i] = to[i] - from[i] - slip[i];
  close_by_shift(to, b - a, slip);
  return slip;
}

/// The sum of all slips up to s. Those of whole steps are kept: one march serves many readings.
TubeMarch::Rates TubeMarch::slips(double s) {
  const auto kept = balance_.exhausted();
  for (; checked_.stretch < stretches_.size(); ++checked_.stretch, checked_.step = 0) {
    const Stretch& stretch = stretches_[checked_.stretch];
    const auto& nodes = stretch.track.nodes();
    for (; checked_.step + 1 < nodes.size() && nodes[checked_.step + 1] <= s; ++checked_.step) {
      Rates total = slip_of(stretch, nodes[checked_.step], nodes[checked_.step + 1]);
      if (!sums_.empty())
        for (std::size_t i = 0; i < total.size(); ++i) total[i] += sums_.back().total[i];
      sums_.push_back({nodes[checked_.step + 1], std::move(total)});
    }
    if (checked_.step + 1 < nodes.size()) break;
  }
  const auto after = std::ranges::upper_bound(sums_, s, {}, &Sum::end);
  Rates total = after == sums_.begin() ? Rates(balance_.size()) : std::prev(after)->total;
  const double whole = after == sums_.begin() ? 0 : std::prev(after)->end;
  for (const Stretch& stretch : stretches_)
    if (s > whole && stretch.track.begin() <= whole && whole < stretch.track.end()) {
      const Rates rest = slip_of(stretch, whole, s);
      for (std::size_t i = 0; i < total.size(); ++i) total[i] += rest[i];
    }
  balance_.set_exhausted(kept);
  return total;
}

double TubeMarch::residual(double s) {
  const std::size_t R = balance_.extents(), rows = balance_.size() - (balance_.with_pressure() ? 1 : 0);
  const Rates total = slips(s);
  Rates to(balance_.size());
  read(s, to);
  double worst = 0, terms = balance_.scale()[0];  // of what is fed
  for (std::size_t j = 0; j < R; ++j) {
    worst = std::max(worst, std::abs(total[j]));
    terms = std::max(terms, std::abs(start_[j]) + std::abs(to[j]) + std::abs(to[j] - start_[j]));
  }
  worst /= terms;
  for (std::size_t j = R; j < rows; ++j) worst = std::max(worst, std::abs(total[j]) / (start_[j] + to[j]));
  return worst;
}

std::vector<double> TubeMarch::nodes() const {
  std::vector<double> all;
  for (const Stretch& stretch : stretches_)
    all.insert(all.end(), stretch.track.nodes().begin(), stretch.track.nodes().end());
  return all;
}

/// Five-point Gauss rule on [a, b], every component at once.
TubeMarch::Rates TubeMarch::gauss(const Track& track, double a, double b) {
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
void TubeMarch::add_integral(const Track& track, double a, double b, const Rates& whole, int depth, Rates& sum) {
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

void TubeMarch::close_by_shift(const Rates& y, double h, Rates& slip) {
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
std::vector<bool> TubeMarch::still_exhausted() {
  std::vector<bool> exhausted = balance_.exhausted();
  for (std::size_t i : balance_.can_run_out())
    if (exhausted[i] && balance_.wanting(i, y_) < 0) exhausted[i] = false;
  balance_.set_exhausted(exhausted);
  return exhausted;
}

void TubeMarch::step_to(double s) {
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
  const auto pressure = [&](double, std::span<const double> y) {
    return balance_.pressure_left(y) - TubeBalance::no_pressure;
  };
  const auto hotter = [&](double, std::span<const double> y) { return medium_range_->second - balance_.medium(y); };
  const auto colder = [&](double, std::span<const double> y) { return balance_.medium(y) - medium_range_->first; };
  std::vector<Event> events;
  for (Watch& watch : watches) events.emplace_back(watch);
  if (balance_.with_pressure()) events.emplace_back(pressure);
  if (medium_range_) {
    events.emplace_back(hotter);
    events.emplace_back(colder);
  }

  const auto scale = balance_.scale();
  const double rel_tol = accuracy_ == Accuracy::rough ? 1e-6 : balance_.setup().is_held ? 1e-11 : 1e-10;
  const MarchOptions options{
      .rel_tol = rel_tol, .abs_tol = 0.01 * rel_tol, .scale = scale, .first_step = step_, .starts_stiff = stiff_};
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
  step_ = 0;
  stiff_ = made.ended_stiff();
  const auto& nodes = made.nodes();
  for (std::size_t k = nodes.size(); k-- > 1 && k + 3 > nodes.size();) step_ = std::max(step_, nodes[k] - nodes[k - 1]);
  if (made.ended_by()) ended_by(static_cast<std::size_t>(*made.ended_by()), exhausted);
}

/// The events are what can run out, the pressure, the medium too hot, too cold.
void TubeMarch::ended_by(std::size_t event, const std::vector<bool>& exhausted) {
  const std::size_t watched = balance_.can_run_out().size(), pressure = balance_.with_pressure() ? 1 : 0;
  if (event >= watched + pressure) {
    medium_left_ = event == watched + pressure ? 1 : -1;
    return;
  }
  if (event >= watched) {
    used_up_ = true;
    return;
  }
  const std::size_t species = balance_.can_run_out()[event];
  auto next = exhausted;
  next[species] = !exhausted[species];
  if (!exhausted[species]) balance_.finish(species, y_);
  balance_.set_exhausted(std::move(next));
}

}  // namespace vatwright
