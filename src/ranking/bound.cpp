#include "bound.hpp"

#include <algorithm>
#include <cmath>

namespace vatwright {
namespace {

constexpr int inlets = 32;  // looked at for the tube equivalent of a tank

/// R(z) times the mean of 1/R over [x, z] falls with z for every x: (R'/R)(d/dz integral ..) <= 0 at pairs of places.
bool mean_premise(const RateTrack& track) {
  const std::vector<double> all = track.places();
  std::vector<double> z;
  for (std::size_t i = 0; i < all.size(); i += 5)
    if (all[i] < RateTrack::last()) z.push_back(all[i]);
  for (std::size_t i = 0; i < z.size(); ++i)
    for (std::size_t j = i + 1; j < z.size(); ++j) {
      const double A = track.time(z[j]) - track.time(z[i]), d = z[j] - z[i];
      const RateTrack::Rate r = track.rate(z[j]);
      if (r.slope * A + 1 - r.value * A / d > 1e-9) return false;
    }
  return true;
}

}  // namespace

Bound::Bound(const Line& line) : line_(line), track_(line.tracks().front().get()) {
  add_majorant();
  for (const auto& track : line.tracks()) scale_.push_back(track.get() == track_ ? 1 : most_above_majorant(*track));
  sharpen_ = line.falls() && line.tracks().size() == 1 && mean_premise(*track_);
}

/// From the end backwards: M stays level below a peak until the rate before it is larger.
void Bound::add_majorant() {
  const RateTrack& R = *track_;
  std::vector<Stretch> backwards;
  double z = RateTrack::last(), level = R.rate(z).value;
  const auto& peaks = R.peaks();
  for (std::size_t next = peaks.size(); next-- > 0;) {
    const double peak = peaks[next];
    if (!(peak < z && R.rate(peak).value > level)) continue;
    double start = z;  // where the falling side of the peak has come to the level
    if (R.rate(z).value < level) {
      double lo = peak, hi = z;
      for (int i = 0; i < 60; ++i) (R.rate((lo + hi) / 2).value > level ? lo : hi) = (lo + hi) / 2;
      start = (lo + hi) / 2;
    }
    if (start < z) backwards.push_back({start, z, 0, 0, level, false, 0});
    if (peak < start) backwards.push_back({peak, start, 0, 0, 0, true, 0});
    z = peak;
    level = R.rate(peak).value;
  }
  if (z > 0) backwards.push_back({0, z, 0, 0, level, false, 0});
  double t = 0;
  for (auto s = backwards.rbegin(); s != backwards.rend(); ++s) {
    Stretch stretch = *s;
    stretch.t0 = t;
    stretch.track_t0 = R.time(stretch.z0);
    t += stretch.follows ? R.time(stretch.z1) - stretch.track_t0 : (stretch.z1 - stretch.z0) / stretch.level;
    stretch.t1 = t;
    stretches_.push_back(stretch);
  }
}

/// How many times larger than M the rate of a track is from any place on, at most.
double Bound::most_above_majorant(const RateTrack& track) const {
  constexpr double between_places = 1.01;
  double most = 0, above = 0;  // above: the largest from z on
  const auto places = track.places();
  for (auto z = places.rbegin(); z != places.rend(); ++z) {
    if (*z >= RateTrack::last()) continue;
    above = std::max(above, track.rate(*z).value);
    const Stretch& s = stretch_at(*z);
    most = std::max(most, above / (s.follows ? track_->rate(*z).value : s.level));
  }
  return most * between_places;
}

const Bound::Stretch& Bound::stretch_at(double z) const {
  const auto at = std::ranges::lower_bound(stretches_, z, {}, &Stretch::z1);
  return at == stretches_.end() ? stretches_.back() : *at;
}

double Bound::time(double z) const {
  if (z >= RateTrack::last()) return stretches_.back().t1;
  const Stretch& s = stretch_at(z);
  return s.t0 + (s.follows ? track_->time(z) - s.track_t0 : (z - s.z0) / s.level);
}

double Bound::reached(double t) const {
  if (t >= stretches_.back().t1) return 1;
  const auto at = std::ranges::lower_bound(stretches_, t, {}, &Stretch::t1);
  if (at->follows) return track_->reached(at->track_t0 + t - at->t0);
  return at->z0 + (t - at->t0) * at->level;
}

double Bound::equivalent_m3(const Line::OnLine& vessel, double feed_m3_s, double z_most) const {
  std::size_t which = 0;
  while (line_.tracks()[which].get() != vessel.track) ++which;
  const double volume = vessel.volume_m3 * scale_[which];
  if (!vessel.is_tank || !sharpen_) return volume;
  double most = 0, step = 0, before = 0;
  for (int i = 0; i <= inlets; ++i) {
    const double y = std::min(z_most, RateTrack::last()) * i / inlets;
    const double z = line_.out(vessel, y, feed_m3_s).z;
    const double worth = track_->time(z) - track_->time(y);
    if (!std::isfinite(worth)) return volume;
    if (i > 0) step = std::max(step, std::abs(worth - before));
    before = worth;
    most = std::max(most, worth);
  }
  return std::min(volume, (most + step / 2) * feed_m3_s);
}

}  // namespace vatwright
