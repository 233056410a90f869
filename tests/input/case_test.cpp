// Cases lay their figures upon the files; likes take over a vessel's keys.
#include <string>

#include "read_text.hpp"
#include "support/catch.hpp"

using namespace vatwright;
using namespace vatwright::test;
namespace {

const std::string site = "format = 1\n[utility.tower-water]\nsupply = \"26 degC\"\n" + one_tank.substr(11);

ReadResult with_case(const std::string& overrides) {
  return read_both(site, head + target + feed +
                             "[[reaction]]\nname = \"main\"\nequation = \"A -> B\"\n[reaction.rate]\n"
                             "k = \"0.3 1/min\"\n[case.winter]\n" +
                             overrides);
}
Problem winter(const std::string& overrides) {
  const ReadResult result = with_case(overrides);
  if (!result.problems) throw std::runtime_error(told(result));
  return result.problems->cases.at(0).second;
}

}  // namespace

TEST_CASE("a case changes what it names and nothing else", "[input][case]") {
  const Problem cold = winter("feed.temperature = \"4 degC\"\nutility.tower-water.supply = \"8 degC\"\n");
  CHECK(cold.duty.chemistry.feed.temperature_K == Approx(277.15));
  CHECK(cold.site.utilities.at(0).supply_K == Approx(281.15));
  CHECK(fed(cold.duty, "A") == Approx(2000));
  CHECK(right(with_case("feed.temperature = \"4 degC\"\n")).duty.chemistry.feed.temperature_K == Approx(298.15));
}

TEST_CASE("a case reaches vessels and reactions by name", "[input][case]") {
  const Problem changed = winter("vessel.K-1.volume = \"1 m3\"\nreaction.main.rate.k = \"0.6 1/min\"\n");
  CHECK(std::get<StirredTank>(changed.site.vessels.at(0).kind).volume_m3 == 1);
  CHECK(std::get<StirredTank>(changed.site.vessels.at(0).kind).fill.second == 0.8);
  CHECK(power_of(changed.duty).k.k == Approx(0.01));
}

TEST_CASE("a case reaches one of several feeds by name", "[input][case]") {
  const std::string streams =
      "[[feed]]\nname = \"one\"\nfeed_rate = \"1 m3/h\"\ntemperature = \"20 degC\"\nconcentration = { A = \"2 mol/L\" "
      "}\n"
      "[[feed]]\nname = \"two\"\nfeed_rate = \"1 m3/h\"\ntemperature = \"20 degC\"\nconcentration = { B = \"2 mol/L\" "
      "}\n";
  const ReadResult result =
      read_duty(head + target + streams + reaction + "[case.half]\nfeed.two.feed_rate = \"3 m3/h\"\n");
  REQUIRE(result.problems.has_value());
  CHECK(fed(result.problems->cases.at(0).second.duty, "B") == Approx(1500));  // 2 * 3/4
}

TEST_CASE("a list in a case replaces the whole list", "[input][case]") {
  const Problem changed =
      winter("reaction = [{ name = \"other\", equation = \"A -> C\", rate = { k = \"1 1/h\" } }]\n");
  REQUIRE(changed.duty.chemistry.kinetics.reactions() == 1);
  CHECK(changed.duty.chemistry.kinetics.reaction(0).name == "other");
}

TEST_CASE("what a case names has to be there", "[input][case]") {
  CHECK(told(with_case("vessel.K-2.volume = \"1 m3\"\n")).find("case winter, vessel.K-2: no vessel \"K-2\"") !=
        std::string::npos);
  CHECK(told(with_case("reaction.man.rate.k = \"1 1/h\"\n"))
            .find("no reaction \"man\"; expected one of the files; nearest: \"main\"") != std::string::npos);
  CHECK(told(with_case("utility.towr-water.supply = \"8 degC\"\n"))
            .find("case winter, utility.towr-water: no utility \"towr-water\"; expected one of the inventory; nearest: "
                  "\"tower-water\"") != std::string::npos);
  CHECK(told(with_case("fed.temperature = \"8 degC\"\n")).find("nearest known key: \"feed\"") != std::string::npos);
  CHECK_FALSE(with_case("format = 1\n").problems.has_value());
}

TEST_CASE("a fault of the files is told once, not again for each case", "[input][case]") {
  const ReadResult result = read_both(site, head + target + feed +
                                                "[[reaction]]\nequation = \"A -> B\"\n[reaction.rate]\n"
                                                "k = \"0.3 min\"\n[case.winter]\nfeed.temperature = \"4 degC\"\n");
  CHECK(result.diagnostics.sorted().size() == 1);
}

namespace {

std::string vessel(const std::string& tag, const std::string& rest) {
  return "[[vessel]]\ntag = \"" + tag + "\"\n" + rest;
}
Site site_of(const std::string& vessels) {
  const ReadResult result = read_texts({"site.toml", "format = 1\n" + vessels, ""}, std::nullopt);
  if (!result.site) throw std::runtime_error(told(result));
  return *result.site;
}
const std::string whole =
    "kind = \"stirred-tank\"\nvolume = \"2 m3\"\nfill = [0.2, 0.8]\nnote = \"old\"\n"
    "jacket = { utilities = [\"w\"], area = \"5 m2\", U = \"300 W/m2/K\" }\n";
const std::string water = "[utility.w]\nsupply = \"20 degC\"\n";

}  // namespace

TEST_CASE("likes point forward and on, merge deeply, and leave tag and note where they are", "[input][like]") {
  const Site read =
      site_of(vessel("K-3", "like = \"K-2\"\n") + vessel("K-2", "like = \"K-1\"\njacket.U = \"200 W/m2/K\"\n") +
              vessel("K-1", whole) + water);
  REQUIRE(read.vessels.size() == 3);
  CHECK(read.vessels[0].tag == "K-3");
  CHECK(read.vessels[0].jacket->U_W_m2_K == 200);
  CHECK(*read.vessels[0].jacket->area_m2 == 5);
  CHECK(read.vessels[0].note.empty());
  CHECK(read.vessels[2].note == "old");
  CHECK(std::get<StirredTank>(read.vessels[1].kind).volume_m3 == 2);
}

TEST_CASE("a list that is given replaces the list of the other", "[input][like]") {
  const Site read = site_of(vessel("K-1", whole) + vessel("K-2", "like = \"K-1\"\nfill = [0.5, 0.9]\n") + water);
  CHECK(std::get<StirredTank>(read.vessels[1].kind).fill.first == 0.5);
}

TEST_CASE("a long chain of likes is followed to its end", "[input][like]") {
  std::string chain;
  for (int i = 0; i < 3000; ++i)
    chain += vessel("K-" + std::to_string(i), "like = \"K-" + std::to_string(i + 1) + "\"\n");
  const Site read = site_of(chain + vessel("K-3000", whole) + water);
  CHECK(std::get<StirredTank>(read.vessels[0].kind).volume_m3 == 2);
}
