#pragma once
#include <cstddef>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "vatwright/thermal/chemistry.hpp"
#include "vatwright/thermal/utility.hpp"
#include "vatwright/vessel/run.hpp"

namespace vatwright {

/// What the product may see, besides the limits of the vessels.
struct ProductLimits {
  std::optional<double> coldest_K, hottest_K;
  std::optional<double> decomposition_K;
  std::vector<std::string> wetted;  ///< empty: not asked
  enum class Boiling { unsaid, forbid, ignore, at };
  Boiling boiling = Boiling::unsaid;
  double boiling_K = 0;  ///< for `at`
};

/// One thing that must hold, and how far it is from being broken.
struct Limit {
  enum class State { holds, broken, cannot_tell };
  std::string_view name;  ///< the wording of the list below
  std::optional<double> value = {}, bound = {};
  std::string_view unit = {};  ///< "K", "Pa", "m3/s", "W", "W/m2", "1"; empty: null
  std::optional<double> margin =
      {};  ///< (bound - value)/|bound| (1 if 0); a lower bound counts value - bound; K: plain difference
  State state = State::holds;
  bool of_difference = false;  ///< value and bound in "K" are differences of temperature
  std::string why = {};  ///< for people: what stands in the way, or what is missing; empty where it holds
  /// What the search for windows follows: the margin over its scale (temperatures too), running on smoothly to where a
  /// direction of heat is no longer needed; -1 where the limit is broken without a number; absent where it can not be
  /// told or has none. The limit holds where this is at least -holds_within.
  std::optional<double> search_margin = {};
};

/// Whether a vessel is looked at by itself, or as part of a hookup (what all vessels draw together is then the
/// hookup's).
enum class Stands { alone, in_hookup };

std::string_view text_of(Limit::State state);  ///< "holds", "broken", "cannot-tell"

/// What a limit looks at.
struct LimitInput {
  const Vessel& vessel;
  const Chemistry& chemistry;
  const Operation& operation;
  const ProductLimits& product;
  const std::vector<Utility>& utilities;  ///< of the site
  double feed_m3_s;                       ///< through this vessel
  const VesselOutcome& outcome;
  const Utility* medium;  ///< chosen or asked for; null: none
  std::optional<double> arrives_Pa =
      {};  ///< pressure of what arrives, where it comes from another vessel (a first vessel: absent)
  Stands stands = Stands::alone;
};

/// nullopt: not asked.
using LimitCheck = std::optional<Limit> (*)(const LimitInput&);

/// What a check reads: `files` can be judged even where the vessel could not be calculated, `start` where its start-up
/// ends in no steady state.
enum class Reads { files, start, outcome };

/// The one list, in the order of every answer.
struct ListedLimit {
  std::string_view name;
  LimitCheck check;
  Reads reads = Reads::outcome;
};
const std::vector<ListedLimit>& all_limits();

/// All limits that are asked, in the order of the list; of an outcome that is a cycle those of files and start alone.
std::vector<Limit> check_limits(const LimitInput& input);
/// Those of them that need no outcome (input.outcome is not read).
std::vector<Limit> check_limits_of_files(const LimitInput& input);

/// The first place of `name` in the list; the length of the list where it is not there (names of a hookup: after "TAG:
/// ").
std::size_t place_of(std::string_view name);

/// The medium that serves a held vessel with the most margin, or the one asked for; null where there is none that can
/// be had (jacketed: the first listed). Least draw: see least_draw.
const Utility* choose_medium(const Vessel& vessel, const Operation& operation, const std::vector<Utility>& utilities,
                             const VesselOutcome& outcome);
/// The least flow of the medium that carries the heat (hold), m3/s; nullopt where none does.
std::optional<double> least_draw(const Vessel& vessel, const Operation& operation, const Utility& medium,
                                 const VesselOutcome& outcome);

/// What a vessel draws of a medium, for the sum over a hookup. draw absent: no flow carries the heat, or it is not
/// known (`known`).
struct Draw {
  const Utility* medium = nullptr;
  std::optional<double> draw_m3_s;
  bool known = true;
};
/// What this vessel draws; nullopt where it draws nothing that counts (no medium, condensing, adiabatic, heat not
/// asked). Hold: the least flow; jacketed: the medium's `flow`, or all that its `total` leaves.
std::optional<Draw> draw_of(const LimitInput& input);
/// "utility total" of a hookup: the sum of the draws of each medium against its `total`; the tightest medium is shown.
/// nullopt where no medium drawn states a total.
std::optional<Limit> check_utility_totals(const std::vector<Draw>& draws);

/// A utility that is asked for by name and that the vessel's jacket has not, told in words; empty: none (ruling 27).
std::string lacking_utility(const Vessel& vessel, const Operation& operation);

/// Bubble point of a liquid of mole fractions x at P: sum x_i p_i(T) = P, ideal (Raoult), p = 0 for what is not
/// volatile.
///   species, x: one each, same length; every volatile species with x > 1e-9 needs an Antoine equation (precondition).
/// nullopt where nothing volatile is there or no temperature up to 3000 K does.
std::optional<double> bubble_temperature(const std::vector<Species>& species, const std::vector<double>& x,
                                         double P_Pa);

/// A limit holds when it is met within this share of its scale, so that a rating at a printed ceiling holds.
inline constexpr double holds_within = 1e-9;

}  // namespace vatwright
