#pragma once
#include <span>
#include <vector>

#include "vatwright/hookup/expression.hpp"
#include "vatwright/numeric/rhs.hpp"

namespace vatwright {

/// The least share of a free branch, of what its beside leaves free: a closed branch is the smaller hookup, not this
/// one.
inline constexpr double least_share = 1e-4;

/// The most that a hookup can be fed where every vessel passes so much: in series the least, beside each other the sum,
/// no free branch getting less than least_share and a fixed one its share. Infinite: nothing limits it.
///   passes: of a leaf, by its number.
double most_flow(const Hookup& hookup, FunctionRef<double(int leaf)> passes);

/// The free shares of a hookup as coordinates 0 .. 1. A beside whose m free members share R (1 less the fixed ones) has
/// m - 1 of them:
///   share_k = R [e + (1 - m e) s_k],  s_1 = x_1, s_2 = (1 - x_1) x_2, .., s_m = what is left,  e = least_share
class ShareSpace {
 public:
  /// volumes: of the vessels in the order of the text; they set the start in proportion.
  ShareSpace(const Hookup& hookup, const std::vector<double>& volumes);

  [[nodiscard]] std::size_t dimensions() const { return in_proportion_.size(); }
  /// Shares of all members of all besides in the order of the text.   x: dimensions() of them.
  [[nodiscard]] std::vector<double> shares(std::span<const double> x) const;
  /// The coordinates of these shares; those of a closed branch's members are 0.
  [[nodiscard]] std::vector<double> coordinates(const std::vector<double>& shares) const;
  /// The coordinates at which every free branch gets flow in proportion to its volume.
  [[nodiscard]] const std::vector<double>& in_proportion() const { return in_proportion_; }
  /// Whether a free share lies within `distance` (0.02 = 2 % points) of 0 or of all that its beside leaves.
  [[nodiscard]] bool at_edge(const std::vector<double>& shares, double distance) const;

 private:
  struct Joint {
    std::vector<std::size_t> free;  // places in the share vector
    double left = 1;                // what the fixed ones leave
  };
  double add(const Hookup& hookup, const std::vector<double>& volumes, std::size_t& leaf);
  void add_joint(const Hookup& hookup, const std::vector<std::size_t>& places, const std::vector<double>& inside);
  std::vector<double> fixed_;  // all places; 0 where free
  std::vector<Joint> joints_;
  std::vector<double> in_proportion_;
};

}  // namespace vatwright
