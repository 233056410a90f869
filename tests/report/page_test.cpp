#include "vatwright/report/page.hpp"

#include <sstream>

#include "sample.hpp"
#include "support/catch.hpp"
#include "vatwright/report/layout.hpp"

using namespace vatwright;

namespace {

bool holds(const std::string& text, const std::string& part) { return text.find(part) != std::string::npos; }

void check_page(const std::string& page, bool ascii) {
  std::istringstream lines(page);
  for (std::string line; std::getline(lines, line);) {
    INFO(line);
    CHECK(width_of(line) <= page_width);
    CHECK((line.empty() || line.back() != ' '));
  }
  if (ascii) CHECK(std::all_of(page.begin(), page.end(), [](char c) { return c == '\n' || (c >= ' ' && c <= '~'); }));
  for (const char* never : {"safe", "approved", "guaranteed"}) CHECK_FALSE(holds(page, never));
}

template <class Answer>
void check_looks(Answer answer) {
  answer.head.site = std::string(50, 'W') + " with a long name, \u00fcber die Ma\u00dfen lang, and \x1b[31m in it";
  answer.head.assumed.push_back(
      {"some.very.long.key.that.goes.on.and.on.and.on.and.on.and.on.and.on.and.on.and.on", "1", ""});
  for (const Units units : {Units::trade, Units::field})
    for (const bool ascii : {true, false}) check_page(to_page(answer, Look{units, false, ascii}), ascii);
}

}  // namespace

TEST_CASE("every page keeps to 80 columns and, where asked, to ASCII", "[report][page]") {
  check_looks(sample_screen());
  check_looks(sample_examine());
  check_looks(sample_rank());
  ScreenAnswer with_case = sample_screen();
  with_case.cases = {{"winter", sample_screen()}};
  check_looks(with_case);
  ExamineAnswer examined = sample_examine();
  examined.cases = {{"winter", sample_examine()}};
  check_looks(examined);
  RankAnswer ranked = sample_rank();
  ranked.cases = {{"winter", sample_rank()}};
  ranked.ranking.today = ranked.ranking.top[1];
  check_looks(ranked);
  CheckAnswer checked;
  checked.head = sample_head();
  checked.understood = {"a sentence that is as long as sentences about vessels and their jackets and media can become"};
  check_looks(checked);
}

TEST_CASE("a screen says the verdict in words, and what stands in the way", "[report][page]") {
  const std::string page = to_page(sample_screen(), Look{});
  CHECK(holds(page, "Of three vessels one fits, one does not, of one it cannot be told."));
  CHECK(holds(page, "does not fit"));
  CHECK(holds(page, "wetted material: copper is not on the product's list"));
  CHECK(holds(page, "up to 1.8 m3/h and 2.88 .. 7.2 m3/h"));  // 0.0005, 0.0008 and 0.002 m3/s, times 3600
  CHECK(holds(page, "decomposition"));
  CHECK(holds(page, "Screening is not design."));
}

TEST_CASE("units follow the look", "[report][page]") {
  const std::string trade = to_page(sample_screen(), Look{});
  const std::string field = to_page(sample_screen(), Look{Units::field, false, true});
  CHECK(holds(trade, "3.6 m3/h"));  // 0.001 m3/s
  CHECK(holds(trade, "degC"));
  CHECK(holds(field, "15.85 gpm"));  // 0.001 m3/s over 231 in3 a minute
  CHECK(holds(field, "degF"));
}

TEST_CASE("examine shows limits with their margins and the way along a tube", "[report][page]") {
  const std::string page = to_page(sample_examine(), Look{});
  CHECK(holds(page, "[40% K-1 beside 60% P-2]"));
  CHECK(holds(page, "1.5 kW of heating"));
  CHECK(holds(page, "+5.88 %"));
  CHECK(holds(page, "Along P-2"));
  CHECK(holds(page, "ended by target"));
}

TEST_CASE("the stair says with how few", "[report][page]") {
  RankAnswer answer = sample_rank();
  CHECK(holds(to_page(answer, Look{}), "Two vessels are enough for what is asked."));  // ceiling 0.002 >= feed 0.001
  answer.ranking.stair = {{1, "P-2", 0.0005}, {2, "K-1 then P-2", 0.000502}};
  CHECK(holds(to_page(answer, Look{}), "More than one bring little"));
  answer.ranking.stair = {{1, "P-2", 0.0005}, {2, "K-1 then P-2", 0.0006}};
  CHECK(holds(to_page(answer, Look{}), "No number of vessels shown here does what is asked."));
}

TEST_CASE("a stamp stands in the head of every page", "[report][page]") {
  ScreenAnswer answer = sample_screen();
  answer.head.stamp = "for the Tuesday meeting";
  CHECK(holds(to_page(answer, Look{}), "for the Tuesday meeting"));
}
