#include <ostream>

#include "finish.hpp"
#include "progress.hpp"
#include "stop.hpp"
#include "vatwright/hookup/objective.hpp"
#include "vatwright/numeric/pool.hpp"

namespace vatwright {
namespace {

RankedHookups rank_problem(const Problem& problem, RankOptions options, const MadeBy& made_by, const Context& context,
                           const std::string& what) {
  Progress progress(context, what, 0);
  const StopOnInterrupt stop;
  options.stopped = [] { return StopOnInterrupt::asked(); };
  options.progress = [&progress](long long done, long long total) { progress.at(done, total); };
  RankedHookups answer;
  answer.head = head_of(problem, made_by, context.settings.stamp);
  answer.by = options.by;
  answer.ranking = rank(problem, offered(problem.site, context.settings), options);
  progress.end();
  return answer;
}

/// Shares are chosen anew in every case, as an operator would.
Hookup with_free_shares(Hookup hookup) {
  for (auto& share : hookup.shares) share.reset();
  for (Hookup& part : hookup.parts) part = with_free_shares(std::move(part));
  return hookup;
}

/// One hookup judged over base and all cases.
OverCases judge_over_cases(const Problems& problems, const Hookup& hookup, const Rating& base) {
  std::vector<HookupRating> ratings;
  for (const auto& [name, problem] : problems.cases) ratings.push_back(rate_hookup(problem, hookup));
  std::vector<std::pair<std::string, const Rating*>> cases;
  for (std::size_t i = 0; i < ratings.size(); ++i) cases.emplace_back(problems.cases[i].first, &ratings[i].whole);
  return over_cases(base, cases);
}

void add_cases(RankAnswer& answer, const Problems& problems, const RankOptions& options, const MadeBy& made_by,
               const Context& context) {
  for (const auto& [name, problem] : problems.cases)
    answer.cases.emplace_back(name, rank_problem(problem, options, made_by, context, "hookups rated (" + name + ")"));
  if (problems.cases.empty()) return;
  const std::vector<Ranked>& top = answer.ranking.top;
  answer.over_top.resize(top.size());
  for_each_index(top.size(), options.threads, [&](std::size_t i) {
    const auto hookup = parse_hookup(top[i].rating.text, problems.base.site);
    answer.over_top[i] = judge_over_cases(problems, with_free_shares(std::get<Hookup>(hookup)), top[i].rating.whole);
  });
  if (answer.ranking.today)
    answer.over_today = judge_over_cases(problems, *options.today, answer.ranking.today->rating.whole);
}

void tell_unsolved_of(const Context& context, const RankedHookups& answer, const std::string& of_case) {
  if (!answer.ranking.unsolved) return;
  bool told = false;
  for (const Ranked& ranked : answer.ranking.top) {
    tell_unsolved(context, ranked.rating.text + of_case, ranked.rating.whole);
    told = told || ranked.rating.whole.unsolved;
  }
  if (!told)
    context.err << "rank" << of_case << ": some hookups, none of those shown, could not be solved; examine tells why\n";
}

}  // namespace

Exit run_rank(const Context& context) {
  const auto read = read_for(context);
  if (!read) return Exit::refused;
  const Problems& problems = *read->problems;
  const Settings& settings = context.settings;
  RankOptions options;
  options.most = settings.most;
  options.top = settings.top;
  options.by = settings.by;
  options.exact = settings.exact;
  options.threads = settings.threads;
  if (settings.by == By::yield && !yield_asked(problems.base.duty)) {
    context.err
        << "--by yield: the duty asks no yield; expected [target] with yield = { species = .., at_least = .. }\n";
    return Exit::refused;
  }
  if (settings.today) {
    options.today = read_hookup("--today", *settings.today, problems.base.site, context.err);
    if (!options.today) return Exit::refused;
  }
  RankAnswer answer = alone(rank_problem(problems.base, options, made_by(*read), context, "hookups rated"));
  add_cases(answer, problems, options, made_by(*read), context);
  return finish(context, answer,
                [&](const auto& of, const std::string& which) { tell_unsolved_of(context, of, which); });
}

}  // namespace vatwright
