#pragma once
#include <vector>

#include "line.hpp"

namespace vatwright {

/// What no hookup of given vessels can exceed. With M(z) the largest rate from z on, over all vessels (each scaled to
/// the first track), and dz/dt = M: a stream that starts at z_in and meets space times that add to T ends at or below
///   phi(t(z_in) + T),   t(z) = integral of dz/M, phi its inverse
/// in series, by induction; in parallel because phi is concave (Jensen), for any split. A tank counts with
/// volume/feed, or, where rates fall and one premise holds (see tanks_sharpen), with the largest tube time that is
/// equivalent to it at any inlet.
class Bound {
 public:
  explicit Bound(const Line& line);

  [[nodiscard]] double time(double z) const;
  [[nodiscard]] double reached(double t) const;
  /// Space time times feed rate that a vessel counts with, m3, at one feed rate and inlets up to z_most.
  [[nodiscard]] double equivalent_m3(const Line::OnLine& vessel, double feed_m3_s, double z_most = 1) const;
  /// Tanks count with their tube equivalents: rates fall, are all of one shape, and R times the mean of 1/R over
  /// [x, z] falls with z (tested on the track).
  [[nodiscard]] bool tanks_sharpen() const { return sharpen_; }

 private:
  struct Stretch {  // M follows the track, or stays at `level`
    double z0 = 0, z1 = 0, t0 = 0, t1 = 0, level = 0;
    bool follows = false;
    double track_t0 = 0;
  };
  void add_majorant();
  [[nodiscard]] double most_above_majorant(const RateTrack& track) const;
  [[nodiscard]] const Stretch& stretch_at(double z) const;
  const Line& line_;
  const RateTrack* track_;
  std::vector<Stretch> stretches_;
  std::vector<double> scale_;  // per track
  bool sharpen_ = false;
};

}  // namespace vatwright
