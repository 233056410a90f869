// A wrong command line is told in plain words, with the nearest right one, and is exit status 2.
#include <fstream>
#include <sstream>

#include "program.hpp"
#include "support/catch.hpp"
#include "vatwright/cli/version.hpp"

using vatwright::Exit;

namespace {

using Arguments = std::vector<std::string>;

void refuses(const Arguments& arguments, const std::string& message) {
  const Ran ran = run_program(arguments);
  CHECK(ran.exit == Exit::refused);
  CHECK(ran.out.empty());
  CHECK(ran.err == "vatwright: " + message + "\n");
}

Arguments screen(const Arguments& more) {
  Arguments all = {"screen", fixture("bay.toml"), fixture("easy.toml")};
  all.insert(all.end(), more.begin(), more.end());
  return all;
}

}  // namespace

TEST_CASE("commands", "[cli]") {
  refuses({}, "expected a command: check, screen, examine, rank; try --help");
  refuses({"scren", "x"}, "unknown command \"scren\"; nearest known command: \"screen\"");
  refuses({"frobnicate"}, "unknown command \"frobnicate\"; known commands: check, screen, examine, rank");
  refuses({"--json", "screen"}, "expected a command before \"--json\": check, screen, examine, rank");
  refuses({"dossier", "a", "b"},
          "the command \"dossier\" is not part of this version; there are check, screen, examine, rank");
  refuses({"debottleneck"},
          "the command \"debottleneck\" is not part of this version; there are check, screen, examine, rank");
}

TEST_CASE("files", "[cli]") {
  refuses({"screen"}, "screen: expected two files, INVENTORY and DUTY; found none");
  refuses({"screen", "a.toml"}, "screen: expected two files, INVENTORY and DUTY; found one");
  refuses({"check"}, "check: expected a file, INVENTORY; found none");
  refuses({"screen", "a", "b", "c"}, "screen: \"c\" is one word too many; a text with spaces stands in quotes");
  refuses({"examine", "a", "b"}, "examine: expected --hookup TEXT, such as --hookup \"A then B\"");
}

TEST_CASE("options", "[cli]") {
  refuses(screen({"--jsn"}), "screen: unknown option \"--jsn\"; nearest known option: \"--json\"");
  refuses(screen({"--thread=2"}), "screen: unknown option \"--thread\"; nearest known option: \"--threads\"");
  refuses(screen({"--most", "2"}), "screen: no option \"--most\" here; it belongs to rank");
  const Ran ran = run_program(screen({"--csv"}));
  CHECK(ran.exit == Exit::refused);
  CHECK(ran.err.find("--csv") != std::string::npos);
  CHECK(run_program(screen({"--threads", "1", "--threads", "2"})).exit == Exit::refused);
}

TEST_CASE("values", "[cli]") {
  refuses(screen({"--threads", "0"}), "--threads: found \"0\"; expected a whole number from 1 to 256");
  refuses(screen({"--threads", "two"}), "--threads: found \"two\"; expected a whole number from 1 to 256");
  refuses(screen({"--units", "feild"}), "--units: found \"feild\"; expected one of trade, field; nearest: \"field\"");
  refuses(screen({"--offer", "idle,mothbaled"}),
          "--offer: found \"mothbaled\"; expected one of idle, mothballed, in-service; nearest: \"mothballed\"");
  refuses(screen({"--json", "--csv", "-"}),
          "--json and --csv - both want standard output; give --csv a file, or leave one of them out");
  refuses(screen({"--csv", ""}), "--csv: found an empty name; expected a file, or - for standard output");
  refuses(screen({"--csv", fixture("easy.toml")}),
          "--csv: \"" + fixture("easy.toml") + "\" is a file that is read; expected another one to write to");
  const Arguments rank = {"rank", fixture("bay.toml"), fixture("easy.toml")};
  const auto with = [&rank](const Arguments& more) {
    Arguments all = rank;
    all.insert(all.end(), more.begin(), more.end());
    return all;
  };
  refuses(with({"--most", "9"}), "--most: found \"9\"; expected a whole number from 1 to 8");
  refuses(with({"--top", "-1"}), "--top: found \"-1\"; expected a whole number from 1 to 1000000");
  refuses(with({"--by", "cost"}), "--by: found \"cost\"; expected one of fit, conversion, ceiling, yield");
  CHECK(run_program(with({"--by", "yield"})).exit == Exit::refused);
}

TEST_CASE("a wrong hookup is told with its place", "[cli]") {
  const Ran ran = run_program({"examine", fixture("bay.toml"), fixture("easy.toml"), "--hookup", "K-1 then K-7"});
  CHECK(ran.exit == Exit::refused);
  CHECK(ran.err.find("--hookup:10: ") == 0);
  CHECK(ran.err.find("\n  K-1 then K-7\n           ^\n") != std::string::npos);
  CHECK(run_program({"rank", fixture("bay.toml"), fixture("easy.toml"), "--today", "["}).exit == Exit::refused);
}

TEST_CASE("help and version answer", "[cli]") {
  for (const Arguments& arguments : {Arguments{"--help"}, Arguments{"-h"}, Arguments{"screen", "--help"},
                                     Arguments{"rank", "--help"}, Arguments{"examine", "x", "--help"}}) {
    const Ran ran = run_program(arguments);
    CHECK(ran.exit == Exit::answered);
    CHECK(ran.err.empty());
    std::istringstream lines(ran.out);
    for (std::string line; std::getline(lines, line);) CHECK(line.size() <= 80);
  }
  CHECK(run_program({"--version"}).out == "vatwright " + std::string(vatwright::version) + "\n");
}

TEST_CASE("the version is that of the build", "[cli]") {
  std::ostringstream build;
  build << std::ifstream(std::string(VATWRIGHT_SOURCE_DIR) + "/CMakeLists.txt").rdbuf();
  CHECK(build.str().find("project(vatwright VERSION " + std::string(vatwright::version) + " ") != std::string::npos);
}
