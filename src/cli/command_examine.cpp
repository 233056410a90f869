#include <ostream>

#include "finish.hpp"

namespace vatwright {
namespace {

Examined examine(const Problem& problem, const Hookup& hookup, const MadeBy& made_by, const Context& context) {
  HookupOptions options;
  options.profiles = true;
  return {head_of(problem, made_by, context.settings.stamp), rate_hookup(problem, hookup, options)};
}

void tell_unsolved_of(const Context& context, const Examined& answer, const std::string& of_case) {
  tell_unsolved(context, answer.rating.text + of_case, answer.rating.whole);
  for (const Rating& rating : answer.rating.vessels) tell_unsolved(context, rating.tag + of_case, rating);
}

}  // namespace

Exit run_examine(const Context& context) {
  const auto read = read_for(context);
  if (!read) return Exit::refused;
  const Problems& problems = *read->problems;
  const auto hookup = read_hookup("--hookup", context.settings.hookup, problems.base.site, context.err);
  if (!hookup) return Exit::refused;
  ExamineAnswer answer{examine(problems.base, *hookup, made_by(*read), context), {}};
  for (const auto& [name, problem] : problems.cases)
    answer.cases.emplace_back(name, examine(problem, *hookup, made_by(*read), context));
  return finish(context, answer,
                [&](const auto& of, const std::string& which) { tell_unsolved_of(context, of, which); });
}

}  // namespace vatwright
