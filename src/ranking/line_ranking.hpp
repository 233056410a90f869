#pragma once
#include <memory>
#include <optional>

#include "bound.hpp"
#include "known_shares.hpp"
#include "ranked_set.hpp"
#include "rater.hpp"

namespace vatwright {

/// The ranking of a duty of which all streams lie on one line: searched with bounds, so that what is not rated is
/// proved to be no better. Values that are shown come from the full models.
class OnOneLine {
 public:
  /// Null: the duty is no such line, or what it is ordered by is not a matter of conversion alone.
  static std::unique_ptr<OnOneLine> find(const Problem& problem, const std::vector<int>& offered,
                                         const RankOptions& options);

  [[nodiscard]] const Twins& twins() const { return twins_; }
  [[nodiscard]] KnownShares shares_of(const Hookup& hookup) const;
  /// Absent: the target is never reached, or at any rate.
  [[nodiscard]] std::optional<double> ceiling_of(const Hookup& hookup) const;
  /// The best three with wide feed lines and of all vessels, where they beat the first that is shown and break a limit.
  [[nodiscard]] std::vector<KeptOut> kept_out(const Rater& rater, const Entry& first) const;
  /// How far the values of these may be from what the models say, in what is ordered by: what maps and splits miss.
  ///   gap: of splits that could not be brought within their tolerance, in z.
  [[nodiscard]] double within(const Rater& rater, const std::vector<Entry>& entries, double gap = 0) const;
  /// Absent: too few hookups keep every limit for the places asked, or a vessel gave no number; all must be visited.
  [[nodiscard]] std::optional<RankedSet> rank(const Rater& rater) const;

 private:
  OnOneLine(Line line, Twins twins, const Problem& problem);
  [[nodiscard]] bool on_the_line(const Hookup& hookup) const;
  /// What is ordered by (conversion, yield, or the ceiling itself) of a value on the line, and the other way round.
  [[nodiscard]] double figure_at(By by, double value) const;
  [[nodiscard]] double place_of(By by, double figure) const;
  class Places;
  Line line_;
  Bound bound_;
  Twins twins_;
  OnLines vessels_;
  std::optional<double> z_target_;  // of the target, where it asks nothing but this
  double yield_per_z_ = 0;
};

}  // namespace vatwright
