#pragma once
#include <memory>
#include <vector>

#include "bound.hpp"
#include "splits.hpp"
#include "templates.hpp"
#include "vatwright/ranking/twins.hpp"

namespace vatwright {

/// A hookup that the search came to, at its best shares.
struct OnTheLine {
  Hookup hookup;  ///< leaves are vessels of the site
  double z = 0;   ///< at the feed rate of the search
  int vessels = 0, free_shares = 0;
};

/// What a search is for: it is told what is found, and says how good a hookup must be to matter.
class Wanted {
 public:
  virtual ~Wanted() = default;
  /// The least z at which a hookup of fewest .. most vessels still matters.
  [[nodiscard]] virtual double floor(int fewest, int most) const = 0;
  /// A hookup with z >= floor.
  virtual void found(OnTheLine hookup, Splits& splits) = 0;
  /// The same wish with what is known by now, for one thread; and what it found put to this one.
  [[nodiscard]] virtual std::unique_ptr<Wanted> part() const = 0;
  virtual void take(Wanted& part) = 0;
};

/// Searches all hookups of some vessels on a line, depth first over trains whose members are vessels or besides. What
/// follows a beginning at z can reach at most Bound::reached(time(z) + the largest vessels left), so whole sets of
/// hookups are passed over. Those that differ only in name are met once.
class LineSearch {
 public:
  /// classes: places in twins.classes() to take vessels from. least_pass_m3_s: no member of a train may pass less.
  LineSearch(const Line& line, const Bound& bound, const Twins& twins, std::vector<std::size_t> classes,
             double least_pass_m3_s);
  ~LineSearch();

  struct Cost {
    long long rated = 0;  ///< hookups evaluated
    long maps = 0;        ///< vessel maps
    long bounds = 0;      ///< bounds looked up
    double gap = 0;       ///< the most by which a split's bound stayed above its value, over all splits of one hookup
    bool failed = false;  ///< a vessel gave no number: what follows it was not searched
    void add(const Cost& other);
  };
  /// Tells `wanted` every hookup of fewest .. most vessels that reaches its floor at this feed rate.
  ///   tolerance: of z at every joint. Any number of threads tells the same.
  Cost run(double feed_m3_s, int fewest, int most, double tolerance, int threads, Wanted& wanted) const;
  /// The same among the `largest` vessels alone, trains of vessels only or of besides too.
  enum class Members { vessels, any };
  Cost run_among(std::size_t largest, Members members, double feed_m3_s, int fewest, int most, double tolerance,
                 Wanted& wanted) const;

 private:
  struct Sized;
  class Walk;
  [[nodiscard]] std::vector<Sized> sized(double feed_m3_s, int most) const;
  const Line& line_;
  const Bound& bound_;
  const Twins& twins_;
  std::vector<std::size_t> classes_;
  double least_pass_m3_s_;
  std::unique_ptr<Templates> templates_;
};

}  // namespace vatwright
