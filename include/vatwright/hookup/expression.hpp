#pragma once
#include <optional>
#include <string>
#include <string_view>
#include <variant>
#include <vector>

#include "vatwright/rating/duty.hpp"

namespace vatwright {

/// Vessels joined in series and in parallel: a leaf names a vessel by its index in Site::vessels.
struct Hookup {
  enum class Join { vessel, then, beside };
  Join join = Join::vessel;
  int vessel = -1;
  std::vector<Hookup> parts;                  ///< normal form: see normal_form
  std::vector<std::optional<double>> shares;  ///< beside: one per part, fixed (0..1) or free
  friend bool operator==(const Hookup&, const Hookup&) = default;
};

/// What is wrong with a hookup text; column from 1, in code points.
struct HookupFault {
  int column = 0;
  std::string found, expected;
};

/// Reads `A then [40% B beside 60% C]`; beside binds tighter than then, [ ] group, a share in per cent is optional per
/// member of a beside. A tag that holds blanks, brackets or quotes, or that reads as a share, stands in double quotes
/// (\" and \\ inside). Where some shares of a beside are given, the rest share what is left; a single one left is
/// thereby fixed too. The answer is in normal form. Groups nest at most 200 deep. Faults: unknown tag (nearest told), a
/// vessel twice, shares that do not add to 100, a share of 0 or below or above 100, a share on a member of `then`,
/// unclosed groups, other words, an empty text.
std::variant<Hookup, HookupFault> parse_hookup(std::string_view text, const Site& site);

/// The text fully grouped: brackets around every beside that is not the whole, and around a series inside a beside.
///   shares: one per member of every beside, in the order of the text (a member's own share before those inside it), as
///   shares_of counts them: printed before every member in per cent with at most 4 decimals, the last the remainder to
///   100. Empty: only what is fixed is printed.
/// What it prints, parse_hookup takes; parse_hookup(to_text(h, site, {})) gives back h in normal form.
std::string to_text(const Hookup& hookup, const Site& site, const std::vector<double>& shares);

/// A series holds no series; a beside holds no beside, unless its shares can not be told without the group (a fixed
/// share over free ones whose neighbours are free too, a free share over fixed ones). Shares of groups taken apart
/// multiply.
Hookup normal_form(Hookup hookup);

/// The vessels in the order of the text.
std::vector<int> vessels_of(const Hookup& hookup);
/// Members of all besides: the length of a share vector.
int share_count(const Hookup& hookup);
/// Shares that can be chosen: of every beside the free members less one.
int free_shares_of(const Hookup& hookup);
/// The hookup with all shares fixed as given (order as in to_text), in normal form.
Hookup with_shares(const Hookup& hookup, const std::vector<double>& shares);

}  // namespace vatwright
