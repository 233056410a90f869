#pragma once
#include <functional>
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "vatwright/quantity/show.hpp"
#include "vatwright/rating/duty.hpp"

namespace vatwright {

enum class Verdict { fits, does_not_fit, cannot_tell };
std::string_view text_of(Verdict verdict);  ///< "fits", "does-not-fit", "cannot-tell"

/// [lo, hi] of feed rates, m3/s; an end that runs to the end of the search is absent.
struct Interval {
  std::optional<double> lo, hi;
};
struct Ends {
  std::optional<std::string> ceiling, floor;  ///< a limit's name, "TAG: limit" in a hookup, or "target"
};
struct Windows {
  std::vector<Interval> intervals;  ///< rising
  std::optional<double> ceiling_m3_s, floor_m3_s;
  Ends ends;
  std::string why;        ///< not empty: where and why trials gave no answer, in words
  bool unsolved = false;  ///< one of those was a failure of the numerics
  int trials = 0;         ///< how many feed rates were tried
  std::vector<double>
      jumps_m3_s;  ///< ends where a margin jumps instead of passing zero: the reached state changes there
};

/// What a target item asks, and what is reached.
struct TargetItem {
  std::string text = {};  ///< "conversion of A"
  std::optional<double> value = {};
  double bound = 0;
  bool at_least = true;
  double margin = 0;  ///< + = met; NaN-free: a value that does not exist misses by its whole bound
  bool met = false;
  Shown shown = Shown::number;  ///< how value and bound are shown
};

/// Every answer about one vessel by itself, or (rating of a hookup) about the whole. What does not exist is absent.
struct Rating {
  std::string tag, kind;  ///< empty for a hookup as a whole
  Verdict verdict = Verdict::cannot_tell;
  std::vector<std::string> stands_in_the_way;
  std::optional<double> conversion;
  std::vector<std::pair<std::string, std::optional<double>>> yields;
  std::optional<Stream> outlet;
  std::vector<std::pair<std::string, double>> outlet_mol_s;  ///< every species
  std::optional<double> hottest_K, start_peak_K, cooling_W, preheat_W;
  std::optional<std::string> medium;
  std::optional<std::vector<SteadyState>> steady_states;
  std::optional<bool> states_complete;
  std::string started;             ///< tanks: what it was filled with before its feed is opened, in words
  bool peaks = false;              ///< hotter on the way than where it starts and where it ends
  std::optional<Windows> windows;  ///< absent where they belong to the whole
  std::vector<Limit> limits;
  std::vector<TargetItem> targets;
  std::optional<double> residual;
  std::vector<Caution> cautions;
  std::optional<Profile> profile;
  std::optional<HeatCurve> heat_curve;
  std::optional<double> feed_fraction;
  bool unsolved = false;  ///< exit status 3
};

/// The range of feed rates searched for windows: 1e-6 to 1e8 times (fluid volume)/(1 h), m3/s.
std::pair<double, double> search_range(double fluid_volume_m3);
/// The same, as every answer that holds windows says it.
Assumed assumed_search();

/// Judgement of one trial feed rate: margins, + = inside, in the fixed order target first, then limits; a margin that
/// cannot be told is absent (it does not narrow the window); `fails` where the rate can not be rated at all (then it is
/// outside).
struct Trial {
  std::vector<std::pair<std::string, std::optional<double>>> margins;
  bool fails = false;
  std::string fails_by;   ///< the limit's name that stands for it ("pressure drop"); empty: the end has no name
  std::string fails_why;  ///< in words, where it is no limit that fails
  bool unsolved = false;  ///< the numerics failed
};
/// A margin is scaled, and not negative from -holds_within on (Limit::search_margin, TargetItem::margin).
/// Finds every interval of [lo, hi] in which no margin is negative: a grid in log(rate), the greatest of the smallest
/// margin between grid points looked for, and what lies beside a jump of the smallest margin between two of them; each
/// end refined to 1e-10 relative. Steps (jumps) count as ends.
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

// --- The pieces that rating is made of, for hookups too. -------------------------------------------------------------

/// One vessel in its place: all that judging it takes besides its outcome. The references outlive it.
struct VesselPlace {
  const Problem& problem;
  const Vessel& vessel;
  const Operation& operation;
  double feed_m3_s = 0;                   ///< of the mixed feed, through this vessel
  std::optional<double> arrives_Pa = {};  ///< from the vessel before it; a first vessel: absent
  Stands stands = Stands::alone;
};

/// What judging one vessel gives.
struct Judged {
  std::vector<Limit> limits;  ///< in the order of all_limits(); those of the files alone where there is no outcome
  const Utility* medium = nullptr;
  std::optional<Draw> draw;           ///< for check_utility_totals over a hookup
  std::optional<NoAnswer> no_answer;  ///< why there is no outcome
  std::string lacking;                ///< a utility asked for that the vessel has not; not empty: does not fit
  bool figures = true;                ///< false: nothing to print (no outcome, or a cycle)
};
/// Judges an outcome (or its absence: does_not_pass breaks the limit "pressure drop") by every limit that is asked.
Judged judge(const VesselPlace& place, const Outcome<VesselOutcome>& outcome);

/// Verdict and the texts of what stands in the way, both from the same facts. judged: one vessel, or all of a hookup;
/// limits: further limits (a hookup's own), items: the target at the outlet of the whole (empty where there is no
/// outlet). named: texts start with "TAG: ". Order: limits vessel by vessel, then `limits`, then target, then what can
/// not be told.
struct Finding {
  Verdict verdict = Verdict::cannot_tell;
  std::vector<std::string> stands_in_the_way;
  bool unsolved = false;
};
struct NamedJudged {
  std::string_view tag;  ///< empty: texts and limit names stand without a tag
  const Judged* judged;
};
Finding find_verdict(const std::vector<NamedJudged>& judged, const std::vector<Limit>& limits,
                     const std::vector<TargetItem>& items);
/// The same facts as the margins of one trial of find_windows: "target" first, then limits ("TAG: limit" where there is
/// a tag). Any vessel without an answer makes the trial fail.
Trial trial_of(const std::vector<NamedJudged>& judged, const std::vector<Limit>& limits,
               const std::vector<TargetItem>& items);

/// Puts the figures of one vessel into a rating: tag, kind, conversion, yields, outlet, temperatures, heat, states,
/// limits, residual, medium, profile; figures stay absent where judged.figures is false. conversion and yields are
/// cumulative.
void tell_vessel(Rating& rating, const VesselPlace& place, const Judged& judged, const VesselOutcome* outcome);
/// Puts windows into a rating of one vessel or of a whole hookup: what of them is not known, and a caution where one
/// ends at a jump. any_answer: some trial had one; where none had, and says why, nothing is known of a window.
void tell_windows(Rating& rating, Windows windows, bool any_answer);
/// Every species at an outlet, mol/s (kg/s under amounts by mass), in the order of species.
std::vector<std::pair<std::string, double>> outlet_flows(const Duty& duty, const Stream& outlet);
/// Cautions that belong to one vessel at one outcome: driving-difference, glass-step, beyond-measured, start-peak.
/// near-fold: see caution_near_fold. limits: as judged at that outcome.
std::vector<Caution> cautions_of(const VesselPlace& place, const VesselOutcome& outcome,
                                 const std::vector<Limit>& limits);
/// near-fold: the reached state jumps within 5 % of the feed rate. conversion_at: the reached conversion at a feed
/// rate, absent where there is none. Costs two trials where nothing jumps.
std::optional<Caution> caution_near_fold(const std::function<std::optional<double>(double feed_m3_s)>& conversion_at,
                                         double feed_m3_s);

/// near-fold: a window ends where the reached state jumps.
std::optional<Caution> caution_window_at_fold(const Windows& windows);

/// What no vessel was asked, in words, once for the whole answer ("decomposition", "spread", ..).
std::vector<std::string> not_asked(const Problem& problem);
/// Cautions that belong to the whole answer.
std::vector<Caution> cautions_of(const Problem& problem);

}  // namespace vatwright
