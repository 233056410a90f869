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
  /// Absent: too few hookups keep every limit for the places asked, or a vessel gave no number; all must be visited.
  [[nodiscard]] std::optional<RankedSet> rank(const Rater& rater) const;

 private:
  OnOneLine(Line line, Twins twins, const Problem& problem);
  [[nodiscard]] bool on_the_line(const Hookup& hookup) const;
  class Places;
  Line line_;
  Bound bound_;
  Twins twins_;
  OnLines vessels_;
  std::optional<double> z_target_;  // of the target, where it asks nothing but this
};

}  // namespace vatwright
