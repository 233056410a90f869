#pragma once
#include <iosfwd>
#include <string>
#include <vector>

namespace vatwright {

/// Exit statuses of the program. Where several apply: refused, unwritten, unsolved, nothing_fits, in this order.
enum class Exit : int { answered = 0, nothing_fits = 1, refused = 2, unsolved = 3, unwritten = 4 };

/// What the two streams are. A terminal gets letters beyond ASCII; `colour` only where it is a terminal and NO_COLOR is
/// not set.
struct Terminals {
  bool out = false, err = false;
  bool colour = false;
};

/// Runs the program on its arguments (without the program's name), answers to `out`, all else to `err`.
/// A stream that fails is noticed: Exit::unwritten. Throws nothing.
Exit run(const std::vector<std::string>& arguments, std::ostream& out, std::ostream& err,
         const Terminals& terminals = {});

}  // namespace vatwright
