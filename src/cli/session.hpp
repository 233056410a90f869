#pragma once
#include <functional>
#include <optional>
#include <string>

#include "command.hpp"
#include "vatwright/input/read.hpp"
#include "vatwright/report/answer.hpp"
#include "vatwright/report/look.hpp"

namespace vatwright {

/// The files of a command, read; what is wrong or worth a warning is told on `err`. Absent: refused.
std::optional<ReadResult> read_for(const Context& context);

MadeBy made_by(const ReadResult& read);
Look look_of(const Context& context);

/// Indices of the vessels of a site that --offer admits.
std::vector<int> offered(const Site& site, const Settings& settings);

/// The hookup that `text` names, in `site`; what is wrong with it is told on `err` with a mark under the place.
std::optional<Hookup> read_hookup(const std::string& option, const std::string& text, const Site& site,
                                  std::ostream& err);

/// The three ways an answer can be written, made only where asked for. csv absent: the command has no rows.
struct Forms {
  std::function<std::string()> json, page;
  std::function<std::string()> csv = {};
};
/// Writes the answer as the settings say. False: it could not be written (told on `err`).
bool write_answer(const Context& context, const Forms& forms);

/// What came of an answer; `exit_of` gives the status that comes first.
struct Outcomes {
  bool written = true, unsolved = false, fits = true;
};
Exit exit_of(const Settings& settings, const Outcomes& outcomes);

/// Tells on `err` where a rating was not solved.
void tell_unsolved(const Context& context, const std::string& name, const Rating& rating);

}  // namespace vatwright
