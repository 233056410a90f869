#pragma once
#include <span>
#include <vector>

#include "line.hpp"
#include "vatwright/hookup/expression.hpp"

namespace vatwright {

/// The most that the caps of a hookup's vessels pass at any shares. Leaves are places in `vessels`.
double caps_pass(const Hookup& hookup, std::span<const Line::OnLine* const> vessels);

/// The best shares of a hookup of a duty on a line, with a bound that nothing is better. As every vessel passes more on
/// when it is given more, each joint is split for its own outlet, and inner joints are solved inside outer ones.
///
/// Two branches a, b of a flow q at z_in split by f + (q - f): the moles converted, f (z_a - z_in) + (q - f)(z_b -
/// z_in), are bounded on a cell f0 .. f1 branch by branch
///   - where they are concave, by both tangents (see Line::bends);
///   - where they are convex, by the chord;
///   - else by f (z_a(f0) - z_in): outlets fall as flow rises.
/// The cell of the highest bound is cut until no bound is above the best by more than the tolerance. Three branches and
/// more: one beside the best of the rest, whose slope is that of its own optimum. Branches that are single vessels of
/// one kind whose outlets are concave in their space time go as one, split by volume (equal slopes: equal space times).
class Splits {
 public:
  /// tolerance: of z at every joint.
  Splits(const Line& line, double tolerance) : line_(line), tolerance_(tolerance) {}

  /// What a hookup makes of z_in at its best shares. Leaves are places in `vessels`; all shares free.
  ///   need: below it the exact answer does not matter: z is then some bound below need.
  /// z is NaN where a vessel gave none, `no_shares` where none keep within the feed lines.
  Line::Out best(const Hookup& hookup, std::span<const Line::OnLine* const> vessels, double z_in, double feed_m3_s,
                 double need);
  static constexpr double no_shares = -1;
  /// The shares behind that answer, in the order of the text. Precondition: there was one.
  std::vector<double> shares(const Hookup& hookup, std::span<const Line::OnLine* const> vessels, double z_in,
                             double feed_m3_s);

  /// The most by which a bound stayed above its best where it could not be brought within the tolerance; else 0.
  [[nodiscard]] double gap() const { return gap_; }
  [[nodiscard]] long maps() const { return maps_; }

 private:
  struct Branch;
  struct Trial;
  struct Joint;
  Line::Out pass(const Hookup& hookup, double z_in, double q, double need);
  Line::Out along(const Hookup& hookup, double z_in, double q, double need);
  Line::Out joint(const Hookup& hookup, double z_in, double q, double need, std::vector<double>* flows);
  [[nodiscard]] bool go_as_one(const Hookup& a, const Hookup& b) const;
  [[nodiscard]] Joint joint_of(const Hookup& hookup, double z_in, double q, bool grouped) const;
  Line::Out split(const Joint& joint, std::size_t from, double q, double need, std::vector<double>* flows);
  Line::Out through(const Branch& branch, double z_in, double q, double need);
  [[nodiscard]] int bend_of(const Joint& joint, std::size_t from, std::size_t to, double z_lo, double z_hi,
                            double slope_falls_by, bool narrow) const;
  Trial tried(const Joint& joint, std::size_t from, double q, double f);
  void tell(const Hookup& hookup, double z_in, double q, std::vector<double>& shares);
  [[nodiscard]] const Line::OnLine& vessel(const Hookup& leaf) const {
    return *vessels_[static_cast<std::size_t>(leaf.vessel)];
  }

  const Line& line_;
  double tolerance_;
  std::span<const Line::OnLine* const> vessels_;
  double gap_ = 0;
  long maps_ = 0;
};

}  // namespace vatwright
