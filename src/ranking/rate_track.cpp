#include "rate_track.hpp"

#include <algorithm>
#include <bit>
#include <cmath>
#include <numbers>

namespace vatwright {
namespace {

constexpr int octaves = 40;              // 2^-40 from either end the rest is one panel
constexpr std::uint64_t per_octave = 4;  // buckets, read off the leading bits
constexpr std::size_t per_half = 1 + (octaves - 1) * per_octave;
constexpr std::size_t most_pieces = 64;
constexpr double fits_within = 1e-11;

/// Four buckets to an octave: the exponent and two bits after it.
std::uint64_t leading_bits(double x) { return std::bit_cast<std::uint64_t>(x) >> 50; }
const std::uint64_t bits_of_nearest = leading_bits(std::ldexp(1.0, -octaves));

/// From either end, for z below or above a half.
std::size_t bucket_from_end(double distance) {
  const std::uint64_t bits = leading_bits(distance);
  if (distance <= 0 || bits < bits_of_nearest) return 0;
  return std::min<std::size_t>(per_half - 1, 1 + static_cast<std::size_t>(bits - bits_of_nearest));
}

double lower_edge(std::size_t bucket) {  // of bucket_from_end
  if (bucket == 0) return 0;
  const std::size_t i = bucket - 1;
  return std::ldexp(1 + static_cast<double>(i % per_octave) / per_octave, static_cast<int>(i / per_octave) - octaves);
}

/// Values at the Chebyshev places of [-1, 1] to the coefficients of w^k.
template <std::size_t n>
struct Interpolation {
  std::array<double, n> place{};
  std::array<std::array<double, n>, n> to_powers{};  // [k][place]
  Interpolation() {
    for (std::size_t j = 0; j < n; ++j)
      place[j] = -std::cos(std::numbers::pi * (2 * static_cast<double>(j) + 1) / (2.0 * n));
    for (std::size_t j = 0; j < n; ++j) {  // the polynomial that is 1 at place j and 0 at the others
      std::array<long double, n> product{};
      product[0] = 1;
      std::size_t order = 0;
      for (std::size_t m = 0; m < n; ++m) {
        if (m == j) continue;
        const long double over = static_cast<long double>(place[j]) - place[m];
        ++order;
        for (std::size_t k = order + 1; k-- > 0;)
          product[k] = ((k > 0 ? product[k - 1] : 0) - place[m] * product[k]) / over;
      }
      for (std::size_t k = 0; k < n; ++k) to_powers[k][j] = static_cast<double>(product[k]);
    }
  }
};

template <std::size_t n>
double horner(const std::array<double, n>& a, double w) {
  double sum = a[n - 1];
  for (std::size_t k = n - 1; k-- > 0;) sum = sum * w + a[k];
  return sum;
}

/// The same, even and odd powers apart: half as long a chain.
template <std::size_t n>
double even_and_odd(const std::array<double, n>& a, double w) {
  const double w2 = w * w;
  constexpr std::size_t top = n - 1;
  double one = a[top], other = a[top - 1];
  for (std::size_t k = top; k >= 2; k -= 2) {
    one = one * w2 + a[k - 2];
    if (k >= 3) other = other * w2 + a[k - 3];
  }
  return top % 2 == 0 ? one + w * other : other + w * one;
}

}  // namespace

bool RateTrack::add_panels(const Given& rate, double z0, double z1, std::size_t pieces) {
  static const Interpolation<degree + 1> nodes;
  const std::size_t before = panels_.size();
  for (std::size_t p = 0; p < pieces; ++p) {
    const double a = z0 + (z1 - z0) * static_cast<double>(p) / static_cast<double>(pieces);
    const double b = p + 1 == pieces ? z1 : z0 + (z1 - z0) * static_cast<double>(p + 1) / static_cast<double>(pieces);
    Panel panel;
    panel.middle = (a + b) / 2;
    panel.half = (b - a) / 2;
    const auto at = [&](double w) {
      const double z = panel.middle + panel.half * w;
      return rate(z, z < 0.5 ? 1 - z : (1 - panel.middle) - panel.half * w);
    };
    Series R{};
    for (std::size_t j = 0; j <= degree; ++j) {
      R[j] = at(nodes.place[j]);
      if (!(R[j] > 0) || !std::isfinite(R[j])) return false;
    }
    for (std::size_t k = 0; k <= degree; ++k)
      for (std::size_t j = 0; j <= degree; ++j) {
        panel.rate[k] += nodes.to_powers[k][j] * R[j];
        panel.slowness[k] += nodes.to_powers[k][j] / R[j];
      }
    for (const double w : {-1.0, -0.55, 0.25, 0.85, 1.0}) {
      const double exact = at(w);
      const bool at_end = b == 1 && w == 1;  // the rate itself may be zero there
      if (at_end) continue;
      const double within = fits_within + 10 * rounding_ / (1 - b + panel.half);
      if (!(std::abs(horner(panel.rate, w) - exact) <= within * exact) ||
          !(std::abs(horner(panel.slowness, w) * exact - 1) <= within)) {
        panels_.resize(before);
        return false;
      }
    }
    for (std::size_t k = 0; k <= degree; ++k)
      panel.time[k + 1] = panel.half * panel.slowness[k] / static_cast<double>(k + 1);
    panel.per_half = 1 / panel.half;
    for (std::size_t k = 0; k < degree; ++k)
      panel.slope[k] = panel.per_half * static_cast<double>(k + 1) * panel.rate[k + 1];
    panel.time[0] = -horner(panel.time, -1.0);
    panel.t0 = panels_.empty() ? 0 : panels_.back().t0 + horner(panels_.back().time, 1.0);
    panels_.push_back(panel);
  }
  return true;
}

bool RateTrack::add_bucket(const Given& rate, double z0, double z1) {
  for (std::size_t pieces = 1; pieces <= most_pieces; pieces *= 2) {
    const std::size_t first = panels_.size();
    if (!add_panels(rate, z0, z1, pieces)) {
      panels_.resize(first);
      continue;
    }
    buckets_.push_back({first, pieces, z0, static_cast<double>(pieces) / (z1 - z0)});
    return true;
  }
  return false;
}

std::optional<RateTrack> RateTrack::make(const Given& rate, double rounding) {
  RateTrack track;
  track.rounding_ = rounding;
  for (std::size_t i = 0; i < per_half; ++i)
    if (!track.add_bucket(rate, lower_edge(i), lower_edge(i + 1))) return std::nullopt;
  for (std::size_t i = per_half; i-- > 1;)
    if (!track.add_bucket(rate, 1 - lower_edge(i + 1), 1 - lower_edge(i))) return std::nullopt;
  track.index_times();
  track.find_shape();
  return track;
}

void RateTrack::index_times() {
  first_time_bits_ = leading_bits(panels_[1].t0);
  const std::uint64_t end = leading_bits(panels_.back().t0) + 1;
  std::size_t i = 0;
  for (std::uint64_t bits = first_time_bits_; bits <= end; ++bits) {
    const double t = std::bit_cast<double>(bits << 50);
    while (i + 1 < panels_.size() && panels_[i + 1].t0 <= t) ++i;
    panel_by_time_.push_back(i);
  }
}

const RateTrack::Panel& RateTrack::panel_at(double z) const {
  std::size_t i = 0;
  if (z < 0.5)
    i = bucket_from_end(z);
  else
    i = std::min(2 * per_half - 1 - bucket_from_end(1 - z), buckets_.size() - 1);
  const Bucket& bucket = buckets_[i];
  if (bucket.pieces == 1) return panels_[bucket.first];
  const double piece = (z - bucket.z0) * bucket.per_piece;
  const std::size_t p = piece > 0 ? std::min(static_cast<std::size_t>(piece), bucket.pieces - 1) : 0;
  return panels_[bucket.first + p];
}

RateTrack::Rate RateTrack::rate(double z) const {
  if (z > last()) return {0, rate(last()).slope};
  const Panel& p = panel_at(z);
  const double w = (z - p.middle) * p.per_half;
  return {even_and_odd(p.rate, w), even_and_odd(p.slope, w)};
}

double RateTrack::curvature(double z) const {
  const Panel& p = panel_at(std::min(z, last()));
  const double w = (std::min(z, last()) - p.middle) * p.per_half;
  double sum = 0;
  for (std::size_t k = degree; k >= 2; --k) sum = sum * w + static_cast<double>(k * (k - 1)) * p.rate[k];
  return sum / (p.half * p.half);
}

double RateTrack::time(double z) const {
  z = std::min(z, last());
  const Panel& p = panel_at(z);
  return p.t0 + even_and_odd(p.time, (z - p.middle) * p.per_half);
}

double RateTrack::reached(double t) const {
  std::size_t i = 0;
  if (const std::uint64_t bits = leading_bits(t); t > 0 && bits > first_time_bits_)
    i = panel_by_time_[std::min<std::size_t>(bits - first_time_bits_, panel_by_time_.size() - 1)];
  while (i + 1 < panels_.size() && panels_[i + 1].t0 <= t) ++i;
  const Panel& p = panels_[i];
  const double wanted = t - p.t0;
  double lo = -1, hi = 1, w = std::min(1.0, -1 + wanted * p.per_half / p.slowness[0]);
  for (int turn = 0; turn < 60; ++turn) {
    const double excess = even_and_odd(p.time, w) - wanted;
    (excess > 0 ? hi : lo) = w;
    double next = w - excess * p.per_half / even_and_odd(p.slowness, w);
    const bool newton = next >= lo && next <= hi;
    if (!newton) next = (lo + hi) / 2;
    const bool settled = newton && std::abs(next - w) <= 1e-6;  // its error is squared in each step
    w = next;
    if (settled || hi - lo < 1e-15) break;
  }
  if (i + 1 == panels_.size() && w >= 1 - 1e-12) return 1;
  return p.middle + p.half * w;
}

std::vector<double> RateTrack::places() const {
  std::vector<double> all = {0};
  for (const Panel& p : panels_) {
    all.push_back(p.middle);
    all.push_back(p.middle + p.half);
  }
  return all;
}

}  // namespace vatwright
