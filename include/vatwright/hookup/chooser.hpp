#pragma once
#include <optional>
#include <vector>

#include "vatwright/hookup/hookup_rating.hpp"
#include "vatwright/hookup/judged_hookup.hpp"
#include "vatwright/hookup/objective.hpp"
#include "vatwright/hookup/share_space.hpp"

namespace vatwright {

/// Chooses the free shares of one hookup, anew at every feed rate.
class Chooser {
 public:
  Chooser(const Problem& problem, const Hookup& hookup, const Objective& objective, KnownShares known_shares = {});

  /// A limit that no feed rate decides is broken, so there is no window.
  bool never_fits(double feed_m3_s);
  /// The best shares for the objective among those that break no limit, judged. Where every share breaks one: for the
  /// reach the best without limits; for a window those nearest to holding.
  [[nodiscard]] JudgedHookup choose(double feed_m3_s, Purpose purpose, Detail detail = Detail::full);
  /// The best shares with no limit asked, with the objective there; absent where no shares give an answer.
  struct Free {
    std::vector<double> shares;
    double value = 0;
  };
  [[nodiscard]] std::optional<Free> choose_free(double feed_m3_s, Purpose purpose = Purpose::window);
  /// The objective at given shares.
  [[nodiscard]] std::optional<double> value_at(double feed_m3_s, const std::vector<double>& shares);

  [[nodiscard]] const Problem& problem() const { return problem_; }
  [[nodiscard]] Network& network() { return network_; }
  [[nodiscard]] const ShareSpace& space() const { return space_; }
  [[nodiscard]] const Objective& objective() const { return objective_; }

 private:
  const Problem& problem_;
  Network network_;
  ShareSpace space_;
  Objective objective_;
  KnownShares known_shares_;
};

}  // namespace vatwright
