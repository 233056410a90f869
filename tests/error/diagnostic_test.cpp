#include "vatwright/error/diagnostic.hpp"

#include <algorithm>
#include <random>

#include "support/catch.hpp"
#include "support/utf8.hpp"

using namespace vatwright;

TEST_CASE("a fault is told with place, subject, key, line and mark", "[error]") {
  Diagnostics faults;
  const int file = faults.add_source("harrow.toml", "a = 1\nvolume = \"6.3 m2\"\n");
  faults.error({file, 2, 10}, "K-201", "volume", "found \"6.3 m2\", an area", "expected a volume, such as \"6.3 m3\"");
  CHECK(to_text(faults, false) ==
        "harrow.toml:2:10: K-201, volume: found \"6.3 m2\", an area; expected a volume, such as \"6.3 m3\"\n"
        "    volume = \"6.3 m2\"\n"
        "             ^\n");
}

TEST_CASE("empty parts of a fault are left out", "[error]") {
  Diagnostics faults;
  const int file = faults.add_source("d.toml", "x\n");
  faults.error({}, "", "", "no file", "");
  faults.error({file, 1, 1}, "feed", "", "found nothing");
  faults.warning({file, 1, 1}, "", "k", "0.1 is small", "expected 1");
  CHECK(to_text(faults, false) ==
        "d.toml:1:1: feed: found nothing\n    x\n    ^\n"
        "d.toml:1:1: warning: k: 0.1 is small; expected 1\n    x\n    ^\n"
        "no file\n");
}

TEST_CASE("faults come in the order of files, lines, columns; repeats once", "[error]") {
  Diagnostics faults;
  const int first = faults.add_source("a", ""), second = faults.add_source("b", "");
  faults.error({second, 1, 1}, "", "", "d");
  faults.error({first, 10, 1}, "", "", "c");
  faults.error({first, 9, 7}, "", "", "b");
  faults.error({first, 9, 2}, "", "", "a");
  faults.error({first, 9, 7}, "", "", "b");
  std::string order;
  for (const Diagnostic& d : faults.sorted()) order += d.found;
  CHECK(order == "abcd");
}

TEST_CASE("warnings alone are no errors", "[error]") {
  Diagnostics faults;
  CHECK_FALSE(faults.has_errors());
  faults.warning({}, "", "", "slip");
  CHECK_FALSE(faults.has_errors());
  faults.error({}, "", "", "fault");
  CHECK(faults.has_errors());
}

TEST_CASE("the mark stands under its code point, with tabs and letters of several bytes", "[error]") {
  Diagnostics faults;
  const int file = faults.add_source("f", "\tk\xc3\xbchl = 1\r\n\xe5\x86\xb7 = 2\n");
  faults.error({file, 1, 8}, "", "", "tab and umlaut");  // the sign =: column 4 + 5
  faults.error({file, 2, 3}, "", "", "wide letter");     // the sign = behind a letter two columns wide and a blank
  CHECK(to_text(faults, false) ==
        "f:1:8: tab and umlaut\n        k\xc3\xbchl = 1\n              ^\n"
        "f:2:3: wide letter\n    \xe5\x86\xb7 = 2\n       ^\n");
}

TEST_CASE("a byte order mark is not counted; a place behind the end is marked there", "[error]") {
  Diagnostics faults;
  const int file = faults.add_source("f",
                                     "\xef\xbb\xbf"
                                     "ab");
  faults.error({file, 1, 2}, "", "", "b");
  faults.error({file, 1, 99}, "", "", "end");
  faults.error({file, 7, 1}, "", "", "no such line");
  CHECK(to_text(faults, false) == "f:1:2: b\n    ab\n     ^\nf:1:99: end\n    ab\n      ^\nf:7:1: no such line\n");
}

TEST_CASE("control characters of file, name and message reach no terminal", "[error]") {
  Diagnostics faults;
  const int file = faults.add_source("e\x1b[2Jvil", "a\x1b[31m = \xe2\x80\xae\xff\n");
  faults.error({file, 1, 1}, "two\nlines", "", "bell \x07");
  CHECK(to_text(faults, false) ==
        "e\\x1b[2Jvil:1:1: two\\x0alines: bell \\x07\n    a\\x1b[31m = \\u202e\\xff\n    ^\n");
}

TEST_CASE("long lines are cut around the place", "[error]") {
  Diagnostics faults;
  const int file = faults.add_source("f", std::string(5000, 'a') + "X" + std::string(5000, 'b'));
  faults.error({file, 1, 5001}, "", "", "here");
  const std::string text = to_text(faults, false);
  const std::size_t line = text.find('\n') + 1, mark = text.find('\n', line) + 1;
  CHECK(text.size() < 250);
  CHECK(text[text.find('^', mark) - mark + line] == 'X');
  CHECK(mark - line - 1 <= 80);
}

TEST_CASE("colour only where asked for", "[error]") {
  Diagnostics faults;
  const int file = faults.add_source("f", "ab");
  faults.error({file, 1, 2}, "", "", "x");
  CHECK(to_text(faults, true) == "f:1:2: x\n    ab\n     \x1b[1;31m^\x1b[0m\n");
}

TEST_CASE("any bytes at any place give valid UTF-8", "[error][random]") {
  std::mt19937 random(7);
  const auto bytes = [&](std::size_t most) {
    std::string text(random() % (most + 1), ' ');
    for (char& c : text) c = static_cast<char>(random() % 4 == 0 ? '\n' : random() % 256);
    return text;
  };
  for (int i = 0; i < 3000; ++i) {
    Diagnostics faults;
    const int file = faults.add_source(bytes(9), bytes(300));
    faults.error({file, static_cast<int>(random() % 9), static_cast<int>(random() % 120)}, bytes(9), bytes(9),
                 bytes(40), bytes(40));
    const std::string text = to_text(faults, random() % 2 == 0);
    INFO(i);
    REQUIRE(is_utf8(text));
    REQUIRE(std::count(text.begin(), text.end(), '\n') <= 3);
  }
}

TEST_CASE("thousands of faults on one long line are told in reasonable work", "[error]") {
  Diagnostics faults;
  const int file = faults.add_source("f", std::string(200000, 'a'));
  for (int i = 1; i <= 20000; ++i) faults.error({file, 1, i * 10}, "", "", "x");
  const std::string text = to_text(faults, false);
  CHECK(std::count(text.begin(), text.end(), '^') == 200);
  CHECK(std::count(text.begin(), text.end(), '\n') == 20400);
}
