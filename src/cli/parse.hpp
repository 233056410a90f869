#pragma once
#include <string>
#include <vector>

#include "command.hpp"

namespace vatwright {

/// A command line, taken apart.
struct Parsed {
  const Command* command = nullptr;  ///< null: `text` is the whole answer (help, version), or there are faults
  Words words;
  std::string text;
  std::vector<std::string> faults;  ///< one line each; not empty: refused
};

/// Takes a command line apart and checks the names of commands and options; values are checked by settings_of.
Parsed parse_arguments(const std::vector<std::string>& arguments);

}  // namespace vatwright
