#pragma once
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
  std::vector<std::string> wetted;                 ///< empty: not asked
  enum class Boiling { unsaid, forbid, ignore, at };
  Boiling boiling = Boiling::unsaid;
  double boiling_K = 0;                            ///< for `at`
};

/// One thing that must hold, and how far it is from being broken.
struct Limit {
  enum class State { holds, broken, cannot_tell };
  std::string_view name;                 ///< the wording of the list below
  std::optional<double> value, bound;
  std::string_view unit;                 ///< "K", "Pa", "m3/s", "W", "W/m2", "1"; empty: null
  std::optional<double> margin;          ///< (bound - value)/|bound| (1 if 0); a lower bound counts value - bound; K: plain difference
  State state = State::holds;
  std::string why;                       ///< for people: what stands in the way, or what is missing
};

/// What a limit looks at.
struct LimitInput {
  const Vessel& vessel;
  const Chemistry& chemistry;
  const Operation& operation;
  const ProductLimits& product;
  const std::vector<Utility>& utilities;   ///< of the site
  double feed_m3_s;                        ///< through this vessel
  const VesselOutcome& outcome;
  const Utility* medium;                   ///< chosen or asked for; null: none
};

/// nullopt: not asked.
using LimitCheck = std::optional<Limit> (*)(const LimitInput&);

/// The one list, in the order of every answer.
struct ListedLimit {
  std::string_view name;
  LimitCheck check;
};
const std::vector<ListedLimit>& all_limits();

/// All limits that are asked, in the order of the list.
std::vector<Limit> check_limits(const LimitInput& input);

/// The medium that serves a held vessel with the most margin, or the one asked for; null where there is none that can
/// be had (jacketed: the first listed). Least draw: see least_draw.
const Utility* choose_medium(const Vessel& vessel, const Operation& operation, const std::vector<Utility>& utilities,
                             const VesselOutcome& outcome);
/// The least flow of the medium that carries the heat (hold), m3/s; nullopt where none does.
std::optional<double> least_draw(const Vessel& vessel, const Operation& operation, const Utility& medium,
                                 const VesselOutcome& outcome);

/// A limit holds when it is met within this share of its scale, so that a rating at a printed ceiling holds.
inline constexpr double holds_within = 1e-9;

}  // namespace vatwright
