#include "vatwright/report/answer.hpp"

#include <algorithm>
#include <numeric>

#include "vatwright/quantity/show.hpp"

namespace vatwright {
namespace {

std::string asks(const std::string& what, double bound, bool at_least, Shown shown) {
  return what + (at_least ? " at least " : " at most ") + show(bound, shown);
}

std::string text_of_demand(const Demand& demand, const Feed& feed) {
  const std::string& species = feed.species[static_cast<std::size_t>(demand.species)].name;
  switch (demand.on) {
    case Demand::On::yield:
      return asks("yield of " + species, demand.bound, demand.at_least, Shown::percent);
    case Demand::On::selectivity:
      return asks("selectivity to " + species, demand.bound, demand.at_least, Shown::percent);
    case Demand::On::fraction:
      return asks("fraction of " + species, demand.bound, demand.at_least, Shown::percent);
    case Demand::On::concentration:
      break;
  }
  if (feed.amounts == Amounts::mass)
    return asks(species + " in the outlet", demand.bound, demand.at_least, Shown::density);
  return asks(species + " in the outlet", demand.bound, demand.at_least, Shown::concentration);
}

std::vector<std::string> target_words(const Duty& duty) {
  std::vector<std::string> words;
  if (duty.target.conversion)
    words.push_back(asks("conversion of " + duty.conversion_of, *duty.target.conversion, true, Shown::percent));
  for (const Demand& demand : duty.target.demands) words.push_back(text_of_demand(demand, duty.chemistry.feed));
  return words;
}

/// Applies `rating_of` to every case and judges the base together with them.
template <class Answer, class RatingOf>
OverCases over(const Answer& answer, RatingOf rating_of) {
  std::vector<std::pair<std::string, const Rating*>> cases;
  for (const auto& [name, of_case] : answer.cases) cases.emplace_back(name, &rating_of(of_case));
  return over_cases(rating_of(answer), cases);
}

template <class Answer>
bool case_unsolved(const Answer& answer) {
  return std::any_of(answer.cases.begin(), answer.cases.end(),
                     [](const auto& c) { return anything_unsolved(alone(c.second)); });
}

}  // namespace

Head head_of(const Problem& problem, const MadeBy& made_by, const std::optional<std::string>& stamp) {
  const Duty& duty = problem.duty;
  const Feed& feed = duty.chemistry.feed;
  Head head;
  head.made_by = made_by;
  head.stamp = stamp;
  head.site = problem.site.name;
  head.duty = duty.name;
  head.conversion_of = duty.conversion_of;
  head.amounts = feed.amounts;
  for (const Species& species : feed.species) head.species.push_back(species.name);
  head.feed_m3_s = duty.target.feed_m3_s;
  head.feed_mol_s = duty.target.feed_m3_s * std::accumulate(feed.c_mol_m3.begin(), feed.c_mol_m3.end(), 0.0);
  head.target = target_words(duty);
  head.conversion_asked = duty.target.conversion;
  for (const Demand& demand : duty.target.demands)
    if (demand.on == Demand::On::yield && !head.yield_asked) head.yield_asked = demand.bound;
  head.assumed = problem.assumed;
  head.assumed.push_back(assumed_search());
  head.not_asked = not_asked(problem);
  head.cautions = cautions_of(problem);
  return head;
}

std::string_view text_of(By by) {
  switch (by) {
    case By::fit:
      return "fit";
    case By::conversion:
      return "conversion";
    case By::ceiling:
      return "ceiling";
    case By::yield:
      break;
  }
  return "yield";
}

OverCases over_cases_of(const ScreenAnswer& answer, std::size_t i) {
  return over(answer, [i](const Screened& a) -> const Rating& { return a.vessels[i]; });
}
OverCases over_cases_of(const ExamineAnswer& answer) {
  return over(answer, [](const Examined& a) -> const Rating& { return a.rating.whole; });
}
OverCases over_cases_of(const ExamineAnswer& answer, std::size_t i) {
  return over(answer, [i](const Examined& a) -> const Rating& { return a.rating.vessels[i]; });
}

bool anything_fits(const ScreenAnswer& answer) {
  for (std::size_t i = 0; i < answer.vessels.size(); ++i)
    if (over_cases_of(answer, i).verdict == Verdict::fits) return true;
  return false;
}
bool anything_fits(const ExamineAnswer& answer) { return over_cases_of(answer).verdict == Verdict::fits; }
bool anything_fits(const RankAnswer& answer) {
  for (std::size_t i = 0; i < answer.ranking.top.size(); ++i) {
    const Verdict base = answer.ranking.top[i].rating.whole.verdict;
    if ((i < answer.over_top.size() ? answer.over_top[i].verdict : base) == Verdict::fits) return true;
  }
  return false;
}

bool anything_unsolved(const ScreenAnswer& answer) {
  return case_unsolved(answer) || std::any_of(answer.vessels.begin(), answer.vessels.end(),
                                              [](const Rating& rating) { return rating.unsolved; });
}
bool anything_unsolved(const ExamineAnswer& answer) {
  return case_unsolved(answer) || answer.rating.whole.unsolved ||
         std::any_of(answer.rating.vessels.begin(), answer.rating.vessels.end(),
                     [](const Rating& rating) { return rating.unsolved; });
}
bool anything_unsolved(const RankAnswer& answer) { return case_unsolved(answer) || answer.ranking.unsolved; }

}  // namespace vatwright
