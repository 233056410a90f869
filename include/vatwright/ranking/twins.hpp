#pragma once
#include <functional>
#include <span>
#include <string>
#include <vector>

#include "vatwright/hookup/expression.hpp"
#include "vatwright/rating/duty.hpp"

namespace vatwright {

/// What makes hookups differ only in name, by data and algebra alone, never by comparing figures.
class Twins {
 public:
  /// offered: indices into Site::vessels.
  ///   tubes_split_evenly: tubes held at one temperature beside each other do best at equal space times, so that they
  ///   are one tube of all their volume (rates that fall as conversion rises).
  Twins(const Problem& problem, const std::vector<int>& offered, bool tubes_split_evenly = false);

  /// Classes of vessels equal in all data but tag, note and source, and run alike in this duty; classes by their first
  /// vessel, each rising.
  [[nodiscard]] const std::vector<std::vector<int>>& classes() const { return classes_; }
  /// The place of a vessel's class in classes(); -1: not offered.
  [[nodiscard]] int class_of(int vessel) const { return class_of_[static_cast<std::size_t>(vessel)]; }

  /// Whether two tubes that follow one another can change places and nothing that is told of the whole, or limits
  /// either, changes: liquid in plain tubes held at one temperature, where no limit looks at what is inside (no heat
  /// asked, no bubble point, no pressure rating or drop in play).
  [[nodiscard]] bool exchange_in_series(int a, int b) const;

  /// Whether tubes beside each other are the same as one after the other: they can change places, do best at equal
  /// space times, and state no feed line that would see the difference.
  [[nodiscard]] bool same_beside(int a, int b) const;

  /// Whether this hookup stands for those that differ only in name: neighbouring exchangeable tubes stand by class, and
  /// tubes that are the same beside each other stand in series.
  ///   vessel_at: not empty: a leaf's vessel is vessel_at[its number].
  [[nodiscard]] bool is_shown(const Hookup& hookup, std::span<const int> vessel_at = {}) const;

  /// All hookups that differ from this one only in name (itself left out), with its shares moved along: texts, sorted.
  ///   shares: in the order of the text of `hookup`.
  [[nodiscard]] std::vector<std::string> same_as(const Hookup& hookup, const std::vector<double>& shares) const;

  /// The same for all that differ only in name, different for others. For hookups with free shares.
  [[nodiscard]] std::string key(const Hookup& hookup) const;

 private:
  bool plain_held_tube(int vessel) const;
  /// Leaves of branches that are nothing but tubes which are the same beside each other; empty: it is no such branch.
  std::vector<int> tubes_alone(const Hookup& hookup, std::span<const int> vessel_at) const;
  Hookup tubes_in_series(Hookup hookup) const;
  Hookup runs_sorted(Hookup hookup) const;
  std::vector<Hookup> expansions(const Hookup& hookup) const;
  double tube_volume(const Hookup& tubes) const;
  Hookup at_equal_times(Hookup tubes) const;
  void for_each_neighbour_swap(const Hookup& whole, const std::function<void(Hookup)>& use) const;
  static bool neighbours(const Hookup& h, int a, int b);
  const Problem& problem_;
  std::vector<std::vector<int>> classes_;
  std::vector<int> class_of_;
  bool nothing_looks_inside_ = false, tubes_split_evenly_ = false;
};

}  // namespace vatwright
