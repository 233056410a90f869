// The house keeps its arrows: a room includes only what tests/support/arrows.txt lists, and a library only from its
// room.
#include <filesystem>
#include <fstream>
#include <map>
#include <regex>
#include <set>
#include <sstream>
#include <string>
#include <vector>

#include "support/catch.hpp"

namespace fs = std::filesystem;
namespace {

const fs::path top = VATWRIGHT_SOURCE_DIR;

struct Arrows {
  std::map<std::string, std::set<std::string>> rooms, libraries;
};

Arrows read_arrows() {
  Arrows arrows;
  std::ifstream file(top / "tests/support/arrows.txt");
  for (std::string line; std::getline(file, line);) {
    if (line.empty() || line[0] == '#') continue;
    const auto colon = line.find(':');
    std::istringstream left(line.substr(0, colon)), right(line.substr(colon + 1));
    std::string name, word;
    left >> name;
    auto& into = name == "library" ? (left >> name, arrows.libraries[name]) : arrows.rooms[name];
    while (right >> word) into.insert(word);
  }
  return arrows;
}

struct Include {
  std::string file, from, target;
  int line;
};

std::vector<Include> includes_under(const fs::path& root) {
  static const std::regex pattern(R"(^\s*#\s*include\s*[<"]([^>"]+)[>"])");
  std::vector<Include> found;
  for (const auto& entry : fs::recursive_directory_iterator(root)) {
    const auto extension = entry.path().extension();
    if (extension != ".hpp" && extension != ".cpp") continue;
    std::ifstream file(entry.path());
    int number = 0;
    for (std::string line; std::getline(file, line);) {
      ++number;
      std::smatch match;
      if (std::regex_search(line, match, pattern))
        found.push_back({fs::relative(entry.path(), top).string(), fs::relative(entry.path(), root).begin()->string(),
                         match[1], number});
    }
  }
  return found;
}

std::vector<Include> all_includes() {
  auto all = includes_under(top / "src");
  for (auto& i : includes_under(top / "include/vatwright")) all.push_back(i);
  return all;
}

}  // namespace

TEST_CASE("rooms include only what stands right of them", "[house]") {
  const auto arrows = read_arrows();
  const auto includes = all_includes();
  REQUIRE(includes.size() > 100);
  static const std::regex room_of(R"(^(?:vatwright/)?([a-z]+)/)");
  for (const auto& i : includes) {
    std::smatch match;
    if (!std::regex_search(i.target, match, room_of) || !arrows.rooms.count(match[1])) continue;
    INFO(i.file << ":" << i.line << ": " << i.from << " may not include " << i.target);
    REQUIRE(arrows.rooms.count(i.from));
    CHECK((match[1] == i.from || arrows.rooms.at(i.from).count(match[1])));
  }
}

TEST_CASE("a library is seen from its rooms only", "[house]") {
  const auto arrows = read_arrows();
  for (const auto& i : all_includes())
    for (const auto& [library, rooms] : arrows.libraries) {
      if (i.target.rfind(library, 0) != 0) continue;
      INFO(i.file << ":" << i.line << ": " << i.from << " may not include " << i.target);
      CHECK(rooms.count(i.from));
    }
}

TEST_CASE("the list of arrows has no circle", "[house]") {
  const auto arrows = read_arrows();
  std::map<std::string, int> height;  // a room stands higher than all it includes
  for (std::size_t pass = 0; pass <= arrows.rooms.size(); ++pass)
    for (const auto& [room, rights] : arrows.rooms)
      for (const auto& right : rights) height[room] = std::max(height[room], height[right] + 1);
  for (const auto& [room, h] : height) {
    INFO(room);
    CHECK(h <= static_cast<int>(arrows.rooms.size()));
  }
}

TEST_CASE("the top level holds what was agreed and nothing else", "[house]") {
  std::set<std::string> seen;
  for (const auto& entry : fs::directory_iterator(top)) {
    const auto name = entry.path().filename().string();
    if (name[0] != '.' && name.rfind("build", 0) != 0) seen.insert(name);
  }
  CHECK(seen == std::set<std::string>{"CMakeLists.txt", "README.md", "DEVELOPERS.md", "LICENSE", "src", "include",
                                      "vessels", "tests", "docs"});
}

TEST_CASE("only the entrance writes to the terminal by itself", "[house]") {
  for (const auto& i : all_includes()) {
    if (i.target != "iostream") continue;
    INFO(i.file << ":" << i.line << " includes <iostream>");
    CHECK(i.file == "src/cli/main.cpp");
  }
}
