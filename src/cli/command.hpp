#pragma once
#include <iosfwd>
#include <string>
#include <string_view>
#include <vector>

#include "options.hpp"
#include "vatwright/cli/run.hpp"

namespace vatwright {

/// Where a command reads its settings from and writes to.
struct Context {
  const Settings& settings;
  std::ostream& out;
  std::ostream& err;
  const Terminals& terminals;
};

/// One command: its name, what it is for, which options it takes, and what it does.
struct Command {
  std::string_view name, summary;
  enum class Needs { inventory, inventory_and_duty } needs;
  std::vector<std::string_view> options;  ///< besides --help
  Exit (*run)(const Context&);
};

/// The one list.
const std::vector<Command>& all_commands();

Exit run_check(const Context&);
Exit run_screen(const Context&);
Exit run_examine(const Context&);
Exit run_rank(const Context&);

}  // namespace vatwright
