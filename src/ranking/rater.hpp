#pragma once
#include <functional>

#include "order.hpp"
#include "vatwright/hookup/objective.hpp"
#include "vatwright/ranking/twins.hpp"

namespace vatwright {

/// Rates hookups by the full models, one by one, for the order that is asked. Shared by threads.
class Rater {
 public:
  /// What is known of a hookup before the full models are asked; empty: nothing is.
  struct Known {
    std::function<KnownShares(const Hookup&)> shares_of;
    std::function<std::optional<double>(const Hookup&)>
        ceiling_of;  ///< where its ceiling is, no limit but feed lines asked
  };
  Rater(const Problem& problem, const RankOptions& options, const Twins& twins, Known known = {});

  /// At the duty's feed rate; its ceiling is not looked for.
  [[nodiscard]] Entry rate(Hookup hookup) const;
  /// Its ceiling, begun where it is known to be.
  void find_ceiling(Entry& entry) const;
  /// Whether an entry's ceiling may be as high as this rate.
  [[nodiscard]] bool may_reach(const Entry& entry, double feed_m3_s) const;
  /// All that is told of an entry whose place is known. is_listed: not a hookup of the user's that stands besides.
  [[nodiscard]] Ranked tell(const Entry& entry, bool is_listed) const;

  [[nodiscard]] bool needs_ceilings() const { return by_ceiling(options_.by); }
  [[nodiscard]] const Problem& problem() const { return problem_; }
  [[nodiscard]] const RankOptions& options() const { return options_; }
  [[nodiscard]] const Twins& twins() const { return twins_; }

 private:
  [[nodiscard]] KnownShares shares_of(const Hookup& hookup) const;
  const Problem& problem_;
  const RankOptions& options_;
  const Twins& twins_;
  Known known_;
  Objective objective_;
};

/// All shares are free.
bool all_free(const Hookup& hookup);

}  // namespace vatwright
