#include <ostream>

#include "finish.hpp"
#include "progress.hpp"
#include "vatwright/numeric/pool.hpp"

namespace vatwright {
namespace {

Screened screen(const Problem& problem, const MadeBy& made_by, const Context& context, Progress& progress) {
  const std::vector<int> vessels = offered(problem.site, context.settings);
  Screened answer;
  answer.head = head_of(problem, made_by, context.settings.stamp);
  answer.vessels.resize(vessels.size());
  for_each_index(vessels.size(), context.settings.threads, [&](std::size_t i) {
    answer.vessels[i] = rate(problem, problem.site.vessels[static_cast<std::size_t>(vessels[i])]);
    progress.one_more();
  });
  return answer;
}

void tell_unsolved_of(const Context& context, const Screened& answer, const std::string& of_case) {
  for (const Rating& rating : answer.vessels) tell_unsolved(context, rating.tag + of_case, rating);
}

}  // namespace

Exit run_screen(const Context& context) {
  const auto read = read_for(context);
  if (!read) return Exit::refused;
  const Problems& problems = *read->problems;
  const auto vessels = static_cast<long long>(offered(problems.base.site, context.settings).size());
  Progress progress(context, "vessels rated", vessels * (1 + static_cast<long long>(problems.cases.size())));
  ScreenAnswer answer{screen(problems.base, made_by(*read), context, progress), {}};
  for (const auto& [name, problem] : problems.cases)
    answer.cases.emplace_back(name, screen(problem, made_by(*read), context, progress));
  progress.end();
  return finish(context, answer,
                [&](const auto& of, const std::string& which) { tell_unsolved_of(context, of, which); });
}

}  // namespace vatwright
