#include "line.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

#include "vatwright/numeric/root.hpp"
#include "vatwright/rating/rating.hpp"
#include "vatwright/vessel/pressure_drop.hpp"
#include "vatwright/vessel/rate_line.hpp"

namespace vatwright {
namespace {

constexpr double same_rate = 1e-12;

double normalised(RateLine& line, double z, double s) {
  const double L = line.length();
  return line.rate(z * L, s * L) / L;
}

/// How many times larger the rate of a line is than a track's, where that is the same everywhere.
std::optional<double> ratio(RateLine& line, const RateTrack& track, const std::vector<double>& places) {
  std::optional<double> factor;
  for (const double z : places) {
    const double here = normalised(line, z, 1 - z) / track.rate(z).value;
    if (!factor) factor = here;
    if (!(std::abs(here / *factor - 1) <= 1e3 * same_rate)) return std::nullopt;
  }
  return factor;
}

/// z R' < R: (z - z_in)/R rises for every z_in, a tank has one state alone.
bool one_state(const RateTrack& track) {
  return std::ranges::all_of(track.places(), [&](double z) {
    const RateTrack::Rate r = track.rate(z);
    return z * r.slope < r.value || z > RateTrack::last();
  });
}

/// 1/R convex and rising: then (z - z_in)/R is both for every z_in.
bool slowness_convex(const RateTrack& track) {
  return std::ranges::all_of(track.places(), [&](double z) {
    if (z <= 0 || z >= RateTrack::last()) return true;
    const RateTrack::Rate r = track.rate(z);
    const double near = std::min(z, 1 - z), rounding = 1e-6 * r.value * r.value / (near * near);
    return 2 * r.slope * r.slope >= r.value * track.curvature(z) - rounding;
  });
}

/// The flow at which a liquid loses just the pressure that a tube may cost; absent: it may cost any, or none is known.
std::optional<double> flow_at_pressure_drop(const Vessel& v, const Feed& feed) {
  if (!v.pressure_drop_Pa || feed.phase != Phase::liquid || !feed.viscosity_Pa_s || !feed.density_kg_m3)
    return std::nullopt;
  const auto over = [&](double ln_q) {
    const Flow flow{std::exp(ln_q) * *feed.density_kg_m3, *feed.density_kg_m3, *feed.viscosity_Pa_s};
    return pressure_gradient(v.kind, flow) * length_of(v.kind) - *v.pressure_drop_Pa;
  };
  const double lo = std::log(1e-12), hi = std::log(1e6);
  if (!(over(lo) < 0 && over(hi) > 0)) return std::nullopt;
  const auto root = find_root(over, lo, hi, {.rel_tol = 0, .abs_tol = 1e-12});
  return answer(root) ? std::optional(std::exp(*answer(root))) : std::nullopt;
}

}  // namespace

std::optional<Line> Line::find(const Problem& problem, const std::vector<int>& offered, std::string& why) {
  const Duty& duty = problem.duty;
  Line line;
  std::optional<double> length;
  std::optional<Thermal> thermal;
  bool off_line = false, from_feed = false;
  for (const int v : offered) {
    const Vessel& vessel = problem.site.vessels[static_cast<std::size_t>(v)];
    const Operation operation = operation_of(problem, vessel);
    Stream arrives = whole_feed(duty);
    auto found = RateLine::find(vessel, duty.chemistry, operation, duty.start, arrives);
    line.vessels_.emplace_back();
    if (std::holds_alternative<NoAnswer>(found)) continue;
    if (const auto* none = std::get_if<RateLine::NoLine>(&found)) {
      why = vessel.tag + ": " + none->why;
      return std::nullopt;
    }
    RateLine& rates = std::get<RateLine>(found);
    if (thermal && *thermal != operation.thermal) {
      why = "some vessels are held and some are not";
      return std::nullopt;
    }
    thermal = operation.thermal;
    if (length && std::abs(*length - rates.length()) > same_rate * *length) {
      why = "the reaction ends at another conversion in every vessel";
      return std::nullopt;
    }
    length = rates.length();
    if (rates.is_tank()) {
      off_line = off_line || rates.starts_at() == RateLine::StartsAt::off_the_line;
      from_feed = from_feed || rates.starts_at() == RateLine::StartsAt::feed;
      line.from_end_ = line.from_end_ || rates.starts_at() == RateLine::StartsAt::end;
    }
    constexpr double any = std::numeric_limits<double>::infinity();
    OnLine on{nullptr, 0, rates.is_tank(),
              std::min(vessel.feed_line_m3_s.value_or(any),
                       flow_at_pressure_drop(vessel, duty.chemistry.feed).value_or(any))};
    static const std::vector<double> looked_at = {0, 0.05, 0.2, 0.4, 0.6, 0.8, 0.95, 0.999};
    for (const auto& track : line.tracks_)
      if (const auto factor = ratio(rates, *track, looked_at)) {
        on.track = track.get();
        on.volume_m3 = rates.volume_m3() * *factor;
        break;
      }
    if (on.track == nullptr) {
      auto track = RateTrack::make([&](double z, double s) { return normalised(rates, z, s); }, rates.rounding());
      if (!track) {
        why = vessel.tag + ": the rate is too rough along its way";
        return std::nullopt;
      }
      line.tracks_.push_back(std::make_shared<const RateTrack>(std::move(*track)));
      on.track = line.tracks_.back().get();
      on.volume_m3 = rates.volume_m3();
    }
    line.vessels_.back() = on;
  }
  if (!length) {
    why = "no vessel can be calculated";
    return std::nullopt;
  }
  const auto all = [&](auto holds) {
    return std::ranges::all_of(line.tracks_, [&](const auto& track) { return holds(*track); });
  };
  if ((off_line || (from_feed && line.from_end_)) && !all(one_state)) {
    why = "tanks may have several steady states, and the start decides by more than the conversion";
    return std::nullopt;
  }
  const double end = *length;
  line.extent_ = end;
  line.X_end_ = duty.chemistry.kinetics.conversion({&end, 1});
  if (!(line.X_end_ > 0)) {
    why = "conversion does not rise along the reaction";
    return std::nullopt;
  }
  line.falls_ = all([](const RateTrack& track) { return track.falls(); });
  line.tanks_concave_ = line.falls_ && all(slowness_convex);
  return line;
}

Line Line::without_caps() const {
  Line wide = *this;
  for (auto& vessel : wide.vessels_)
    if (vessel) vessel->cap_m3_s = std::numeric_limits<double>::infinity();
  return wide;
}

Line::Out Line::out(const OnLine& vessel, double z_in, double feed_m3_s) const {
  const double tau = vessel.volume_m3 / feed_m3_s;
  const RateTrack& track = *vessel.track;
  if (z_in >= RateTrack::last()) return {z_in, 1, 0};
  if (vessel.is_tank) {
    const double z = from_end_ ? track.last_state(z_in, tau) : track.first_state(z_in, tau);
    const RateTrack::Rate r = track.rate(z);
    const double dz_in = z >= 1 ? 0 : 1 / (1 - tau * r.slope);
    return {z, dz_in, -tau / feed_m3_s * r.value * dz_in};
  }
  const double z = track.reached(track.time(z_in) + tau);
  const double R = track.rate(z).value;
  return {z, R / track.rate(z_in).value, -tau / feed_m3_s * R};
}

int Line::bends(const OnLine& vessel, double z_in, double z_lo, double z_hi) const {
  const RateTrack& track = *vessel.track;
  if (z_hi >= RateTrack::last() && !falls_) return 0;
  if (!vessel.is_tank) return falls_ ? -1 : track.rises(z_lo, z_hi);
  if (tanks_concave_) return -1;
  int way = 0;
  for (const double share : {0.0, 0.25, 0.5, 0.75, 1.0}) {
    const double z = std::min(z_lo + share * (z_hi - z_lo), RateTrack::last());
    const RateTrack::Rate r = track.rate(z);
    const double d = z - z_in;
    if (!(r.value - d * r.slope > 0)) return 0;  // at a fold
    const double bend = d * (2 * r.slope * r.slope - r.value * track.curvature(z)) - 2 * r.value * r.slope;
    const int here = bend > 0 ? -1 : bend < 0 ? 1 : 0;
    if (here == 0 || (way != 0 && here != way)) return 0;
    way = here;
  }
  return way;
}

}  // namespace vatwright
