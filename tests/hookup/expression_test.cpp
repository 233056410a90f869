#include <algorithm>
#include <random>

#include "site.hpp"
#include "support/catch.hpp"
#include "vatwright/ranking/enumerate.hpp"

using namespace vatwright;
using namespace vatwright::test;

namespace {

Site site_of(std::vector<std::string> tags) {
  Site site;
  for (const auto& tag : tags) site.vessels.push_back(tank(tag, 1));
  return site;
}
const Site harbour = site_of({"K-201", "T-7", "T-8", "P-11", "old tank", "55%", "a\"b", "12"});

std::string echo(const std::string& text) { return to_text(parsed(text, harbour), harbour, {}); }

struct Wrong {
  std::string text;
  int column;
  std::string found, expected;
};

}  // namespace

TEST_CASE("beside binds tighter than then, groups and shares are read", "[expression]") {
  CHECK(echo("K-201 then T-7 beside T-8") == "K-201 then [T-7 beside T-8]");
  CHECK(echo("K-201 beside T-7") == "[K-201 beside T-7]");
  CHECK(echo("[K-201 then T-7] beside T-8") == "[[K-201 then T-7] beside T-8]");
  CHECK(echo("[40% T-7 beside 60% T-8] then P-11") == "[40% T-7 beside 60% T-8] then P-11");
  CHECK(echo("40 % T-7 beside 60 %T-8") == "[40% T-7 beside 60% T-8]");
  CHECK(echo("40%T-7 beside T-8") == "[40% T-7 beside 60% T-8]");
  CHECK(echo("12.5% T-7 beside T-8 beside P-11") == "[12.5% T-7 beside T-8 beside P-11]");
  CHECK(echo("33.33333% T-7 beside 33.33333% T-8 beside 33.33334% P-11") == "[33.3333% T-7 beside 33.3333% T-8 beside 33.3334% P-11]");
  CHECK(echo("[40% [K-201 then T-7] beside 60% T-8]") == "[40% [K-201 then T-7] beside 60% T-8]");
  CHECK(echo("[[[T-7]]]") == "T-7");
}

TEST_CASE("tags that would be misread stand in quotes", "[expression]") {
  CHECK(echo("\"old tank\" then T-7") == "\"old tank\" then T-7");
  CHECK(echo("\"55%\" beside T-7") == "[\"55%\" beside T-7]");
  CHECK(echo("55% beside T-7") == "[\"55%\" beside T-7]");  // a word that is a tag is the tag
  CHECK(echo("\"a\\\"b\" then 12") == "\"a\\\"b\" then 12");
  CHECK(echo("12 % 12 beside T-7") == "[12% 12 beside 88% T-7]");
}

TEST_CASE("nested groups flatten and their shares multiply", "[expression]") {
  CHECK(echo("K-201 then [T-7 then T-8] then P-11") == "K-201 then T-7 then T-8 then P-11");
  CHECK(echo("[T-7 beside [T-8 beside P-11]]") == "[T-7 beside T-8 beside P-11]");
  CHECK(echo("[40% [50% K-201 beside 50% T-7] beside 60% T-8]") == "[20% K-201 beside 20% T-7 beside 60% T-8]");
  CHECK(echo("[40% T-7 beside [T-8 beside P-11]]") == "[40% T-7 beside T-8 beside P-11]");
  CHECK(echo("[40% [K-201 beside T-7] beside T-8 beside P-11]") == "[40% [K-201 beside T-7] beside T-8 beside P-11]");
  CHECK(echo("[[30% K-201 beside 70% T-7] beside T-8]") == "[[30% K-201 beside 70% T-7] beside T-8]");
}

TEST_CASE("a wrong hookup is told with its column", "[expression]") {
  const std::vector<Wrong> all = {
      {"", 1, "an empty hookup", "vessels, such as \"K-201 then T-7\""},
      {"   ", 4, "an empty hookup", "vessels, such as \"K-201 then T-7\""},
      {"K-210", 1, "no vessel \"K-210\"", "nearest known tag: \"K-201\""},
      {"T-7 then K-2O1", 10, "no vessel \"K-2O1\"", "nearest known tag: \"K-201\""},
      {"K-201 then K-201", 12, "K-201 stands twice, first at column 1", "each vessel once"},
      {"K-201 and T-7", 7, "\"and\"", "\"then\" or \"beside\""},
      {"K-201 besides T-7", 7, "\"besides\"", "\"then\" or \"beside\"; nearest: \"beside\""},
      {"K-201 T-7", 7, "\"T-7\"", "\"then\" or \"beside\""},
      {"[K-201 then T-7", 1, "\"[\" is not closed", "\"]\""},
      {"K-201 then T-7]", 15, "\"]\" without a \"[\" before it", ""},
      {"K-201 then", 11, "the end of the hookup", "a vessel's tag or \"[\""},
      {"then K-201", 1, "\"then\"", "a vessel's tag or \"[\""},
      {"[]", 2, "\"]\"", "a vessel's tag or \"[\""},
      {"[K-201] [T-7]", 9, "\"[\"", "\"then\" or \"beside\" before it"},
      {"40% K-201 then T-7", 1, "the share 40% on a vessel or group with nothing beside it", "shares only between members of a beside"},
      {"0% K-201 beside T-7", 1, "a share of 0%", "more than 0 % and at most 100 %"},
      {"K-201 beside -5% T-7", 14, "a share of -5%", "more than 0 % and at most 100 %"},
      {"140% K-201 beside T-7", 1, "a share of 140%", "more than 0 % and at most 100 %"},
      {"40% K-201 beside 50% T-7", 1, "shares that add to 90 %", "100 %"},
      {"K-201 then [40% T-7 beside 50% T-8]", 13, "shares that add to 90 %", "100 %"},
      {"60% K-201 beside 40% T-7 beside T-8", 1, "shares that add to 100 % beside members without a share",
       "less than 100 %, something left for them"},
      {"40% 60% K-201 beside T-7", 5, "a second share 60%", "a vessel's tag or \"[\""},
      {"\"old tank", 1, "a quote is not closed", "\" after the tag"},
      {"T-7 then \xC3\xA4\xC3\xB6 then", 10, "no vessel \"\xC3\xA4\xC3\xB6\"",
       "one of K-201, T-7, T-8, P-11, old tank, 55%, a\"b, 12"},
      {"\xC3\xA4", 1, "no vessel \"\xC3\xA4\"", "one of K-201, T-7, T-8, P-11, old tank, 55%, a\"b, 12"},
  };
  for (const Wrong& w : all) {
    INFO(w.text);
    const auto got = parse_hookup(w.text, harbour);
    REQUIRE(std::holds_alternative<HookupFault>(got));
    const auto& fault = std::get<HookupFault>(got);
    CHECK(fault.column == w.column);
    CHECK(fault.found == w.found);
    CHECK(fault.expected == w.expected);
  }
}

TEST_CASE("any bytes give an answer, and groups without end a fault", "[expression]") {
  CHECK(std::holds_alternative<HookupFault>(parse_hookup(std::string(100'000, '['), harbour)));
  std::mt19937 random(7);
  const std::string some = "[]\"\\%40 K-201thenbesideT78\n\t\xC3\x80\xFF";
  int faults = 0;
  for (int i = 0; i < 3000; ++i) {
    std::string text;
    for (auto n = random() % 30; n > 0; --n) text += some[random() % some.size()];
    const auto got = parse_hookup(text, harbour);
    if (const auto* fault = std::get_if<HookupFault>(&got)) {
      ++faults;
      CHECK(fault->column >= 1);
      CHECK_FALSE(fault->found.empty());
    }
  }
  CHECK(faults > 1000);
}

namespace {

// Shares of four decimals in per cent, random, one per member of every beside, in the order of the text.
void fix_some(Hookup& h, std::mt19937& random, bool all) {
  if (h.join == Hookup::Join::beside) {
    const std::size_t n = h.parts.size();
    long left = 1'000'000;
    for (std::size_t i = 0; i < n; ++i) {
      const bool last = i + 1 == n;
      const long most = left - static_cast<long>(n - i - 1);
      const long ticks = last ? left : 1 + static_cast<long>(random() % static_cast<unsigned long>(std::max(1L, most / 2)));
      if (all || (!last && random() % 3 == 0)) {
        h.shares[i] = static_cast<double>(ticks) / 1e6;
        left -= ticks;
      }
    }
  }
  for (Hookup& part : h.parts) fix_some(part, random, all);
}

bool near(const Hookup& a, const Hookup& b) {
  if (a.join != b.join || a.vessel != b.vessel || a.parts.size() != b.parts.size() || a.shares.size() != b.shares.size()) return false;
  for (std::size_t i = 0; i < a.shares.size(); ++i) {
    if (a.shares[i].has_value() != b.shares[i].has_value()) return false;
    if (a.shares[i] && std::abs(*a.shares[i] - *b.shares[i]) > 1e-12) return false;
  }
  return std::equal(a.parts.begin(), a.parts.end(), b.parts.begin(), near);
}

}  // namespace

TEST_CASE("what is printed is read back, for random hookups", "[expression]") {
  const std::vector<int> five = {0, 1, 2, 3, 4};
  const auto all = hookups_of(five);
  std::mt19937 random(11);
  for (int i = 0; i < 2000; ++i) {
    Hookup h = all[random() % all.size()];
    if (i % 3 > 0) fix_some(h, random, i % 3 == 2);
    h = normal_form(h);
    const std::string text = to_text(h, harbour, {});
    INFO(text);
    CHECK(near(parsed(text, harbour), h));
    CHECK(to_text(parsed(text, harbour), harbour, {}) == text);
  }
}

TEST_CASE("chosen shares are echoed before every member and read back as they are", "[expression]") {
  const Hookup h = parsed("[K-201 then T-7] beside T-8 then P-11 beside 12", harbour);
  const std::string text = to_text(h, harbour, {0.123456789, 0.876543211, 2.0 / 3, 1.0 / 3});
  CHECK(text == "[12.3457% [K-201 then T-7] beside 87.6543% T-8] then [66.6667% P-11 beside 33.3333% 12]");
  CHECK(echo(text) == text);
  CHECK(free_shares_of(h) == 2);
  CHECK(free_shares_of(parsed(text, harbour)) == 0);
  CHECK(to_text(parsed("T-7 beside T-8", harbour), harbour, {1e-9, 1 - 1e-9}) == "[0.0001% T-7 beside 99.9999% T-8]");
}
