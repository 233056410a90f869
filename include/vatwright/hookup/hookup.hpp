#pragma once
#include <optional>
#include <string>
#include <string_view>
#include <variant>
#include <vector>

#include "vatwright/rating/rating.hpp"

namespace vatwright {

/// Vessels joined in series and in parallel: a leaf names a vessel by its index in Site::vessels.
struct Hookup {
  enum class Join { vessel, then, beside };
  Join join = Join::vessel;
  int vessel = -1;
  std::vector<Hookup> parts;                      ///< a series never holds a series, a parallel never a parallel
  std::vector<std::optional<double>> shares;      ///< beside: one per part, fixed (0..1) or free
};

/// What is wrong with a hookup text; column from 1.
struct HookupFault {
  int column = 0;
  std::string found, expected;
};
/// Reads `A then [40% B beside 60% C]`; beside binds tighter than then, [ ] group, a share is optional per member.
/// Faults: unknown tag (nearest told), a vessel twice, shares that do not add to 100, unclosed groups, other words.
std::variant<Hookup, HookupFault> parse_hookup(std::string_view text, const Site& site);

/// The text fully grouped, with shares in per cent (at most 4 decimals, the last the remainder to 100) where given: one share per
/// free or fixed part in the order of a walk; what it prints, parse_hookup takes.
std::string to_text(const Hookup& hookup, const Site& site, const std::vector<double>& shares);

/// All answers for one hookup.
struct HookupRating {
  Rating whole;
  std::vector<Rating> vessels;    ///< in the order of the text, cumulative figures, feed_fraction and profile
  std::string text;               ///< fully grouped with the shares of the reach
  int vessel_count = 0;
  int free_shares = 0;
};

enum class By { fit, conversion, ceiling, yield };

struct HookupOptions {
  bool windows = true;
  bool profiles = false;
};
HookupRating rate_hookup(const Problem& problem, const Hookup& hookup, const HookupOptions& options = {});

struct RankOptions {
  int most = 3;
  int top = 10;
  By by = By::fit;
  bool exact = false;
  int threads = 1;
  std::optional<Hookup> today;
};
struct Ranked {
  HookupRating rating;
  std::optional<double> value;             ///< of `by`
  std::vector<std::string> same_as;
};
struct Stair {
  int vessel_count = 0;
  std::optional<std::string> best;
  std::optional<double> value;
};
struct Ranking {
  std::vector<Ranked> top;
  std::vector<Stair> stair;
  int offered = 0, most = 0;
  long long hookups = 0, rated = 0;
  std::string complete = "partly";         ///< "proved" | "visited" | "partly"
  std::optional<double> within;
  std::optional<Ranked> today;
  std::optional<long long> today_place;
  bool unsolved = false;
};
/// offered: indices into Site::vessels.
Ranking rank(const Problem& problem, const std::vector<int>& offered, const RankOptions& options);

}  // namespace vatwright
