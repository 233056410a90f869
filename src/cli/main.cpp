#include <unistd.h>

#include <csignal>
#include <cstdlib>
#include <ostream>

#include "vatwright/cli/descriptor.hpp"
#include "vatwright/cli/run.hpp"

namespace {

bool no_color() {
  const char* value = std::getenv("NO_COLOR");
  return value != nullptr && *value != '\0';
}

}  // namespace

int main(int argc, char** argv) {
  std::signal(SIGPIPE, SIG_IGN);  // a reader that goes away is noticed where it is written to
  vatwright::DescriptorBuffer out_buffer(STDOUT_FILENO), err_buffer(STDERR_FILENO);
  std::ostream out(&out_buffer), err(&err_buffer);
  err << std::unitbuf;
  const vatwright::Terminals terminals{isatty(STDOUT_FILENO) != 0, isatty(STDERR_FILENO) != 0, !no_color()};
  return static_cast<int>(vatwright::run({argv + (argc > 0 ? 1 : 0), argv + argc}, out, err, terminals));
}
