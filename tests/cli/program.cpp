#include "program.hpp"

#include <sstream>

Ran run_program(const std::vector<std::string>& arguments, const vatwright::Terminals& terminals) {
  std::ostringstream out, err;
  const vatwright::Exit exit = vatwright::run(arguments, out, err, terminals);
  return {exit, out.str(), err.str()};
}

std::string fixture(const std::string& name) {
  return std::string(VATWRIGHT_SOURCE_DIR) + "/tests/cli/fixtures/" + name;
}
