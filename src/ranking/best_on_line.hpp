#pragma once
#include <map>
#include <vector>

#include "known_shares.hpp"
#include "line_search.hpp"

namespace vatwright {

/// A hookup with what it is ranked by, on the line: its place at the duty's feed rate, or its ceiling.
struct Placed {
  OnTheLine at;
  double value = 0;
};

/// What a search asks for.
struct BestAsked {
  int fewest = 1, most = 3;
  std::size_t places = 10;
  /// The best `places` of every number of vessels and of free shares, or of all together.
  bool by_shape = false;
  double floor = 0;  ///< less is not of interest
};
struct BestFound {
  std::vector<Placed> all;    ///< the best first; what ties with the last is there too
  double complete_above = 0;  ///< nothing of this value or more is missing (by_shape: but what has `places` better)
  LineSearch::Cost cost;
};

/// The best hookups of a duty on a line, by one search or a few.
class BestOnLine {
 public:
  /// place_of_target: z that the target asks; absent: ordered by z at the feed rate, else by ceiling.
  ///   least_cap_m3_s: hookups whose feed lines pass less are left out.
  BestOnLine(const Line& line, const Bound& bound, const Twins& twins, const std::vector<std::size_t>& classes,
             const OnLines& vessels, double feed_m3_s, std::optional<double> place_of_target, int threads);

  BestFound find(const BestAsked& asked) const;
  /// How much less than its best the search may see in a hookup: in z, and of ceilings, relative. What comes so near to
  /// the last place is found too, to be told apart by more accurate means.
  static constexpr double missed = 4e-6, ceiling_missed = 1e-4;
  /// The highest feed rate at which a hookup reaches the target, its shares chosen anew at each; 0: at none.
  ///   from_m3_s: it is reached there.
  static double ceiling(const Hookup& hookup, const OnLines& vessels, double place_of_target, double from_m3_s,
                        double cap_m3_s, Splits& splits);

 private:
  class List;
  void first_threshold(const BestAsked& asked, double feed_m3_s, List& list, LineSearch::Cost& cost) const;
  double first_ceilings(const BestAsked& asked, List& list, LineSearch::Cost& cost) const;
  const Line& line_;
  const Bound& bound_;
  const std::vector<std::size_t>& classes_;
  const OnLines& vessels_;
  LineSearch search_;
  double feed_m3_s_;
  std::optional<double> z_target_;
  double tolerance_;  // of z at every joint
  int threads_;
};

}  // namespace vatwright
