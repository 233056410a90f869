// The published checks: every tests/reference/*.case is a site, a duty, and what the source says comes of it.
#include <algorithm>
#include <filesystem>
#include <fstream>
#include <sstream>

#include "reference_case.hpp"
#include "support/catch.hpp"

namespace {

namespace fs = std::filesystem;
using vatwright::reference::Case;

std::string text_of(const fs::path& file) {
  std::ostringstream text;
  text << std::ifstream(file).rdbuf();
  return text.str();
}

std::vector<Case> published() {
  std::vector<Case> cases;
  for (const auto& entry : fs::directory_iterator(fs::path(VATWRIGHT_SOURCE_DIR) / "tests/reference"))
    if (entry.path().extension() == ".case")
      cases.push_back(vatwright::reference::read_case(entry.path().filename().string(), text_of(entry.path())));
  std::sort(cases.begin(), cases.end(), [](const Case& a, const Case& b) { return a.file < b.file; });
  return cases;
}

std::string joined(const std::vector<std::string>& lines) {
  std::string text;
  for (const auto& line : lines) text += "\n  " + line;
  return text;
}

}  // namespace

TEST_CASE("published checks come out of the program", "[reference]") {
  const auto cases = published();
  REQUIRE(cases.size() >= 20);
  for (const auto& c : cases) {
    INFO(c.file << ", " << c.source);
    if (!c.faults.empty()) {
      FAIL_CHECK("the case itself is wrong:" << joined(c.faults));
      continue;
    }
    const auto found = vatwright::reference::differences(c);
    if (found.empty())
      SUCCEED();
    else
      FAIL_CHECK(joined(found));
  }
}

TEST_CASE("a case without source or expectation is a fault, not a pass", "[reference]") {
  const auto c =
      vatwright::reference::read_case("x.case", "command screen\n=== inventory\n=== duty\n=== expect\nexit 0\n");
  CHECK(c.faults == std::vector<std::string>{"no source", "no expectation"});
  const auto d = vatwright::reference::read_case("y.case", "source s\ncommand screen\n=== expect\na/b zero\n");
  CHECK(d.faults.size() == 1);
}
