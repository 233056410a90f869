#pragma once
#include <string>

#include "session.hpp"
#include "vatwright/report/csv.hpp"
#include "vatwright/report/json.hpp"
#include "vatwright/report/page.hpp"

namespace vatwright {

/// The end of every command that rates: tells what was not solved, of the base and of each case, writes the answer as
/// the settings say, and gives the status. tell_unsolved_of(answer, " (case)").
template <class Answer, class Tell>
Exit finish(const Context& context, const Answer& answer, const Tell& tell_unsolved_of) {
  tell_unsolved_of(answer, std::string());
  for (const auto& [name, of_case] : answer.cases) tell_unsolved_of(of_case, " (" + name + ")");
  const bool written =
      write_answer(context, {[&] { return to_json(answer); }, [&] { return to_page(answer, look_of(context)); },
                             [&] { return to_csv(answer); }});
  return exit_of(context.settings, {written, anything_unsolved(answer), anything_fits(answer)});
}

}  // namespace vatwright
