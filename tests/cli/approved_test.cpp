// Whole answers compared with what was approved. Where one differs, what came is left beside it as NAME.received;
// tests/approved/accept.sh takes wanted changes over.
#include <filesystem>
#include <fstream>
#include <sstream>

#include "program.hpp"
#include "support/catch.hpp"
#include "vatwright/cli/version.hpp"

namespace {

const std::filesystem::path approved_folder = std::filesystem::path(VATWRIGHT_SOURCE_DIR) / "tests/approved";

std::string masked(std::string text) {
  const std::string version(vatwright::version);
  for (auto at = text.find(version); at != std::string::npos; at = text.find(version, at))
    text.replace(at, version.size(), "VERSION");
  return text;
}

std::string text_of(const std::filesystem::path& file) {
  std::ostringstream text;
  text << std::ifstream(file, std::ios::binary).rdbuf();
  return text.str();
}

void check_approved(const std::string& name, const std::vector<std::string>& arguments) {
  INFO(name);
  const std::string came = masked(run_program(arguments).out);
  const bool same = came == text_of(approved_folder / name);
  CHECK(same);
  const auto received = approved_folder / (name + ".received");
  if (same)
    std::filesystem::remove(received);
  else
    std::ofstream(received, std::ios::binary) << came;
}

}  // namespace

TEST_CASE("whole answers are as approved", "[cli][approved]") {
  const std::string bay = fixture("bay.toml"), easy = fixture("easy.toml"), cases = fixture("cases.toml");
  check_approved("check.txt", {"check", bay, easy});
  check_approved("screen.txt", {"screen", bay, easy});
  check_approved("screen-field.txt", {"screen", bay, easy, "--units", "field"});
  check_approved("screen-cases.txt", {"screen", bay, cases});
  check_approved("examine.txt", {"examine", bay, easy, "--hookup", "K-1 beside K-2 then P-1"});
  check_approved("rank.txt", {"rank", bay, easy, "--most", "2", "--top", "5", "--today", "P-1"});
  check_approved("help.txt", {"--help"});
  check_approved("help-rank.txt", {"rank", "--help"});
}
