#pragma once
#include <functional>
#include <optional>
#include <string>
#include <vector>

#include "vatwright/hookup/hookup_rating.hpp"

namespace vatwright {

enum class By { fit, conversion, ceiling, yield };

struct RankOptions {
  int most = 3;
  int top = 10;
  By by = By::fit;
  bool exact = false;
  int threads = 1;
  std::optional<Hookup> today;
  bool visit = false;  ///< every hookup is rated, where a search would prove as much with less
  /// The most hookups that are rated one by one; a size (number of vessels) that would go beyond is left out whole.
  long long most_rated = 250'000;
  /// Told now and then how many are rated, of how many; called by one thread at a time.
  std::function<void(long long done, long long total)> progress;
  /// Asked between hookups, by any thread: true ends the visiting with what is rated by then, told as "partly".
  std::function<bool()> stopped;
};
/// One joint with free shares, at the duty's feed rate: what other shares would cost there of conversion (by yield: of
/// yield), all other shares left at their best.
struct SplitCost {
  std::vector<std::string> branches;  ///< texts of its members
  std::vector<double> best, by_volume;
  std::optional<double> by_volume_costs;  ///< absent: no answer at those shares
  std::optional<double> off_costs;  ///< the most that 5 points of the joint's flow more or less to one branch cost,
                                    ///< taken evenly from the others
};
struct Ranked {
  HookupRating rating;
  std::optional<double> value;       ///< of `by`
  std::vector<std::string> same_as;  ///< what differs only in name, whole texts, sorted
  std::vector<SplitCost> splits;     ///< in the order of the text
};
/// A hookup that would stand before the first but for a limit.
struct KeptOut {
  std::string hookup;
  std::optional<double> value;  ///< of `by`, no limit asked
  std::vector<std::string> stands_in_the_way;
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
  long long hookups = 0, rated = 0;  ///< all labelled ones, before merging; those rated
  std::string complete = "partly";   ///< "proved" | "visited" | "partly"
  std::string why_partly;            ///< in words, where partly
  std::string why_not_proved;        ///< in words, where no bound serves this duty
  std::optional<double> within;
  std::vector<KeptOut> kept_out;  ///< up to three, the best first
  std::optional<Ranked> today;
  std::optional<long long> today_place;  ///< from 1, among merged hookups
  bool unsolved = false;
};

/// Rates every series-parallel hookup of up to `most` of the offered vessels (indices into Site::vessels), those that
/// differ only in name once, and orders them as ruled: see order.hpp. Any number of threads gives the same answer.
/// Precondition: for By::yield, yield_asked(duty) is there.
Ranking rank(const Problem& problem, const std::vector<int>& offered, const RankOptions& options);

}  // namespace vatwright
