#include "session.hpp"
#include "vatwright/report/json.hpp"
#include "vatwright/report/page.hpp"

namespace vatwright {

Exit run_check(const Context& context) {
  const auto read = read_for(context);
  if (!read) return Exit::refused;
  CheckAnswer answer;
  if (read->problems) {
    answer.head = head_of(read->problems->base, made_by(*read), context.settings.stamp);
    answer.head.assumed = read->problems->base.assumed;  // nothing is rated, no window searched
  } else {
    answer.head.made_by = made_by(*read);
    answer.head.stamp = context.settings.stamp;
    answer.head.site = read->site->name;
  }
  answer.understood = read->understood;
  answer.diagnostics = read->diagnostics;
  const bool written =
      write_answer(context, {[&] { return to_json(answer); }, [&] { return to_page(answer, look_of(context)); }});
  return exit_of(context.settings, {written, false, true});
}

}  // namespace vatwright
