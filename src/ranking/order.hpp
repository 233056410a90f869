#pragma once
#include <string>
#include <vector>

#include "ceiling.hpp"
#include "vatwright/ranking/rank.hpp"

namespace vatwright {

/// One hookup among all, with what its place depends on.
struct Entry {
  Hookup hookup;
  std::vector<double> shares;  ///< of the reach
  Verdict verdict = Verdict::cannot_tell;
  bool breaks_limit = false;  ///< of any vessel or the whole; the target aside
  bool unsolved = false;
  bool split_certain = false;  ///< no other shares do better: there are none to choose, or they are known
  int vessel_count = 0, free_shares = 0;
  std::optional<double> reach;     ///< conversion, or yield under By::yield
  std::optional<Ceiling> ceiling;  ///< absent: not found out yet
  std::string text;
  std::vector<std::string> stands_in_the_way;
};

/// Values are of one group where they lie within this share of the group's best.
inline constexpr double as_good_as = 1e-3;
/// Whether ceilings are what is ordered by.
inline bool by_ceiling(By by) { return by == By::fit || by == By::ceiling; }
/// The figure that `by` orders by, the higher the better; an open window is infinite, no figure is minus infinity.
double figure_of(const Entry& entry, By by);
/// What is told as `value`: finite or absent.
std::optional<double> value_of(const Entry& entry, By by);

/// What stands before any figure: nothing broken before a broken limit; by fit then the verdict (fits, cannot tell,
/// does not fit) and fewer vessels. Entries of one rank are ordered by figure.
int rank_before_figure(const Entry& entry, const RankOptions& options);

/// Puts the places of entries in order:
///   by fit   rank_before_figure, ceiling in groups, fewer free shares, exact ceiling, text
///   others   rank_before_figure, value in groups, fewer vessels, fewer free shares, exact value, text
///   exact    the same without groups: value, then text
/// A group is what lies within 0.1 % of its best. Ceilings of all are known where `by` needs them.
std::vector<std::size_t> in_order(const std::vector<Entry>& entries, const RankOptions& options);

}  // namespace vatwright
