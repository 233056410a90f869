#include "vatwright/ranking/rank.hpp"

#include <algorithm>

#include "kept_out.hpp"
#include "line_ranking.hpp"
#include "vatwright/error/expects.hpp"
#include "vatwright/numeric/pool.hpp"
#include "vatwright/ranking/enumerate.hpp"
#include "visiting.hpp"

namespace vatwright {
namespace {

bool is_certain(const Entry& e) { return e.split_certain && (!e.ceiling || e.ceiling->certain); }

RankedSet ranked_set(const Problem& problem, const std::vector<int>& offered, const RankOptions& options,
                     std::optional<Twins>& twins, std::optional<Rater>& rater, std::unique_ptr<OnOneLine>& line,
                     std::string& why) {
  line = OnOneLine::find(problem, offered, options, why);
  if (line)
    twins.emplace(line->twins());
  else
    twins.emplace(problem, offered);
  if (line && !options.visit) {
    rater.emplace(problem, options, *twins,
                  Rater::Known{[&line](const Hookup& h) { return line->shares_of(h); },
                               [&line](const Hookup& h) { return line->ceiling_of(h); }});
    if (auto set = rank_on_line(*line, *rater)) return *std::move(set);
  } else {
    rater.emplace(problem, options, *twins);
  }
  RankedSet set = visit_all(*rater, offered);
  // where every hookup was rated and no split could be better, the order is proved as well
  if (line && !options.visit && set.complete == "visited" && std::ranges::all_of(set.entries, is_certain)) {
    set.complete = "proved";
    set.within = line->within(options.by, set.entries);
  }
  return set;
}

/// The places asked, today's, and the kept out, each with all that is told of it.
void tell_places(const Rater& rater, const RankedSet& set, const std::vector<std::size_t>& order, Ranking& out) {
  const auto places = std::min(order.size(), static_cast<std::size_t>(std::max(0, rater.options().top)));
  std::vector<const Entry*> told;
  for (std::size_t k = 0; k < places; ++k) told.push_back(&set.entries[order[k]]);
  if (set.today) told.push_back(&*set.today);
  std::vector<Ranked> ranked(told.size());
  for_each_index(told.size(), rater.options().threads,
                 [&](std::size_t k) { ranked[k] = rater.tell(*told[k], k < places || set.today_listed); });
  for (const Ranked& r : ranked) out.unsolved = out.unsolved || r.rating.whole.unsolved;
  if (set.today) {
    out.today = std::move(ranked.back());
    out.today_place = set.today_place;
    ranked.pop_back();
  }
  out.top = std::move(ranked);
}

/// Of every number of vessels the first by the order of those with so many.
void tell_stair(const RankedSet& set, const RankOptions& options, Ranking& out) {
  for (int n = 1; n <= std::min(options.most, out.offered); ++n) {
    std::vector<Entry> of_size;
    std::ranges::copy_if(set.entries, std::back_inserter(of_size), [&](const Entry& e) { return e.vessel_count == n; });
    Stair step{n, std::nullopt, std::nullopt};
    if (!of_size.empty()) {
      const Entry& first = of_size[in_order(of_size, options).front()];
      step.best = first.text;
      step.value = value_of(first, options.by);
    }
    out.stair.push_back(std::move(step));
  }
}

}  // namespace

Ranking rank(const Problem& problem, const std::vector<int>& offered, const RankOptions& options) {
  VATWRIGHT_EXPECTS(options.by != By::yield || yield_asked(problem.duty));
  std::optional<Twins> twins;
  std::optional<Rater> rater;
  std::unique_ptr<OnOneLine> line;
  Ranking out;
  const RankedSet set = ranked_set(problem, offered, options, twins, rater, line, out.why_not_proved);
  out.offered = static_cast<int>(offered.size());
  out.most = options.most;
  out.hookups = count_hookups_up_to(out.offered, options.most).value_or(-1);
  out.rated = set.rated;
  out.complete = set.complete;
  out.why_partly = set.why_partly;
  out.within = set.within;
  out.unsolved = set.unsolved;
  const auto order = in_order(set.entries, options);
  tell_places(*rater, set, order, out);
  if (line && !order.empty()) out.kept_out = kept_out(*line, *rater, set.entries[order.front()]);
  tell_stair(set, options, out);
  return out;
}

}  // namespace vatwright
