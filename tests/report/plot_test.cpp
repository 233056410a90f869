// Small plots in characters: where marks fall is worked out by hand for straight lines.
#include <algorithm>

#include "../../src/report/plot.hpp"
#include "support/catch.hpp"
#include "vatwright/report/layout.hpp"

using namespace vatwright;

TEST_CASE("a rising line goes from the lower left to the upper right", "[report][plot]") {
  const auto lines = lines_of({{0, 1}, {{'o', "y", {0, 10}}}, "x", {"0", "1"}, {"0", "10"}});
  REQUIRE(lines.size() == 14 + 3);
  CHECK(lines.front().rfind("  10 |", 0) == 0);
  CHECK(lines.front().back() == 'o');
  CHECK(lines[13].rfind("   0 |oo", 0) == 0);
  CHECK(lines[16].find("over x: o y") != std::string::npos);
  for (const auto& line : lines) CHECK(width_of(line) <= page_width);
}

TEST_CASE("a later series lies over an earlier one, and steep pieces are drawn through", "[report][plot]") {
  const auto lines =
      lines_of({{0, 0.5, 0.501, 1}, {{'-', "low", {0, 0, 0, 0}}, {'o', "step", {0, 0, 1, 1}}}, "x", {}, {}});
  REQUIRE(lines.size() == 17);
  CHECK(lines[13].find('o') != std::string::npos);
  CHECK(lines[13].find('-') != std::string::npos);  // where the step has left
  for (std::size_t row = 0; row < 14; ++row) CHECK(std::ranges::count(lines[row], 'o') >= 1);
}

TEST_CASE("nothing to draw draws nothing", "[report][plot]") {
  CHECK(lines_of({{0, 1}, {{'o', "y", {3, 3}}}, "x", {}, {}}).empty());
  CHECK(lines_of({{}, {}, "x", {}, {}}).empty());
}
