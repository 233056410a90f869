// The shape of a rate along its way, and the steady states of tanks that follow from it.
#include <algorithm>
#include <cmath>
#include <limits>

#include "rate_track.hpp"

namespace vatwright {
namespace {

constexpr double nan = std::numeric_limits<double>::quiet_NaN();

}  // namespace

/// Peaks and stretches of one bend, looked for at five places a panel.
void RateTrack::find_shape() {
  constexpr double flat = 1e-6;  // bending and rising below this share of the rate is rounding
  constexpr std::array<double, 5> places = {-1, -0.5, 0, 0.5, 1};
  falls_ = true;
  if (rate(0).slope <= 0) peaks_.push_back(0);
  int bending = 0, rising = 0;
  double before = 0;
  for (const Panel& p : panels_)
    for (const double w : places) {
      const double z = std::min(p.middle + p.half * w, last());
      if (rounding_ > 1e-9 * (1 - z)) continue;
      const Rate r = rate(z);
      const double nearest = std::max(p.half, std::min(z, 1 - z));
      const double bend = curvature(z) * nearest * nearest;
      const int up = std::abs(r.slope) * nearest <= flat * r.value ? 0 : r.slope > 0 ? 1 : -1;
      if (up > 0) falls_ = false;
      if (rising > 0 && up < 0) {
        double lo = before, hi = z;
        for (int i = 0; i < 60; ++i) (rate((lo + hi) / 2).slope > 0 ? lo : hi) = (lo + hi) / 2;
        peaks_.push_back((lo + hi) / 2);
      }
      if (up != 0 && rising != 0 && up != rising) turns_.emplace_back(before, z);
      if (up != 0) rising = up;
      const int way = std::abs(bend) <= flat * r.value ? 0 : bend > 0 ? 1 : -1;
      if (way != 0 && bending != 0 && way != bending) {
        double lo = before, hi = z;
        for (int i = 0; i < 60; ++i) ((curvature((lo + hi) / 2) > 0) == (bending > 0) ? lo : hi) = (lo + hi) / 2;
        bends_.push_back({bends_.empty() ? 0 : bends_.back().z1, (lo + hi) / 2, bending > 0, {}, {}});
      }
      if (way != 0) bending = way;
      before = z;
    }
  bends_.push_back({bends_.empty() ? 0 : bends_.back().z1, last(), bending > 0, {}, {}});
  for (Bend& bend : bends_) {
    bend.at0 = rate(bend.z0);
    bend.at1 = rate(bend.z1);
  }
  if (rising > 0) peaks_.push_back(last());
}

int RateTrack::rises(double z0, double z1) const {
  for (const auto& [from, to] : turns_)
    if (from < z1 && to > z0) return 0;
  const double slope = rate(std::min((z0 + z1) / 2, last())).slope;
  return slope > 0 ? 1 : slope < 0 ? -1 : 0;
}

/// z - z_in - tau R(z) changes its sign once in [lo, hi].
double RateTrack::root(double z_in, double tau, double lo, double hi) const {
  double z = lo;
  const auto F = [&](double x, double& slope) {
    const Rate r = rate(x);
    slope = 1 - tau * r.slope;
    return x - z_in - tau * r.value;
  };
  for (int i = 0; i < 200; ++i) {
    double slope = 0;
    const double f = F(z, slope);
    if (!std::isfinite(f)) return nan;
    (f > 0 ? hi : lo) = z;
    double next = z - f / slope;
    const bool newton = next >= lo && next <= hi;
    if (!newton) next = (lo + hi) / 2;
    const bool settled = newton && std::abs(next - z) <= std::max(1e-6 * std::min(next, 1 - next), 2e-16);
    z = next;
    if (settled || hi - lo <= 4e-16) return z;
  }
  return nan;
}

/// R' is monotone in [lo, hi] and passes `slope` there.
double RateTrack::slope_equals(double slope, double lo, double hi) const {
  const bool rises = rate(hi).slope > rate(lo).slope;
  for (int i = 0; i < 60; ++i) {
    const double middle = (lo + hi) / 2;
    ((rate(middle).slope < slope) == rises ? lo : hi) = middle;
  }
  return (lo + hi) / 2;
}

double RateTrack::first_state(double z_in, double tau) const {
  if (z_in >= last()) return std::max(z_in, last());
  const auto F = [&](double z, double R) { return z - z_in - tau * R; };
  for (const Bend& bend : bends_) {
    if (bend.z1 <= z_in) continue;
    const bool inside = z_in > bend.z0;
    const double a = inside ? z_in : bend.z0;
    const Rate at_a = inside ? rate(z_in) : bend.at0;
    if (F(bend.z1, bend.at1.value) >= 0) return root(z_in, tau, a, bend.z1);
    if (!bend.convex || !(tau * at_a.slope < 1 && tau * bend.at1.slope > 1)) continue;
    const double top = slope_equals(1 / tau, a, bend.z1);
    if (F(top, rate(top).value) >= 0) return root(z_in, tau, a, top);
  }
  return 1;
}

double RateTrack::last_state(double z_in, double tau) const {
  if (z_in >= last()) return std::max(z_in, last());
  const auto F = [&](double z, double R) { return z - z_in - tau * R; };
  if (F(bends_.back().z1, bends_.back().at1.value) < 0) return 1;
  for (auto bend = bends_.rbegin(); bend != bends_.rend(); ++bend) {
    const bool inside = z_in > bend->z0;
    const double a = inside ? z_in : bend->z0;
    const Rate at_a = inside ? rate(z_in) : bend->at0;
    if (F(a, at_a.value) < 0) return root(z_in, tau, a, bend->z1);
    if (bend->convex || !(tau * at_a.slope > 1 && tau * bend->at1.slope < 1)) continue;
    const double bottom = slope_equals(1 / tau, a, bend->z1);
    if (F(bottom, rate(bottom).value) < 0) return root(z_in, tau, bottom, bend->z1);
  }
  return nan;
}

}  // namespace vatwright
