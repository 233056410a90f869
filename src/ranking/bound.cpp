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
  // From the end backwards: M stays level below a peak until the rate before it is larger.
  const double end = RateTrack::last();
  if (track_->falls()) {
    stretches_.push_back({0, end, 0, track_->time(end), 0, true, 0});
  } else {
    std::vector<Stretch> backwards;
    double z = end;
    const auto& peaks = track_->peaks();
    std::size_t next = peaks.size();
    double level = track_->rate(end).value;
    while (z > 0) {
      // on the way down from z the rate follows M as long as it rises towards smaller z, down to the next peak
      if (next > 0 && peaks[next - 1] < z && track_->rate(peaks[next - 1]).value > level) {
        const double peak = peaks[--next];
        double start = z;  // where the falling side of the peak has come to the level
        if (track_->rate(z).value < level) {
          double lo = peak, hi = z;
          for (int i = 0; i < 60; ++i) (track_->rate((lo + hi) / 2).value > level ? lo : hi) = (lo + hi) / 2;
          start = (lo + hi) / 2;
        }
        if (start < z) backwards.push_back({start, z, 0, 0, level, false, 0});
        if (peak < start) backwards.push_back({peak, start, 0, 0, 0, true, 0});
        z = peak;
        level = track_->rate(peak).value;
      } else if (next > 0) {
        --next;
        if (peaks[next] >= z) continue;
      } else {
        backwards.push_back({0, z, 0, 0, level, false, 0});
        z = 0;
      }
    }
    double t = 0;
    for (auto s = backwards.rbegin(); s != backwards.rend(); ++s) {
      Stretch stretch = *s;
      stretch.t0 = t;
      stretch.track_t0 = track_->time(stretch.z0);
      t += stretch.follows ? track_->time(stretch.z1) - stretch.track_t0 : (stretch.z1 - stretch.z0) / stretch.level;
      stretch.t1 = t;
      stretches_.push_back(stretch);
    }
  }
  // A track of another shape counts with the most that its rate is above M anywhere.
  for (const auto& track : line.tracks()) {
    double most = 1;
    if (track.get() != track_) {
      most = 0;
      double above = 0;  // the largest from z on, backwards
      const auto places = track->places();
      for (std::size_t i = places.size(); i-- > 0;) {
        const double place = places[i];
        if (place >= end) continue;
        above = std::max(above, track->rate(place).value);
        const auto at = std::lower_bound(stretches_.begin(), stretches_.end(), place,
                                         [](const Stretch& s, double value) { return s.z1 < value; });
        const double M = at == stretches_.end() ? 0 : at->follows ? track_->rate(place).value : at->level;
        most = std::max(most, above / M);
      }
      most *= 1 + 1e-2;  // between the places looked at
    }
    scale_.push_back(most);
  }
  sharpen_ = line.falls() && line.tracks().size() == 1 && mean_premise(*track_);
}

double Bound::time(double z) const {
  if (z >= RateTrack::last()) return stretches_.back().t1;
  const auto at = std::lower_bound(stretches_.begin(), stretches_.end(), z,
                                   [](const Stretch& s, double value) { return s.z1 < value; });
  if (at->follows) return at->t0 + track_->time(z) - at->track_t0;
  return at->t0 + (z - at->z0) / at->level;
}

double Bound::reached(double t) const {
  if (t >= stretches_.back().t1) return 1;
  const auto at = std::lower_bound(stretches_.begin(), stretches_.end(), t,
                                   [](const Stretch& s, double value) { return s.t1 < value; });
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
