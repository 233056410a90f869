#pragma once
#include <memory>
#include <optional>
#include <string>

#include "bound.hpp"
#include "known_shares.hpp"
#include "order.hpp"
#include "target_on_line.hpp"

namespace vatwright {

/// A duty to be ranked of which all streams lie on one line, with all that its search needs.
class OnOneLine {
 public:
  /// Null, with `why` in words: the duty is no such line, or what it is ordered by is not a matter of conversion alone.
  static std::unique_ptr<OnOneLine> find(const Problem& problem, const std::vector<int>& offered,
                                         const RankOptions& options, std::string& why);

  [[nodiscard]] const Line& line() const { return line_; }
  [[nodiscard]] const Bound& bound() const { return bound_; }
  [[nodiscard]] const Twins& twins() const { return twins_; }
  /// By their place in the site.
  [[nodiscard]] const OnLines& vessels() const { return vessels_; }
  /// The classes of twins() that can be calculated.
  [[nodiscard]] const std::vector<std::size_t>& classes() const { return classes_; }
  /// z that the target asks; absent: it is not a place on the line (then nothing is ordered by ceilings).
  [[nodiscard]] std::optional<double> z_target() const { return z_target_; }
  /// Nothing reaches the target at any rate.
  [[nodiscard]] bool never_reached() const { return z_target_ && *z_target_ >= at_the_end; }

  [[nodiscard]] KnownShares shares_of(const Hookup& hookup) const;
  /// Absent: the target is never reached, or at any rate.
  [[nodiscard]] std::optional<double> ceiling_of(const Hookup& hookup) const;
  /// What is ordered by (conversion, yield, or the ceiling itself) of a value on the line, and the other way round.
  [[nodiscard]] double figure_at(By by, double value) const;
  [[nodiscard]] double place_of(By by, double figure) const;
  /// How far the values of these may be from what the models say, in what is ordered by: what maps and splits miss.
  ///   gap: of splits that could not be brought within their tolerance, in z.
  [[nodiscard]] double within(By by, const std::vector<Entry>& entries, double gap = 0) const;

 private:
  OnOneLine(Line line, Twins twins, const Problem& problem);
  [[nodiscard]] bool on_the_line(const Hookup& hookup) const;
  Line line_;
  Bound bound_;
  Twins twins_;
  OnLines vessels_;
  std::vector<std::size_t> classes_;
  std::optional<double> z_target_;
  double yield_per_z_ = 0;
};

}  // namespace vatwright
