#pragma once
#include <functional>
#include <optional>
#include <string>
#include <vector>

#include "vatwright/hookup/expression.hpp"
#include "vatwright/rating/rating.hpp"

namespace vatwright {

/// All answers for one hookup.
struct HookupRating {
  Rating whole;                 ///< sums, maxima, the mixed outlet; limits only those of the whole
  std::vector<Rating> vessels;  ///< in the order of the text, cumulative figures, feed_fraction and profile
  std::string text;             ///< fully grouped with the shares of the reach
  std::vector<double> shares;   ///< of the reach, full digits, in the order of the text
  int vessel_count = 0;
  int free_shares = 0;
};

/// What free shares serve: what the target asks, or the conversion whatever it asks.
enum class Serve { target, conversion };

/// What shares are chosen for: the answer at a feed rate, or whether that rate lies inside a window.
enum class Purpose { reach, window };

/// The best shares of a hookup for the objective at a feed rate, no limit but those on flow asked (feed lines, pressure
/// drop), where somebody knows them better than by trying. Where no shares keep those: for the reach the best without
/// them, for a window those that break them least. Absent: not known at this rate.
using KnownShares = std::function<std::optional<std::vector<double>>(double feed_m3_s, Purpose purpose)>;

struct HookupOptions {
  bool windows = true;
  bool profiles = false;
  Serve serve = Serve::target;
  KnownShares known_shares = {};  ///< empty: they are found by trying
};

/// Rates a hookup at the duty's feed rate, and its window.
/// Free shares are chosen for the objective at the END of the hookup (the target's first yield, else its conversion,
/// else its first demand): the best among those that break no limit, else the best without limits; anew at every feed
/// rate of the window. Best found: sampled over all shares of a joint and polished, not proved. Parallel branches get
/// the same state, mix adiabatically and leave at the lowest branch pressure. The verdict is that of all vessels'
/// limits, the limits of the whole, and the target at the mixed outlet.
HookupRating rate_hookup(const Problem& problem, const Hookup& hookup, const HookupOptions& options = {});

}  // namespace vatwright
