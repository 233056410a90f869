#pragma once
#include <functional>
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "vatwright/rating/duty.hpp"

namespace vatwright {

enum class Verdict { fits, does_not_fit, cannot_tell };
std::string_view text_of(Verdict verdict);   ///< "fits", "does-not-fit", "cannot-tell"

/// [lo, hi] of feed rates, m3/s; an end that runs to the end of the search is absent.
struct Interval {
  std::optional<double> lo, hi;
};
struct Ends {
  std::optional<std::string> ceiling, floor;   ///< a limit's name, "TAG: limit" in a hookup, or "target"
};
struct Windows {
  std::vector<Interval> intervals;             ///< rising
  std::optional<double> ceiling_m3_s, floor_m3_s;
  Ends ends;
  std::string why;                             ///< not empty: they could not be found, in words
};

/// What a target item asks, and what is reached.
struct TargetItem {
  std::string text;             ///< "conversion of A"
  std::optional<double> value;
  double bound = 0;
  bool at_least = true;
  double margin = 0;            ///< + = met; NaN-free: a value that does not exist misses by its whole bound
  bool met = false;
};

/// Every answer about one vessel by itself, or (rating of a hookup) about the whole. What does not exist is absent.
struct Rating {
  std::string tag, kind;                               ///< empty for a hookup as a whole
  Verdict verdict = Verdict::cannot_tell;
  std::vector<std::string> stands_in_the_way;
  std::optional<double> conversion;
  std::vector<std::pair<std::string, std::optional<double>>> yields;
  std::optional<Stream> outlet;
  std::vector<std::pair<std::string, double>> outlet_mol_s;   ///< every species
  std::optional<double> hottest_K, start_peak_K, cooling_W, preheat_W;
  std::optional<std::string> medium;
  std::optional<std::vector<SteadyState>> steady_states;
  std::optional<bool> states_complete;
  std::optional<Windows> windows;                      ///< absent where they belong to the whole
  std::vector<Limit> limits;
  std::vector<TargetItem> targets;
  std::optional<double> residual;
  std::vector<Caution> cautions;
  std::optional<Profile> profile;
  std::optional<double> feed_fraction;
  bool unsolved = false;                               ///< exit status 3
};

/// The range of feed rates searched for windows: 1e-6 to 1e8 times (fluid volume)/(1 h), m3/s.
std::pair<double, double> search_range(double fluid_volume_m3);

/// Judgement of one trial feed rate: margins, + = inside, in the fixed order target first, then limits; a margin that cannot be told is
/// absent (it does not narrow the window); `fails` where the rate can not be rated at all (then it is outside).
struct Trial {
  std::vector<std::pair<std::string, std::optional<double>>> margins;
  bool fails = false;
  std::string fails_by;       ///< the limit's name that stands for it ("pressure drop")
};
/// Finds every interval of [lo, hi] in which no margin is negative: a grid in log(rate), the greatest of the smallest margin
/// between grid points looked for, each end refined to 1e-10 relative. Steps (jumps) count as ends.
Windows find_windows(const std::function<Trial(double feed_m3_s)>& trial, double lo_m3_s, double hi_m3_s);

/// The targets at an outlet. conversions and yields are those of the whole (1 m3 of mixed feed).
std::vector<TargetItem> check_target(const Duty& duty, const Stream& outlet);
/// Yields of every species that some equation makes, in the order of species; absent where made without conversion_of.
std::vector<std::pair<std::string, std::optional<double>>> yields_of(const Duty& duty, const Stream& outlet);

/// What arrives at a first vessel.
Stream whole_feed(const Duty& duty);

struct RateOptions {
  bool windows = true;
  Detail detail = Detail::full;
};
/// Rates one vessel by itself at the duty's feed rate, and its window.
Rating rate(const Problem& problem, const Vessel& vessel, const RateOptions& options = {});

/// What no vessel was asked, in words, once for the whole answer ("decomposition", "spread", ..).
std::vector<std::string> not_asked(const Problem& problem);
/// Cautions that belong to the whole answer.
std::vector<Caution> cautions_of(const Problem& problem);

}  // namespace vatwright
