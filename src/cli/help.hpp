#pragma once
#include <string>

#include "command.hpp"

namespace vatwright {

/// The help of the program, and of one command: at most 80 columns, ASCII.
std::string help_text();
std::string help_text(const Command& command);

}  // namespace vatwright
