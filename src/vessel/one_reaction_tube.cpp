#include <algorithm>
#include <cmath>

#include "tube_outcome.hpp"
#include "tube_track.hpp"
#include "vatwright/numeric/quadrature.hpp"
#include "vatwright/vessel/pressure_drop.hpp"

namespace vatwright {
namespace {

/// A tube or packed tube with one reaction whose rate does not feel the pressure drop: one track serves all feed rates.
class OneReactionTube final : public Solver {
 public:
  explicit OneReactionTube(const Setup& setup) : setup_(setup), path_(setup, {}) {
    if (path_.rate(path_.inlet(), 0) == 0) return;  // nothing happens, even where a seed would start it
    for (double sign : {1.0, -1.0})
      if (!track_)
        if (auto way = Way::find(path_, sign)) track_.emplace(*way);
  }

  Outcome<VesselOutcome> at(double feed_m3_s, Detail detail) override {
    if (path_.no_value() > 0) return cannot_tell("a rate has no finite value where a species that slows it is absent");
    const double t = setup_.volume_m3 / feed_m3_s;
    const double length = length_of(setup_.vessel.kind);
    const double loss =
        loss_per_length(setup_, feed_m3_s, setup_.arrives.xi_mol_m3, setup_.inlet_K, setup_.inlet_Pa).value_or(0);
    if (setup_.inlet_Pa - loss * length <= 0) return pressure_used_up(setup_.inlet_Pa / (loss * length), length);
    const TubeTrack::Reading out = read(t);
    if (track_ && track_->failed()) return unsolved("the rate is too rough along the tube to add up its volume");
    if (out.through && track_ && track_->way().kind() == EndKind::confined) return cannot_tell(track_->way().why());
    const auto stream_at = [&](double z) {
      const TubeTrack::Reading there = z == 1 ? out : read(z * t);
      const double xi = extent(there);
      return Stream{feed_m3_s, {xi}, path_.temperature(xi), setup_.inlet_Pa - loss * length * z};
    };
    const auto no_medium = [](double) { return 0.0; };
    VesselOutcome outcome = tell({setup_, feed_m3_s, stream_at, no_medium, end_place(t), path_.evaluator()}, detail);
    if (detail != Detail::map) outcome.residual = residual(out, t);
    return outcome;
  }

  std::optional<double> feed_at_conversion(double X) override {
    if (!track_) return std::nullopt;
    Way& way = track_->way();
    const double X_in = setup_.chemistry.kinetics.conversion(setup_.arrives.xi_mol_m3);
    const double xi_end = way.xi_end();
    const double X_end = setup_.chemistry.kinetics.conversion({&xi_end, 1});
    const double share = (X - X_in) / (X_end - X_in);
    if (!(share > 0 && share <= 1)) return std::nullopt;
    if (share == 1) {  // only what runs out inside gets there
      read(std::numeric_limits<double>::max());
      const auto end = track_->end_time();
      return end && way.kind() == EndKind::depleted && runs_out() ? std::optional(setup_.volume_m3 / *end)
                                                                  : std::nullopt;
    }
    const double s = (X_end - X) / (X_end - X_in) * way.length();
    const auto t = track_->time_to({share * way.length(), s});
    if (!t || !(*t > 0)) return std::nullopt;
    return setup_.volume_m3 / *t;
  }

  [[nodiscard]] long rate_calls() const override { return path_.calls(); }

 private:
  TubeTrack::Reading read(double t) {
    if (!track_) return {{0, 0}, false};
    return track_->read(t);
  }
  double extent(const TubeTrack::Reading& there) {
    if (!track_) return setup_.arrives.xi_mol_m3[0];
    return there.through ? track_->way().xi_end() : track_->way().xi(there.place.d, there.place.s);
  }
  /// Where a reactant runs out inside, as a fraction of the length.
  std::vector<double> end_place(double t) {
    if (!track_) return {};
    const auto end = track_->end_time();
    if (!end || *end >= t) return {};
    return {*end / t};
  }
  /// The rate just before the end is still so large that the end is reached in finite time.
  bool runs_out() {
    Way& way = track_->way();
    const double near = 1e-12, nearer = 1e-14, L = way.length();
    const double slow = near * L / way.rate(L, near * L), slower = nearer * L / way.rate(L, nearer * L);
    return slower < 0.99 * slow;
  }

  /// |integral of d xi/R - V/v|, as the extent that it is at the outlet, over the extents that come in and are made. By Gauss and Kronrod's
  /// rule in -ln(s), rates reckoned anew.
  double residual(const TubeTrack::Reading& out, double t) {
    if (!track_ || out.place.d <= 0) return 0;
    Way& way = track_->way();
    const double L = way.length(), u_end = out.through ? y_most : -std::log1p(-out.place.d / L);
    const double u_out = out.place.d <= out.place.s || out.through ? u_end : -std::log(out.place.s / L);
    const auto slowness = [&](double u) {
      const double s = L * std::exp(-u), d = -L * std::expm1(-u);
      return s / way.rate(d, s);
    };
    const bool cancels =
        way.kind() == EndKind::equilibrium;  // its rate loses digits as e^u, which the extent does not see
    const double u_sound = cancels ? std::clamp(30 - std::log(track_->cancels()), 0.0, u_out) : u_out;
    const std::vector<double> kinks = path_.kinks(way.sign());
    double total = 0, at = 0;
    while (at < u_sound) {
      double next = std::min(u_sound, at + 2);
      for (const double d : kinks)  // the rule expects a smooth rate on every piece
        if (const double u = d < L ? -std::log1p(-d / L) : u_sound; u > at) next = std::min(next, u);
      const double rel_tol = cancels ? std::clamp(1e-14 * track_->cancels() * std::exp(next), 1e-11, 0.1) : 1e-11;
      const auto piece = integrate(slowness, at, next, {.rel_tol = rel_tol, .abs_tol = 1e-12 * t});
      if (const auto* sum = answer(piece))
        total += sum->value;
      else
        return 1;
      at = next;
    }
    if (out.through || u_sound < u_out) return std::max(0.0, total - t) / t;  // the end was reached in less than V/v
    const double terms = out.place.d + std::abs(setup_.arrives.xi_mol_m3[0]);  // what came in, and what was made
    return std::abs(total - t) * way.rate(out.place.d, out.place.s) / terms;
  }

  const Setup& setup_;
  RatePath path_;
  std::optional<TubeTrack> track_;
};

}  // namespace

std::unique_ptr<Solver> make_one_reaction_tube(const Setup& setup) { return std::make_unique<OneReactionTube>(setup); }

}  // namespace vatwright
