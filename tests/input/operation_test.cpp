// How vessels are run, what the product may bear, how a tank is brought on line.
#include <string>

#include "read_text.hpp"
#include "support/catch.hpp"

using namespace vatwright;
using namespace vatwright::test;
namespace {

std::string duty(const std::string& rest, const std::string& pressure = "") {
  return head + target + feed + pressure + reaction + rest;
}

}  // namespace

TEST_CASE("hold without a temperature is at the feed's, assumed and said", "[input][operation]") {
  const Problem problem = right(read_duty(duty("")));
  CHECK(problem.duty.thermal == Thermal::hold);
  CHECK(problem.duty.hold_K == Approx(298.15));
  CHECK(assumed(problem, "operation.thermal") == "hold");
  CHECK(assumed(problem, "operation.temperature") == "25 degC");
}

TEST_CASE("the pressure is that of operation, else of the feed, else of the air", "[input][operation]") {
  const std::string feeds = "pressure = \"3 barg\"\n", own = "[operation]\npressure = \"5 bara\"\n";
  CHECK(right_duty(duty(own, feeds)).inlet_pressure_Pa == Approx(5e5));
  CHECK(right_duty(duty("", feeds)).inlet_pressure_Pa == Approx(401325));
  const Problem air = right(read_duty(duty("")));
  CHECK(air.duty.inlet_pressure_Pa == 101325);
  CHECK(assumed(air, "operation.pressure") == "1.01325 bar");
}

TEST_CASE("one vessel may have its own operation; a tag of another site is only warned of", "[input][operation]") {
  const ReadResult result =
      read_duty(duty("[operation]\ntemperature = \"40 degC\"\nfill = 0.5\n[operation.vessel.K-1]\n"
                     "temperature = \"80 degC\"\nfill = \"60 %\"\ncatalyst = \"20 g/L\"\n"
                     "[operation.vessel.K-9]\ntemperature = \"50 degC\"\n"));
  const Duty read = right(result).duty;
  CHECK(read.hold_K == Approx(313.15));
  CHECK(*read.operation.fill == 0.5);
  REQUIRE(read.operation_of.count("K-1") == 1);
  CHECK(*read.operation_of.at("K-1").temperature_K == Approx(353.15));
  CHECK(*read.operation_of.at("K-1").fill == Approx(0.6));
  CHECK(*read.operation_of.at("K-1").catalyst_kg_m3 == Approx(20));
  CHECK(read.operation_of.count("K-9") == 0);
  CHECK(told(result).find("warning: operation, vessel K-9: no vessel \"K-9\"; left unused; nearest: \"K-1\"") !=
        std::string::npos);
}

TEST_CASE("vessels on their jackets need heat: all that is missing is named at once", "[input][operation]") {
  const std::string all = told(read_duty(duty("[operation]\nthermal = \"jacketed\"\n")));
  CHECK(all.find("operation, thermal: \"jacketed\" with no heat of reaction") != std::string::npos);
  CHECK(all.find("the unnamed solvent has no heat capacity") != std::string::npos);
  CHECK(told(read_duty(duty("[operation.vessel.K-1]\nthermal = \"jacketed\"\n")))
            .find("operation, vessel K-1, thermal: \"jacketed\" with no heat of reaction") != std::string::npos);
}

TEST_CASE("what is worked otherwise than computed here is refused in plain words", "[input][operation]") {
  const std::string batch =
      head +
      "[target]\nconversion = 0.8\n[charge]\ntemperature = \"25 degC\"\nconcentration = { A = \"2 mol/L\" }\n"
      "[operation]\nmode = \"batch\"\n" +
      reaction;
  CHECK(read_duty(batch).diagnostics.sorted().size() == 1);
  CHECK(told(read_duty(batch)).find("operation, mode: \"batch\" is read and checked, but this version") !=
        std::string::npos);
}

TEST_CASE("charge, dose and cycle are unused in a continuous duty, which is said", "[input][operation]") {
  const ReadResult result =
      read_duty(duty("[charge]\ntemperature = \"25 degC\"\nconcentration = { A = \"2 mol/L\" }\n"
                     "[cycle]\ncharging = \"40 min\"\n"));
  CHECK(result.problems.has_value());
  CHECK(told(result).find("warning: charge: is unused in a continuous duty") != std::string::npos);
  CHECK(told(result).find("warning: cycle: is unused in a continuous duty") != std::string::npos);
  CHECK_FALSE(read_duty(duty("[cycle]\ncharging = \"40 m\"\n")).problems.has_value());  // read and checked all the same
}

TEST_CASE("limits of the product are read in each of their forms", "[input][operation]") {
  const Duty both =
      right_duty(duty("[limits]\ntemperature = [\"0 degC\", \"110 degC\"]\ndecomposition = \"165 degC\"\n"
                      "wetted = [\"316L\", \"glass\"]\nboiling = \"forbid\"\n"));
  CHECK(*both.limits.coldest_K == Approx(273.15));
  CHECK(*both.limits.decomposition_K == Approx(438.15));
  CHECK(both.limits.wetted.size() == 2);
  CHECK(both.limits.boiling == ProductLimits::Boiling::forbid);
  const Duty one = right_duty(duty("[limits]\ntemperature = \"110 degC\"\nboiling = \"98 degC\"\n"));
  CHECK_FALSE(one.limits.coldest_K.has_value());
  CHECK(*one.limits.hottest_K == Approx(383.15));
  CHECK(one.limits.boiling_K == Approx(371.15));
  CHECK(right_duty(duty("[limits]\nboiling = \"ignore\"\n")).limits.boiling == ProductLimits::Boiling::ignore);
  CHECK(told(read_duty(duty("[limits]\nboiling = \"never\"\n"))).find("expected a temperature, forbid or ignore") !=
        std::string::npos);
}

TEST_CASE("a start is read", "[input][operation]") {
  const Duty read = right_duty(duty("[start]\nfilled_with = \"product\"\ntemperature = \"60 degC\"\n"));
  CHECK(read.start.filled_with == Start::Filled::product);
  CHECK(*read.start.temperature_K == Approx(333.15));
}

TEST_CASE("a utility that is asked for has to be one of the site", "[input][operation]") {
  const std::string site = "format = 1\n[utility.tower-water]\nsupply = \"20 degC\"\n" + one_tank.substr(11);
  CHECK(told(read_both(site, duty("[operation]\nutility = \"tower\"\n")))
            .find("no utility \"tower\"; expected one of the site; nearest: \"tower-water\"") != std::string::npos);
  CHECK(read_both(site, duty("[operation]\nutility = \"tower-water\"\n")).problems.has_value());
}

TEST_CASE("constants of vapour pressure in other units give the pressure that is known", "[input][species]") {
  // water: log10 p/mmHg = 8.07131 - 1730.63/(233.426 + t/degC): 760 mmHg at 100 degC (Antoine constants from memory)
  const Duty read =
      right_duty(duty("[species.A]\nantoine = { A = 8.07131, B = 1730.63, C = 233.426, pressure = \"mmHg\", "
                      "temperature = \"degC\" }\n"));
  CHECK(read.chemistry.feed.species[0].antoine->pressure_Pa(373.15) == Approx(101325).epsilon(2e-3));
}

TEST_CASE("a hold temperature outside the product's limits is told on either side", "[input][operation]") {
  const std::string limits = "[limits]\ntemperature = [\"30 degC\", \"110 degC\"]\n";
  CHECK(told(read_duty(duty("[operation]\ntemperature = \"120 degC\"\n" + limits)))
            .find("held 10 K above the product limit of line 17") != std::string::npos);
  CHECK(told(read_duty(duty("[operation]\ntemperature = \"20 degC\"\n" + limits)))
            .find("held 10 K below the product limit of line 17") != std::string::npos);
}

TEST_CASE("absolute zero is no temperature of a feed: a gas would have no volume", "[input][feed]") {
  const ReadResult result = read_duty("format = 1\nphase = \"gas\"\nconversion_of = \"A\"\n" + target +
                                      "[feed]\ntemperature = \"0 K\"\nfraction = { A = 1 }\n" + reaction);
  CHECK(told(result).find("feed, temperature: found \"0 K\", absolute zero; expected a temperature above it") !=
        std::string::npos);
}

TEST_CASE("an equation that changes nothing consumes nothing", "[input][reaction]") {
  const std::string text =
      head + target + feed + "[[reaction]]\nequation = \"A -> A\"\n[reaction.rate]\nk = \"1 1/h\"\n";
  CHECK(told(read_duty(text)).find("A is not consumed; expected an equation that consumes it") != std::string::npos);
}
