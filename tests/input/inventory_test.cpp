// Vessels and utilities, and what of them is assumed.
#include "read_text.hpp"
#include "support/catch.hpp"

using namespace vatwright;
using namespace vatwright::test;
namespace {

const std::string duty = head + target + feed + reaction;

ReadResult read_vessel(const std::string& keys) {
  return read_both("format = 1\n[utility.w]\nsupply = \"20 degC\"\n[[vessel]]\ntag = \"V-1\"\n" + keys, duty);
}
const std::string tank = "kind = \"stirred-tank\"\nvolume = \"2 m3\"\n";
const std::string tube = "kind = \"tube\"\nbore = \"50 mm\"\nlength = \"100 m\"\n";

}  // namespace

TEST_CASE("what a vessel leaves out is assumed and said", "[input][inventory]") {
  CHECK(assumed(right(read_vessel(tank)), "vessel.V-1.fill") == "0 to 1");
  CHECK(assumed(right(read_vessel(tube)), "vessel.V-1.roughness") == "0 mm");
  CHECK(assumed(right(read_vessel(tank)), "utility.w.density") == "997 kg/m3");
  CHECK(std::get<Tube>(right(read_vessel(tube)).site.vessels[0].kind).tubes == 1);
  CHECK(right(read_vessel(tank)).site.vessels[0].status == Status::idle);
}

TEST_CASE("units of a site in feet and gallons are taken", "[input][inventory]") {
  // 1 ft3 = 0.3048^3 m3; 100 gpm = 100*231*0.0254^3/60 m3/s; 14.5038 psi = 1 bar
  const Problem problem =
      right(read_vessel("kind = \"stirred-tank\"\nvolume = \"100 ft3\"\nfeed_line = \"100 gpm\"\n"
                        "pressure = [\"0 psig\", \"150 psig\"]\ntemperature = [\"32 degF\", \"392 degF\"]\n"));
  const Vessel& v = problem.site.vessels[0];
  CHECK(std::get<StirredTank>(v.kind).volume_m3 == Approx(100 * 0.3048 * 0.3048 * 0.3048));
  CHECK(*v.feed_line_m3_s == Approx(100 * 231 * 0.0254 * 0.0254 * 0.0254 / 60));
  CHECK(v.pressure_Pa->first == Approx(101325));
  CHECK(v.temperature_K->second == Approx(473.15));
}

TEST_CASE("keys of one kind are told on another", "[input][inventory]") {
  CHECK(told(read_vessel(tube + "fill = [0.2, 0.8]\n"))
            .find("found fill on a tube; expected it on a stirred-tank only") != std::string::npos);
  CHECK_FALSE(read_vessel(tank + "bore = \"50 mm\"\n").problems.has_value());
  CHECK_FALSE(read_vessel(tank + "pressure_drop = \"1 bar\"\n").problems.has_value());
  CHECK_FALSE(read_vessel(tube + "agitator = { power = \"2 kW\" }\n").problems.has_value());
  CHECK_FALSE(
      read_vessel(tank + "jacket = { utilities = [\"w\"], U = \"300 W/m2/K\" }\n").problems.has_value());  // no area
  CHECK_FALSE(
      read_vessel(tank + "jacket = { utilities = [], area = \"2 m2\", U = \"300 W/m2/K\" }\n").problems.has_value());
  CHECK_FALSE(read_vessel("kind = \"stirred-tank\"\n").problems.has_value());  // no volume
  CHECK(read_vessel(tube + "jacket = { utilities = [\"w\"], U = \"300 W/m2/K\", fouling = \"2e-4 m2.K/W\" }\n")
            .problems.has_value());
}

TEST_CASE("tags that a hookup can not hold are told", "[input][inventory]") {
  for (const char* tag : {"then", "beside", "A B", "A]", "[A", "40%", "", "A\\\"", "it's"}) {
    CAPTURE(tag);
    CHECK_FALSE(
        read_both("format = 1\n[[vessel]]\ntag = \"" + std::string(tag) + "\"\n" + tank, duty).problems.has_value());
  }
  CHECK(read_both("format = 1\n[[vessel]]\ntag = \"Kessel-\u00fc1\"\n" + tank, duty).problems.has_value());
}

TEST_CASE("a spread of a vessel is named by its tag", "[input][inventory]") {
  const Problem problem =
      right(read_vessel(tank + "[vessel.jacket]\nutilities = [\"w\"]\narea = \"5 m2\"\nU = \"300 W/m2/K\"\n"
                               "spread = { U = \"60 W/m2/K\" }\n"));
  REQUIRE(problem.site.spreads.size() == 1);
  CHECK(problem.site.spreads[0].key == "vessel.V-1.jacket.U");
  CHECK_FALSE(problem.site.spreads[0].relative);
  CHECK(problem.site.spreads[0].half_width == Approx(60));
}

TEST_CASE("a utility is named in its spreads too", "[input][inventory]") {
  const ReadResult result = read_both(
      "format = 1\n[utility.w]\nsupply = \"20 degC\"\nspread = { supply = \"3 K\" }\n" + one_tank.substr(11), duty);
  REQUIRE(right(result).site.spreads.size() == 1);
  CHECK(right(result).site.spreads[0].key == "utility.w.supply");
}
