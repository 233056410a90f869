// What is written where, and that it is the same whatever the number of threads.
#include <algorithm>
#include <filesystem>
#include <fstream>
#include <nlohmann/json.hpp>
#include <sstream>

#include "program.hpp"
#include "support/catch.hpp"
#include "vatwright/report/layout.hpp"

using vatwright::Exit;
using Json = nlohmann::ordered_json;

namespace {

using Arguments = std::vector<std::string>;

const Arguments all_answers[] = {
    {"check", fixture("bay.toml")},
    {"check", fixture("bay.toml"), fixture("cases.toml")},
    {"screen", fixture("bay.toml"), fixture("easy.toml")},
    {"screen", fixture("bay.toml"), fixture("cases.toml")},
    {"examine", fixture("bay.toml"), fixture("easy.toml"), "--hookup", "K-1 beside K-2 then P-1"},
    {"examine", fixture("bay.toml"), fixture("cases.toml"), "--hookup", "[40% K-1 beside 60% K-2]"},
    {"rank", fixture("bay.toml"), fixture("easy.toml"), "--today", "K-1"},
    {"rank", fixture("bay.toml"), fixture("cases.toml"), "--by", "ceiling", "--most", "2"},
    {"--help"},
};

Arguments with(Arguments arguments, const Arguments& more) {
  arguments.insert(arguments.end(), more.begin(), more.end());
  return arguments;
}

bool is_check_or_help(const Arguments& arguments) { return arguments[0] == "check" || arguments[0] == "--help"; }

}  // namespace

TEST_CASE("every answer keeps to 80 columns and to ASCII, on a terminal to 80 columns", "[cli][output]") {
  for (const Arguments& arguments : all_answers)
    for (const bool terminal : {false, true}) {
      const Ran ran = run_program(arguments, {terminal, terminal, false});
      INFO(arguments[0] << "\n" << ran.out << ran.err);
      CHECK(ran.exit == Exit::answered);
      std::istringstream lines(ran.out);
      for (std::string line; std::getline(lines, line);) CHECK(vatwright::width_of(line) <= vatwright::page_width);
      if (!terminal)
        CHECK(std::all_of(ran.out.begin(), ran.out.end(), [](char c) { return c == '\n' || (c >= ' ' && c <= '~'); }));
      for (const char* never : {"safe", "approved", "guaranteed"}) CHECK(ran.out.find(never) == std::string::npos);
    }
}

TEST_CASE("the same bytes with one thread and with three", "[cli][output]") {
  for (const Arguments& arguments : all_answers) {
    if (is_check_or_help(arguments)) continue;
    const Ran one = run_program(with(arguments, {"--json", "--threads", "1"}));
    const Ran three = run_program(with(arguments, {"--json", "--threads", "3"}));
    CHECK(one.out == three.out);
    CHECK(Json::parse(one.out).contains("made_by"));
  }
}

TEST_CASE("the answer says what it was made of", "[cli][output]") {
  const Json json =
      Json::parse(run_program({"screen", fixture("bay.toml"), fixture("easy.toml"), "--json", "--stamp", "run 7"}).out);
  CHECK(json["stamp"] == "run 7");
  CHECK(json["site"] == "Test bay");
  CHECK(json["duty"] == "A to B");
  CHECK(json["made_by"]["inventory_sha256"].get<std::string>().size() == 64);
  CHECK(json["feed_m3_s"].get<double>() == Approx(2.0 / 3600).epsilon(1e-14));
  CHECK(json["feed_mol_s"].get<double>() == Approx(2000.0 / 3600).epsilon(1e-14));  // 2 m3/h of 1 mol/L
}

TEST_CASE("only idle vessels are offered unless asked; examine takes any", "[cli][output]") {
  const auto tags = [](const Arguments& more) {
    Arguments arguments = with({"screen", fixture("bay.toml"), fixture("easy.toml"), "--json"}, more);
    std::vector<std::string> found;
    const Json json = Json::parse(run_program(arguments).out);
    for (const Json& vessel : json["vessels"]) found.push_back(vessel["tag"]);
    return found;
  };
  CHECK(tags({}) == std::vector<std::string>{"K-1", "K-2", "P-1"});
  CHECK(tags({"--offer", "idle,mothballed"}) == std::vector<std::string>{"K-1", "K-2", "P-1", "K-9"});
  CHECK(tags({"--offer", "mothballed"}) == std::vector<std::string>{"K-9"});
  CHECK(run_program({"examine", fixture("bay.toml"), fixture("easy.toml"), "--hookup", "K-9"}).exit == Exit::answered);
}

TEST_CASE("the option feed-rate stands in place of the duty's", "[cli][output]") {
  const Ran ran =
      run_program({"screen", fixture("bay.toml"), fixture("easy.toml"), "--json", "--feed-rate", "0.5 m3/h"});
  CHECK(Json::parse(ran.out)["feed_m3_s"].get<double>() == Approx(0.5 / 3600).epsilon(1e-14));
}

TEST_CASE("CSV goes to a file beside the page, or in its place", "[cli][output]") {
  const Arguments screen = {"screen", fixture("bay.toml"), fixture("easy.toml")};
  const Ran in_place = run_program(with(screen, {"--csv", "-"}));
  CHECK(in_place.out.rfind("tag,kind,verdict,", 0) == 0);
  const auto file = std::filesystem::temp_directory_path() / "vatwright_output_test.csv";
  const Ran beside = run_program(with(screen, {"--csv", file.string()}));
  std::ostringstream written;
  written << std::ifstream(file, std::ios::binary).rdbuf();
  std::filesystem::remove(file);
  CHECK(written.str() == in_place.out);
  CHECK(beside.out == run_program(screen).out);
}

TEST_CASE("colour only on a terminal, and never the only carrier of meaning", "[cli][output]") {
  const Arguments screen = {"screen", fixture("bay.toml"), fixture("easy.toml")};
  std::string coloured = run_program(screen, {true, true, true}).out;
  CHECK(coloured.find('\x1b') != std::string::npos);
  CHECK(run_program(screen, {false, true, true}).out.find('\x1b') == std::string::npos);
  for (const std::string& code : {std::string("\x1b[1m"), std::string("\x1b[0m")})
    for (auto at = coloured.find(code); at != std::string::npos; at = coloured.find(code))
      coloured.erase(at, code.size());
  CHECK(coloured == run_program(screen, {true, true, false}).out);
}
