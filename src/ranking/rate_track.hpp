#pragma once
#include <array>
#include <cstdint>
#include <functional>
#include <optional>
#include <vector>

namespace vatwright {

/// A rate over the conversion z = 0 .. 1 of its way, R(z) = dz/dt in 1/s, kept as polynomials of degree 8 on panels
/// that narrow towards both ends, so that a value costs a few nanoseconds: what tubes and tanks of any size do with it
/// at any feed rate. Relative error below 1e-10 at places between those it was made from.
class RateTrack {
 public:
  /// rate(z, s): at z with s = 1 - z, above zero inside. Absent: not finite, not above zero or too rough somewhere.
  ///   rounding: over s, the relative rounding of the rate near an end at equilibrium.
  static std::optional<RateTrack> make(const std::function<double(double z, double s)>& rate, double rounding = 0);

  struct Rate {
    double value = 0, slope = 0;  ///< R and dR/dz
  };
  [[nodiscard]] Rate rate(double z) const;
  /// d2R/dz2.
  [[nodiscard]] double curvature(double z) const;
  /// Space time of a tube from 0 to z, integral of dz/R; z <= last().
  [[nodiscard]] double time(double z) const;
  /// The same turned round: where a tube has come to after t; 1 beyond the end.
  [[nodiscard]] double reached(double t) const;

  /// Where a tank of space time tau fed at z_in stands: the first root of z - z_in = tau R(z) above z_in that it comes
  /// to from 0, or the last one below 1 that it comes to from there; 1 where the reaction outruns the feed to its end.
  /// NaN: not pinned down.
  [[nodiscard]] double first_state(double z_in, double tau) const;
  [[nodiscard]] double last_state(double z_in, double tau) const;

  /// The last place before the end that is told apart from it.
  static constexpr double last() { return 1 - 0x1p-40; }
  /// Places that show all of its shape: ends and middles of the panels, rising.
  [[nodiscard]] std::vector<double> places() const;
  /// Where R has local peaks, its ends included, rising.
  [[nodiscard]] const std::vector<double>& peaks() const { return peaks_; }
  /// 1: R rises all the way from z0 to z1, -1: it falls; 0: neither, or flat.
  [[nodiscard]] int rises(double z0, double z1) const;
  /// R never rises.
  [[nodiscard]] bool falls() const { return falls_; }

 private:
  static constexpr std::size_t degree = 8;
  using Series = std::array<double, degree + 1>;
  struct Panel {
    double middle = 0, half = 0, per_half = 0, t0 = 0;
    Series rate{}, slowness{};              // in w = (z - middle)/half
    std::array<double, degree> slope{};     // of the rate, by z
    std::array<double, degree + 2> time{};  // less t0, from w = -1
  };
  struct Bucket {
    std::size_t first = 0, pieces = 1;
    double z0 = 0, per_piece = 0;
  };
  struct Bend {  // a stretch on which R bends one way
    double z0 = 0, z1 = 0;
    bool convex = false;
    Rate at0, at1;
  };
  [[nodiscard]] const Panel& panel_at(double z) const;
  using Given = std::function<double(double, double)>;
  bool add_bucket(const Given& rate, double z0, double z1);
  bool add_panels(const Given& rate, double z0, double z1, std::size_t pieces);
  void index_times();
  void find_shape();
  [[nodiscard]] double root(double z_in, double tau, double lo, double hi) const;
  [[nodiscard]] double slope_equals(double slope, double lo, double hi) const;

  std::vector<Panel> panels_;
  std::vector<Bucket> buckets_;
  std::vector<std::size_t> panel_by_time_;  // the last that begins before a time, by its leading bits
  std::uint64_t first_time_bits_ = 0;
  std::vector<Bend> bends_;
  std::vector<double> peaks_;
  std::vector<std::pair<double, double>> turns_;  // R changes between rising and falling somewhere from .. to
  bool falls_ = false;
  double rounding_ = 0;
};

}  // namespace vatwright
