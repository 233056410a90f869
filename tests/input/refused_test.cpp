// Wrong files and what is said of them. Each tests/refused/NN-noun.toml is one wrong file; its first line says whether
// it is the inventory or the duty, and a right file stands in for the other. NN-noun.txt holds the whole text that is
// told. What came instead is left beside the build as NN-noun.txt.received. Entries that are only warned of, or read
// without a word, are cases too.
#include <algorithm>
#include <filesystem>
#include <fstream>
#include <sstream>
#include <string>
#include <vector>

#include "support/catch.hpp"
#include "vatwright/input/read.hpp"

using namespace vatwright;
namespace {

const std::filesystem::path folder = std::filesystem::path(VATWRIGHT_SOURCE_DIR) / "tests" / "refused";

std::string text_of(const std::filesystem::path& path) {
  std::ifstream file(path, std::ios::binary);
  std::ostringstream text;
  text << file.rdbuf();
  return text.str();
}

std::vector<std::string> cases() {
  std::vector<std::string> stems;
  for (const auto& entry : std::filesystem::directory_iterator(folder))
    if (entry.path().extension() == ".toml" && entry.path().stem().string().rfind("right-", 0) != 0)
      stems.push_back(entry.path().stem().string());
  std::sort(stems.begin(), stems.end());
  return stems;
}

ReadResult read_case(const std::string& stem) {
  const FileText wrong{stem + ".toml", text_of(folder / (stem + ".toml")), ""};
  const auto right = [](const std::string& name) { return FileText{name, text_of(folder / name), ""}; };
  const bool is_inventory = wrong.text.rfind("# inventory", 0) == 0;
  return is_inventory ? read_texts(wrong, right("right-duty.toml")) : read_texts(right("right-inventory.toml"), wrong);
}

bool is_told_only(const std::string& text) { return text.empty() || text.find(": warning: ") != std::string::npos; }

void note_received(const std::string& stem, const std::string& text) {
  std::ofstream(stem + ".txt.received", std::ios::binary) << text;
}

}  // namespace

TEST_CASE("wrong files are told as their approved texts say", "[input][refused]") {
  const auto stems = cases();
  REQUIRE(stems.size() >= 95);
  for (const std::string& stem : stems) {
    CAPTURE(stem);
    const std::string first = text_of(folder / (stem + ".toml")).substr(0, 11);
    CHECK((first.rfind("# inventory", 0) == 0 || first.rfind("# duty", 0) == 0));
    REQUIRE(std::filesystem::exists(folder / (stem + ".txt")));
    const std::string expected = text_of(folder / (stem + ".txt"));
    const ReadResult result = read_case(stem);
    const std::string told = to_text(result.diagnostics, false);
    CHECK(told == expected);
    if (told != expected) note_received(stem, told);
    CHECK(result.problems.has_value() != result.diagnostics.has_errors());
  }
}

TEST_CASE("the right files beside wrong ones are read without a word", "[input][refused]") {
  const auto right = [](const std::string& name) { return FileText{name, text_of(folder / name), ""}; };
  const ReadResult result = read_texts(right("right-inventory.toml"), right("right-duty.toml"));
  CHECK(to_text(result.diagnostics, false).empty());
  CHECK(result.problems.has_value());
}

TEST_CASE("slips that are not wrong in themselves are warned of, or answered", "[input][refused]") {
  // gallons, plain bar, a small U, a fast agitator, a small activation energy, an unknown vessel; and what is answered
  int seen = 0;
  for (const std::string& stem : cases())
    for (const char* number : {"05-", "14-", "25-", "34-", "55-", "64-", "37-", "61-"})
      if (stem.rfind(number, 0) == 0) {
        CAPTURE(stem);
        ++seen;
        const ReadResult result = read_case(stem);
        CHECK(result.problems.has_value());
        CHECK(is_told_only(to_text(result.diagnostics, false)));
      }
  CHECK(seen == 8);
}
