#pragma once
#include <optional>
#include <string>
#include <vector>

namespace vatwright::reference {

/// One line of `=== expect`: where in the answer, what stands there, how near.
///   pointer   value   [tolerance relative|absolute]
/// pointer: members and elements parted by strokes; an element by its place, or by its tag or name; in quotes where
/// there is a space in it. value is JSON; a pointer that ends in /size counts the elements of an array.
struct Expectation {
  int line = 0;
  std::string pointer, value;
  double tolerance = 0;  ///< 0: equal
  bool relative = true;
};

/// One published check, as its text file says it.
struct Case {
  std::string file, source, inventory, duty;
  std::vector<std::string> command;  ///< screen, or examine --hookup "A then B", ..
  std::vector<Expectation> expected;
  int exit = 0;
  std::vector<std::string> faults;  ///< what is wrong with the file itself
};

/// Reads a case from its text. Nothing is thrown: what is wrong is told in `faults`.
Case read_case(const std::string& file, const std::string& text);

/// Runs the program on the case and compares. Empty: all as expected; else one sentence for each difference.
std::vector<std::string> differences(const Case& c);

}  // namespace vatwright::reference
