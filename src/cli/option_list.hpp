#pragma once
#include <string>
#include <string_view>
#include <vector>

#include "options.hpp"

namespace vatwright {

/// One option, declared once: the parser, the help and the hints read it here.
struct Option {
  std::string_view name;
  std::string_view value;  ///< what stands for its value in the help; empty: it takes none
  std::string_view help;
  std::string Words::*text = nullptr;
  bool Words::*flag = nullptr;
};

/// All options of all commands.
const std::vector<Option>& all_options();
/// The one of that name; it is there.
const Option& option_of(std::string_view name);

}  // namespace vatwright
