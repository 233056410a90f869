#pragma once
#include <string>
#include <vector>

#include "vatwright/cli/run.hpp"

/// What one run of the program gave.
struct Ran {
  vatwright::Exit exit;
  std::string out, err;
};
Ran run_program(const std::vector<std::string>& arguments, const vatwright::Terminals& terminals = {});

/// A file of tests/cli/fixtures.
std::string fixture(const std::string& name);
