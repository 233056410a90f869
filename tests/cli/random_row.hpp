#pragma once
// What the rows of random duties have in common, turned into text of an inventory or a duty.
#include <string>
#include <vector>

#include "reference_case.hpp"

namespace vatwright::reference {

using Words = std::vector<std::string>;
Words split(const std::string& text, const std::string& by);
Words words(const std::string& text);
std::string number(double x);
/// A [[reaction]] from "A -> B ; k .. ; orders A 1 ; E .. at .. ; releases ..".
std::string reaction_text(const std::string& text, std::size_t index);
/// A [feed] (and [species] with heat capacities). contents: "A 12 B .."; heat: J/m3/K of a liquid, J/mol/K of every
/// species of a gas, "-" where not asked.
std::string feed_text(const std::string& phase, const std::string& kelvin, const std::string& pascal,
                      const std::string& contents, const std::string& heat);

/// Runs the program on every row of a file of tests/reference/random; each difference is a failed check. How many rows.
int rows_as_expected(const std::string& file,
                     Case (*case_of)(const std::string& row, const std::string& place, int line));

}  // namespace vatwright::reference
