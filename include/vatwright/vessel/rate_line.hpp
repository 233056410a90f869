#pragma once
#include <memory>
#include <string>
#include <variant>

#include "vatwright/error/outcome.hpp"
#include "vatwright/vessel/run.hpp"

namespace vatwright {

/// The rate of the one reaction of a duty over its extent, from the mixed feed to where it ends, as one vessel runs it:
/// held, or adiabatic without agitator. Every stream of a hookup lies on this line, however it was split and mixed.
///   d, s: distances from the feed and from the end, d + s = length(), mol per m3 of mixed feed; both, so that neither
///   loses digits.
class RateLine {
 public:
  /// Why there is none: the rate is no function of the extent alone, or the reaction does not start or ends where a
  /// table of rates ends.
  struct NoLine {
    std::string why;
  };
  /// The problem's data outlive it. arrives: the mixed feed as it comes to a first vessel.
  /// NoAnswer: the vessel can not be calculated at all in this duty, with the reason.
  static std::variant<RateLine, NoLine, NoAnswer> find(const Vessel& vessel, const Chemistry& chemistry,
                                                       const Operation& operation, const Start& start,
                                                       const Stream& arrives);
  ~RateLine();
  RateLine(RateLine&&) noexcept;
  RateLine& operator=(RateLine&&) noexcept;

  [[nodiscard]] double length() const;
  /// Depleted, or at equilibrium.
  [[nodiscard]] bool ends_depleted() const;
  /// R = capacity r(d), mol per m3 of volume_m3() per s, > 0 inside.
  double rate(double d, double s);
  /// Times d + s over s, the relative rounding of the rate: near equilibrium it is the difference of two; 0: full
  /// digits everywhere.
  [[nodiscard]] double rounding() const;
  /// That the rate counts on: working fluid, inside of tubes, bed.
  [[nodiscard]] double volume_m3() const;
  [[nodiscard]] bool is_tank() const;
  /// Where on the line a tank stands before it is fed: the state that it then reaches is the first one from there on.
  enum class StartsAt { feed, end, off_the_line };
  [[nodiscard]] StartsAt starts_at() const;

 private:
  struct Model;
  explicit RateLine(std::unique_ptr<Model> model);
  std::unique_ptr<Model> model_;
};

}  // namespace vatwright
