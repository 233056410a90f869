// Exit statuses: the first of 2, 4, 3, 1 that applies, else 0.
#include <fcntl.h>
#include <unistd.h>

#include <array>
#include <csignal>
#include <filesystem>
#include <ostream>
#include <sstream>

#include "program.hpp"
#include "support/catch.hpp"
#include "vatwright/cli/descriptor.hpp"

using vatwright::Exit;

namespace {

/// A stream that takes nothing, as a full disk does.
struct Full : std::streambuf {
  int_type overflow(int_type) override { return traits_type::eof(); }
};

Exit run_into(std::ostream& out, const std::vector<std::string>& arguments, std::string& err) {
  std::ostringstream errors;
  const Exit exit = vatwright::run(arguments, out, errors);
  err = errors.str();
  return exit;
}

}  // namespace

TEST_CASE("0 answered, 1 nothing fits", "[cli][exit]") {
  const std::string bay = fixture("bay.toml");
  CHECK(run_program({"screen", bay, fixture("easy.toml"), "--require-fit"}).exit == Exit::answered);
  CHECK(run_program({"screen", bay, fixture("hard.toml")}).exit == Exit::answered);
  for (const char* command : {"screen", "rank"})
    CHECK(run_program({command, bay, fixture("hard.toml"), "--require-fit"}).exit == Exit::nothing_fits);
  CHECK(run_program({"examine", bay, fixture("hard.toml"), "--require-fit", "--hookup", "K-1"}).exit ==
        Exit::nothing_fits);
  CHECK(run_program({"screen", bay, fixture("easy.toml"), "--require-fit", "--offer", "in-service"}).exit ==
        Exit::nothing_fits);
}

TEST_CASE("2 comes before 4", "[cli][exit]") {
  CHECK(run_program({"screen", fixture("absent.toml"), fixture("easy.toml")}).exit == Exit::refused);
  CHECK(run_program({"screen", fixture("easy.toml"), fixture("bay.toml")}).exit == Exit::refused);
  CHECK(run_program({"screen", fixture("bay.toml"), fixture("easy.toml"), "--feed-rate", "2 m2"}).exit ==
        Exit::refused);
  Full full;
  std::ostream out(&full);
  std::string err;
  CHECK(run_into(out, {"screen", fixture("absent.toml"), fixture("easy.toml")}, err) == Exit::refused);
}

TEST_CASE("4 where the answer can not be written, before 1", "[cli][exit]") {
  const std::vector<std::string> screen = {"screen", fixture("bay.toml"), fixture("hard.toml"), "--require-fit"};
  for (const char* form : {"--json", "--quiet"}) {
    Full full;
    std::ostream out(&full);
    std::string err;
    auto arguments = screen;
    arguments.emplace_back(form);
    CHECK(run_into(out, arguments, err) == Exit::unwritten);
    CHECK(err.find("could not be written") != std::string::npos);
  }
  auto arguments = screen;
  arguments.insert(arguments.end(), {"--csv", fixture("no/such/folder.csv")});
  const Ran ran = run_program(arguments);
  CHECK(ran.exit == Exit::unwritten);
  CHECK(ran.err.find("folder.csv") != std::string::npos);
  CHECK_FALSE(ran.out.empty());  // the other form is still answered
  Full full;
  std::ostream out(&full);
  std::string err;
  CHECK(run_into(out, {"--help"}, err) == Exit::unwritten);
}

TEST_CASE("3 where something can not be solved, said of which vessel, and the rest is answered", "[cli][exit]") {
  // Two reactions in a circle that both take up heat: at a low feed rate no temperature above 0 K balances.
  const std::vector<std::string> screen = {"screen", fixture("bay.toml"), fixture("circle.toml"), "--json"};
  const Ran ran = run_program(screen);
  CHECK(ran.exit == Exit::unsolved);
  CHECK(ran.err.find("P-1: could not be solved") != std::string::npos);
  CHECK(ran.out.find("\"conversion\": null") != std::string::npos);
  auto fast = screen;  // at a high one there is: the tube's X = (1 - exp(-2 k tau))/2 by hand
  fast.insert(fast.end(), {"--feed-rate", "18 m3/h"});
  const Ran answered = run_program(fast);
  CHECK(answered.exit == Exit::unsolved);  // its window reaches down to where nothing is solved
  CHECK(answered.out.find("\"conversion\": 0.3051694313") != std::string::npos);

  auto wanted = screen;
  wanted.emplace_back("--require-fit");
  CHECK(run_program(wanted).exit == Exit::unsolved);  // before 1
  Full full;
  std::ostream out(&full);
  std::string err;
  CHECK(run_into(out, screen, err) == Exit::unwritten);  // after 4
}

TEST_CASE("a reader that has gone is quiet, a full disk is not", "[cli][exit]") {
  std::signal(SIGPIPE, SIG_IGN);  // as the program does
  std::array<int, 2> ends{};
  REQUIRE(pipe(ends.data()) == 0);
  close(ends[0]);
  const std::vector<std::string> arguments = {"screen", fixture("bay.toml"), fixture("easy.toml"), "--json"};
  std::string err;
  {
    vatwright::DescriptorBuffer buffer(ends[1]);
    std::ostream out(&buffer);
    CHECK(run_into(out, arguments, err) == Exit::answered);
    CHECK(err.empty());
  }
  close(ends[1]);
  const int full = open("/dev/full", O_WRONLY);
  if (full < 0) return;  // not every system has it
  {
    vatwright::DescriptorBuffer buffer(full);
    std::ostream out(&buffer);
    CHECK(run_into(out, arguments, err) == Exit::unwritten);
  }
  close(full);
}
