#include "vatwright/report/layout.hpp"

#include <sstream>

#include "support/catch.hpp"

using namespace vatwright;

TEST_CASE("the width of a text is what it takes on a screen", "[report][layout]") {
  // Unicode Standard Annex 11: wide letters take two columns; combining marks none.
  CHECK(width_of("Kessel") == 6);
  CHECK(width_of("K\u00fche") == 4);
  CHECK(width_of("u\u0308") == 1);
  CHECK(width_of("\u6c34") == 2);
}

TEST_CASE("nothing in a text can steer the terminal", "[report][layout]") {
  const std::string shown = printable("a\x1b[31mb\nc\x7f\xff");
  CHECK(shown.find('\x1b') == std::string::npos);
  CHECK(shown.find('\n') == std::string::npos);
  CHECK(shown.find("b c") != std::string::npos);
}

TEST_CASE("ASCII keeps the width and the likeness", "[report][layout]") {
  CHECK(to_ascii("K\u00fchlt\u00fcrme \u0141\u00f3d\u017a") == "Kuhlturme Lodz");
  CHECK(to_ascii("m\u00b2 \u2192") == "m2 >");
  CHECK(to_ascii("\u6c34") == "??");
  CHECK(to_ascii("u\u0308") == "u");
}

TEST_CASE("texts break at spaces, long words inside", "[report][layout]") {
  CHECK(wrap("one two three", 7) == std::vector<std::string>{"one two", "three"});
  CHECK(wrap("abcdefghij k", 4) == std::vector<std::string>{"abcd", "efgh", "ij k"});
  CHECK(wrap("", 10) == std::vector<std::string>{""});
  CHECK(wrap("\u6c34\u6c34\u6c34", 5) == std::vector<std::string>{"\u6c34\u6c34", "\u6c34"});
}

TEST_CASE("a table never leaves the page, whatever stands in it", "[report][layout]") {
  Table table;
  table.columns = {{"tag", Align::left, true}, {"figure\nm3/h", Align::right}, {"words", Align::left, true}};
  table.rows = {
      {std::string(200, 'x'), "1.234", "many words that go on and on and on and do not end before the page does"},
      {"short", std::string(90, '9'), ""}};
  Page page{Look{}};
  page.table(table);
  std::istringstream lines(page.text());
  int count = 0;
  for (std::string line; std::getline(lines, line); ++count) CHECK(width_of(line) <= page_width);
  CHECK(count > 5);
}

TEST_CASE("figures stand flush right, texts flush left, nothing trails", "[report][layout]") {
  Page page{Look{}};
  page.table({{{"vessel"}, {"X\n%", Align::right}, {"note"}}, {{"K-1", "9.5", ""}, {"T", "81.25", "w"}}});
  CHECK(page.text() ==
        "vessel      X  note\n"
        "            %\n"
        "-------------------\n"
        "K-1       9.5\n"
        "T       81.25  w\n");
}

TEST_CASE("decimal points meet", "[report][layout]") {
  Page page{Look{}};
  page.table({{{"flow", Align::point}}, {{"9"}, {"81.25"}, {"-"}, {"1.2e-05"}}});
  CHECK(page.text() ==
        "    flow\n"
        "--------\n"
        " 9\n"
        "81.25\n"
        "       -\n"
        " 1.2e-05\n");
}

TEST_CASE("bold is there only in colour, and only around whole lines", "[report][layout]") {
  Look look;
  look.colour = true;
  Page bold{look};
  bold.title("Head");
  CHECK(bold.text() == "\x1b[1mHead\x1b[0m\n");
  Page plain{Look{}};
  plain.title("Head");
  CHECK(plain.text() == "Head\n");
}
