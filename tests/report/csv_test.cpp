#include "vatwright/report/csv.hpp"

#include "sample.hpp"
#include "support/catch.hpp"

using namespace vatwright;

namespace {

/// Reads RFC 4180, section 2: records end in CR LF, quoted fields hold anything, a doubled quote is a quote.
std::vector<std::vector<std::string>> records_of(const std::string& text) {
  std::vector<std::vector<std::string>> records;
  std::vector<std::string> record(1);
  bool quoted = false;
  for (std::size_t i = 0; i < text.size(); ++i) {
    const bool doubled = quoted && text[i] == '"' && i + 1 < text.size() && text[i + 1] == '"';
    if (doubled) {
      record.back() += text[i++];
    } else if (text[i] == '"') {
      quoted = !quoted;
    } else if (!quoted && text[i] == ',') {
      record.emplace_back();
    } else if (!quoted && text.compare(i, 2, "\r\n") == 0) {
      records.push_back(record);
      record.assign(1, "");
      ++i;
    } else {
      record.back() += text[i];
    }
  }
  REQUIRE_FALSE(quoted);
  REQUIRE(record == std::vector<std::string>{""});  // the last record ends in CR LF too
  return records;
}

std::string cell(const std::vector<std::vector<std::string>>& records, std::size_t row, const std::string& header) {
  const auto& headers = records.front();
  const auto found = std::find(headers.begin(), headers.end(), header);
  INFO(header);
  REQUIRE(found != headers.end());
  return records[row][static_cast<std::size_t>(found - headers.begin())];
}

}  // namespace

TEST_CASE("a screen is one row a vessel under the keys of the JSON answer", "[report][csv]") {
  const auto records = records_of(to_csv(sample_screen()));
  REQUIRE(records.size() == 4);
  for (const auto& record : records) CHECK(record.size() == records.front().size());
  CHECK(cell(records, 1, "tag") == "K-1");
  CHECK(cell(records, 1, "yields.C") == "0.9");
  CHECK(cell(records, 1, "outlet.temperature_K") == "343.15");
  CHECK(cell(records, 1, "outlet.flow_mol_s.C") == "3.04");
  CHECK(cell(records, 1, "cooling_W") == "-1500");
  CHECK(cell(records, 1, "windows_m3_s") == "..5e-04;8e-04..0.002");  // the shortest of each
  CHECK(cell(records, 1, "ends.floor") == "heat removal");
  CHECK(cell(records, 1, "limits.fill.margin") == "0.0588");
  CHECK(cell(records, 1, "steady_states.stable") == "true");
  CHECK(cell(records, 2, "limits.fill.margin").empty());
  CHECK(cell(records, 2, "limits.wetted material.state") == "broken");
  CHECK(cell(records, 2, "stands_in_the_way") ==
        "wetted material: copper is not on the product's list; conversion of A 40 %, at least 90 % is asked");
  CHECK(cell(records, 3, "outlet.temperature_K").empty());
  CHECK(cell(records, 3, "verdict") == "cannot-tell");
}

TEST_CASE("the header row is there without vessels too", "[report][csv]") {
  const auto records = records_of(to_csv(ScreenAnswer{{sample_head(), {}}, {}}));
  REQUIRE(records.size() == 1);
  CHECK(records[0].front() == "tag");
  CHECK(records_of(to_csv(RankAnswer{})).size() == 1);
}

TEST_CASE("quotes, commas and line ends are quoted as RFC 4180 says", "[report][csv]") {
  ScreenAnswer answer = sample_screen();
  answer.vessels[0].tag = "a,b";
  answer.vessels[1].tag = "say \"no\"";
  answer.vessels[2].tag = "two\r\nlines";
  const std::string text = to_csv(answer);
  CHECK(text.find("\r\n\"a,b\",") != std::string::npos);
  CHECK(text.find("\r\n\"say \"\"no\"\"\",") != std::string::npos);
  const auto records = records_of(text);
  CHECK(cell(records, 1, "tag") == "a,b");
  CHECK(cell(records, 2, "tag") == "say \"no\"");
  CHECK(cell(records, 3, "tag") == "two\r\nlines");
}

TEST_CASE("a text that a spreadsheet would reckon gets a mark in front; a number does not", "[report][csv]") {
  const auto tag = [](const std::string& text) {
    ScreenAnswer answer = sample_screen();
    answer.vessels[0].tag = text;
    return cell(records_of(to_csv(answer)), 1, "tag");
  };
  CHECK(tag("=1+1") == "'=1+1");
  CHECK(tag("@sum") == "'@sum");
  CHECK(tag("+A") == "'+A");
  CHECK(tag("-A") == "'-A");
  CHECK(tag("-12.5") == "-12.5");
  CHECK(tag("K-1") == "K-1");
}

TEST_CASE("examine is the whole, then each vessel; rank is one row a hookup", "[report][csv]") {
  const auto examined = records_of(to_csv(sample_examine()));
  REQUIRE(examined.size() == 4);
  CHECK(cell(examined, 1, "hookup") == "[40% K-1 beside 60% P-2]");
  CHECK(cell(examined, 1, "tag").empty());
  CHECK(cell(examined, 2, "hookup").empty());
  CHECK(cell(examined, 3, "feed_fraction") == "0.6");
  const auto ranked = records_of(to_csv(sample_rank()));
  REQUIRE(ranked.size() == 3);
  CHECK(cell(ranked, 1, "hookup") == "K-1 then P-2");
  CHECK(cell(ranked, 1, "same_as") == "P-2 then K-1");
  CHECK(cell(ranked, 2, "vessel_count") == "1");
}
