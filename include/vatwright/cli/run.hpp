#pragma once
#include <iosfwd>
#include <string>
#include <vector>

namespace vatwright {

/// Exit statuses of the program.
enum class Exit : int { answered = 0, nothing_fits = 1, refused = 2, unsolved = 3, unwritten = 4 };

/// Runs the program on its arguments (without the program's name), answers to `out`, all else to `err`.
/// terminal: `out` is a terminal (colour, letters beyond ASCII).
Exit run(const std::vector<std::string>& arguments, std::ostream& out, std::ostream& err, bool terminal = false);

}  // namespace vatwright
