#pragma once
#include <memory>
#include <optional>
#include <string>
#include <vector>

#include "rate_track.hpp"
#include "vatwright/rating/duty.hpp"

namespace vatwright {

/// A duty of which every stream lies on one line, its conversion z along the one way from feed to end: one reaction,
/// all vessels held, or all adiabatic. What a vessel makes of z_in at a feed rate is then a map of two numbers.
class Line {
 public:
  /// One class of equal vessels on the line.
  struct OnLine {
    const RateTrack* track = nullptr;
    double volume_m3 = 0;  ///< times what its rate is larger than the track's
    bool is_tank = false;
    double cap_m3_s = 0;  ///< the most that may pass it: its feed line, its pressure drop; infinite: nothing limits it
  };
  /// The same with nothing in the way of any flow.
  [[nodiscard]] Line without_caps() const;
  /// What comes out, and how that moves with what comes in.
  struct Out {
    double z;
    double dz_in;  ///< d z/d z_in
    double dq;     ///< d z/d(feed rate)
  };

  /// offered: one vessel of every class. Absent, with `why` in words: this duty is no such line.
  static std::optional<Line> find(const Problem& problem, const std::vector<int>& offered, std::string& why);

  /// One per vessel offered; absent: it can not be calculated in this duty.
  [[nodiscard]] const std::vector<std::optional<OnLine>>& vessels() const { return vessels_; }
  [[nodiscard]] Out out(const OnLine& vessel, double z_in, double feed_m3_s) const;
  /// How z of a vessel bends with its space time while it comes from z_lo to z_hi: -1 concave, 1 convex, 0 neither or
  /// not sure. A tube: d2z/dt2 = R R'. A tank: the other way than (z - z_in)/R bends, looked at on five places.
  [[nodiscard]] int bends(const OnLine& vessel, double z_in, double z_lo, double z_hi) const;
  /// Conversion of conversion_of at a place of the line, and the place of a conversion.
  [[nodiscard]] double conversion(double z) const { return X_end_ * z; }
  /// mol per m3 of mixed feed.
  [[nodiscard]] double extent(double z) const { return extent_ * z; }
  [[nodiscard]] double place(double conversion) const { return conversion / X_end_; }

  /// Where the rates are no larger from any place on, in any vessel: 1/s, for a vessel of its own volume as OnLine
  /// tells it. See Bound.
  [[nodiscard]] const std::vector<std::shared_ptr<const RateTrack>>& tracks() const { return tracks_; }
  /// The rate never rises: tested on its track. All tracks.
  [[nodiscard]] bool falls() const { return falls_; }
  /// Outlets of tanks of one track are concave in their space time: (z - z_in)/R is convex and rises. All tracks.
  [[nodiscard]] bool tanks_concave() const { return tanks_concave_; }

 private:
  std::vector<std::shared_ptr<const RateTrack>> tracks_;
  std::vector<std::optional<OnLine>> vessels_;
  double X_end_ = 1, extent_ = 1;
  bool falls_ = false, tanks_concave_ = false;
  bool from_end_ = false;  // tanks start at the end of the way
};

}  // namespace vatwright
