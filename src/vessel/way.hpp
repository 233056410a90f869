#pragma once
#include <optional>

#include "rate_path.hpp"

namespace vatwright {

/// The way from the inlet in the direction that the reaction goes: from the inlet to the first zero of the rate, to
/// depletion, or to where the model ends. A place on it is told by its distances from both ends, d + s = length, so
/// that neither loses digits.
class Way {
 public:
  /// nullopt: the rate does not go that way at all.
  static std::optional<Way> find(RatePath& path, double sign);

  [[nodiscard]] double length() const { return length_; }
  [[nodiscard]] double sign() const { return sign_; }
  [[nodiscard]] EndKind kind() const { return end_.kind; }
  [[nodiscard]] const std::string& why() const { return end_.why; }
  /// The rate along the way, > 0 inside.
  double rate(double d, double s) {
    return d <= s ? sign_ * path_->rate(path_->inlet(), sign_ * d) : sign_ * path_->rate(end_.end, -sign_ * s);
  }
  [[nodiscard]] double xi(double d, double s) const {
    return d <= s ? path_->inlet().xi + sign_ * d : end_.end.xi - sign_ * s;
  }
  [[nodiscard]] double xi_end() const { return end_.end.xi; }
  [[nodiscard]] const Anchor& end() const { return end_.end; }
  /// Distance of an extent from the inlet along the way; negative: behind it.
  [[nodiscard]] double distance(double xi) const { return sign_ * (xi - path_->inlet().xi); }
  RatePath& path() { return *path_; }

 private:
  Way(RatePath& path, double sign) : path_(&path), sign_(sign), end_(path.reach(sign)), length_(end_.distance) {}
  void end_at_first_zero();

  RatePath* path_;
  double sign_;
  RatePath::Reach end_;
  double length_;
};

/// A place by y = ln(d/s): d = L/(1 + e^-y), s = L/(1 + e^y).
struct Place {
  double d = 0, s = 0;
};
Place place_at(double y, double length);
/// From here on the nearer end is the place itself, to rounding.
inline constexpr double y_most = 36.8;
/// Rising places y from -y_most to y_most, dense in the middle and at equal ratios in the tails.
const std::vector<double>& graded_places();
/// The same as places on a way of length 1.
const std::vector<Place>& graded_shares();

}  // namespace vatwright
