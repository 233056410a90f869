#pragma once
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "vatwright/error/diagnostic.hpp"
#include "vatwright/ranking/rank.hpp"
#include "vatwright/rating/cases.hpp"

namespace vatwright {

/// What made an answer, and of what.
struct MadeBy {
  std::string version, inventory_sha256, duty_sha256;  ///< hex; empty: there was no such file
};

/// What every answer says before its own figures.
struct Head {
  MadeBy made_by;
  std::optional<std::string> stamp;  ///< a text of the user's
  std::string site, duty;            ///< duty empty: none was given
  std::string conversion_of;
  Amounts amounts = Amounts::moles;
  std::vector<std::string> species;             ///< in the order of every answer
  std::optional<double> feed_m3_s, feed_mol_s;  ///< feed_mol_s: all named species; kg/s under amounts by mass
  std::vector<std::string> target;              ///< what the duty asks, in words: "conversion of A at least 90 %"
  std::optional<double> conversion_asked, yield_asked;  ///< yield: the first that is asked
  std::vector<Assumed> assumed;
  std::vector<std::string> not_asked;
  std::vector<Caution> cautions;
};

/// The head of an answer about one problem (the base, or one case).
Head head_of(const Problem& problem, const MadeBy& made_by, const std::optional<std::string>& stamp);

/// The answers for each case of a duty, in the order of the file.
template <class T>
using ByCase = std::vector<std::pair<std::string, T>>;

/// `screen`: every vessel by itself.
struct Screened {
  Head head;
  std::vector<Rating> vessels;
};
/// The base, and every case with the same vessels in the same order.
struct ScreenAnswer : Screened {
  ByCase<Screened> cases;
};

/// `examine`: one hookup in depth.
struct Examined {
  Head head;
  HookupRating rating;
};
struct ExamineAnswer : Examined {
  ByCase<Examined> cases;
};

/// `rank`: the best of all hookups.
struct RankedHookups {
  Head head;
  By by = By::fit;
  Ranking ranking;
};
/// Over cases, the order is that of the base; the verdict of each place is the worst of base and cases (over_top, one
/// for each place; empty without cases).
struct RankAnswer : RankedHookups {
  std::vector<OverCases> over_top;
  std::optional<OverCases> over_today;
  ByCase<RankedHookups> cases;
};

/// One case as an answer of its own, without cases.
inline ScreenAnswer alone(const Screened& of_case) { return {of_case, {}}; }
inline ExamineAnswer alone(const Examined& of_case) { return {of_case, {}}; }
inline RankAnswer alone(const RankedHookups& of_case) { return {of_case, {}, {}, {}}; }

/// `check`: what was understood of the files.
struct CheckAnswer {
  Head head;
  std::vector<std::string> understood;
  Diagnostics diagnostics;
};

std::string_view text_of(By by);  ///< "fit", "conversion", "ceiling", "yield"

/// Verdict, worst case and common windows of vessel `i` of a screen, of the whole of a hookup, of its vessel `i`.
OverCases over_cases_of(const ScreenAnswer& answer, std::size_t i);
OverCases over_cases_of(const ExamineAnswer& answer);
OverCases over_cases_of(const ExamineAnswer& answer, std::size_t i);

/// Whether something fits over all cases (--require-fit), and whether something could not be solved (exit status).
bool anything_fits(const ScreenAnswer& answer);
bool anything_fits(const ExamineAnswer& answer);
bool anything_fits(const RankAnswer& answer);
bool anything_unsolved(const ScreenAnswer& answer);
bool anything_unsolved(const ExamineAnswer& answer);
bool anything_unsolved(const RankAnswer& answer);

}  // namespace vatwright
