// The tour of the README is what the program says: every block that begins with "$ vatwright" is run and compared. A
// line of three dots stands for any lines left out.
#include <filesystem>
#include <fstream>
#include <sstream>
#include <string>
#include <vector>

#include "support/catch.hpp"
#include "vatwright/cli/run.hpp"

namespace {

struct Shown {
  std::string command;
  std::vector<std::string> lines;
};

std::vector<Shown> blocks_of(const std::string& path) {
  std::vector<Shown> blocks;
  std::ifstream file(path);
  bool inside = false;
  for (std::string line; std::getline(file, line);) {
    if (line.rfind("```", 0) == 0) inside = false;
    if (inside) blocks.back().lines.push_back(line);
    if (line.rfind("$ vatwright ", 0) == 0) {
      blocks.push_back({line.substr(12), {}});
      inside = true;
    }
  }
  return blocks;
}

std::vector<std::string> words_of(const std::string& command) {
  std::vector<std::string> words;
  std::string word;
  bool quoted = false, any = false;
  for (const char c : command) {
    if (c == '"')
      quoted = !quoted, any = true;
    else if (c == ' ' && !quoted) {
      if (any) words.push_back(word);
      word.clear(), any = false;
    } else
      word += c, any = true;
  }
  if (any) words.push_back(word);
  return words;
}

std::vector<std::string> lines_of(const std::string& text) {
  std::vector<std::string> lines;
  std::istringstream in(text);
  for (std::string line; std::getline(in, line);) lines.push_back(line);
  return lines;
}

}  // namespace

TEST_CASE("the tour of the README is what the program says", "[cli][readme]") {
  std::filesystem::current_path(VATWRIGHT_SOURCE_DIR);
  const auto blocks = blocks_of("README.md");
  REQUIRE(blocks.size() >= 4);
  for (const Shown& block : blocks) {
    std::ostringstream out, err;
    vatwright::run(words_of(block.command), out, err);
    const auto said = lines_of(out.str());
    std::size_t at = 0;
    bool anywhere = false;
    for (const std::string& line : block.lines) {
      if (line == "...") {
        anywhere = true;
        continue;
      }
      while (anywhere && at < said.size() && said[at] != line) ++at;
      INFO("$ vatwright " << block.command << "\nshown: " << line
                          << "\nsaid:  " << (at < said.size() ? said[at] : "(the end)"));
      REQUIRE(at < said.size());
      REQUIRE(said[at] == line);
      anywhere = false, ++at;
    }
  }
}
