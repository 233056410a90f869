// What is wanted: feed rates from a production, demands.
#include "read_text.hpp"
#include "support/catch.hpp"

using namespace vatwright;
using namespace vatwright::test;
namespace {

/// H. S. Fogler, ethylene glycol from ethylene oxide: 200 million lb/year of glycol of 62 lb/lbmol, X = 0.8 (from
/// memory).
std::string glycol(const std::string& on_stream) {
  return "format = 1\nphase = \"liquid\"\nconversion_of = \"EO\"\n[target]\nconversion = 0.8\n"
         "production = { species = \"EG\", amount = \"200e6 lb/year\"" +
         on_stream +
         " }\n"
         "[feed]\ntemperature = \"55 degC\"\nconcentration = { EO = \"1 lbmol/ft3\" }\n[species.EG]\nmolar_mass = \"62 "
         "lb/lbmol\"\n"
         "[[reaction]]\nequation = \"EO -> EG\"\n[reaction.rate]\nk = \"0.311 1/min\"\n";
}

}  // namespace

TEST_CASE("a production of glycol asks the published feed of oxide", "[input][target]") {
  // 200e6/62/(365*24*60) = 6.137 lbmol/min of glycol, /0.8 = 7.672 lbmol/min of oxide; at 1 lbmol/ft3 as many ft3/min
  const Problem problem = right(read_duty(glycol("")));
  const double ft3_min = 0.3048 * 0.3048 * 0.3048 / 60;
  CHECK(problem.duty.target.feed_m3_s / ft3_min == Approx(7.672).epsilon(1e-4));
  CHECK(problem.duty.target.feed_m3_s / ft3_min * 0.8 == Approx(6.137).epsilon(1e-4));
  CHECK(assumed(problem, "target.production.on_stream") == "8760 h/year");
}

TEST_CASE("fewer hours on stream ask for more feed", "[input][target]") {
  const Problem problem = right(read_duty(glycol(", on_stream = \"7008 h/year\"")));  // 0.8 of the year
  const double ft3_min = 0.3048 * 0.3048 * 0.3048 / 60;
  CHECK(problem.duty.target.feed_m3_s / ft3_min == Approx(7.672 / 0.8).epsilon(1e-4));
  CHECK(assumed(problem, "target.production.on_stream") == "not assumed");
}

TEST_CASE("a yield that is asked decides the feed of a production; two of A for one product count double",
          "[input][target]") {
  // 2 A -> D: 1 mol/s of D at a yield of 0.5 takes 1*2/0.5 = 4 mol/s of A; at 2 mol/L 2e-3 m3/s
  const std::string duty =
      head +
      "[target]\nproduction = { species = \"D\", amount = \"1 mol/s\", on_stream = \"100 %\" }\n"
      "yield = { species = \"D\", at_least = 0.5 }\n" +
      feed +
      "[[reaction]]\nequation = \"2 A -> D\"\n[reaction.rate]\nk = \"0.3 1/min\"\nof = \"A\"\norders = { A = 1 }\n"
      "[[reaction]]\nequation = \"A -> B\"\n[reaction.rate]\nk = \"0.1 1/min\"\n";
  CHECK(right_duty(duty).target.feed_m3_s == Approx(2e-3));
}

TEST_CASE("a production of several reactions needs the yield", "[input][target]") {
  const std::string duty =
      head + "[target]\nconversion = 0.8\nproduction = { species = \"B\", amount = \"1 mol/s\" }\n" + feed + reaction +
      "[[reaction]]\nequation = \"A -> D\"\n[reaction.rate]\nk = \"0.1 1/min\"\n";
  CHECK(told(read_duty(duty)).find("expected yield = { species = \"B\", at_least = 0.8 }") != std::string::npos);
}

TEST_CASE("what is not made of the reactant can not be a production of it", "[input][target]") {
  const std::string duty =
      head + "[target]\nconversion = 0.8\nproduction = { species = \"S\", amount = \"1 mol/s\" }\n" +
      "[feed]\ntemperature = \"25 degC\"\nconcentration = { A = \"2 mol/L\", S = \"1 mol/L\" }\n" + reaction;
  CHECK(told(read_duty(duty)).find("\"S\" is not made from A") != std::string::npos);
}

TEST_CASE("demands on yield, selectivity and the outlet are kept in SI", "[input][target]") {
  const Duty duty = right_duty(
      head +
      "[target]\nfeed_rate = \"2 m3/h\"\nyield = { species = \"B\", at_least = \"80 %\" }\n"
      "selectivity = { species = \"B\", at_least = 0.9 }\n"
      "outlet = [{ species = \"A\", at_most = \"0.1 mol/L\" }, { species = \"B\", at_least = \"1 mol/L\" }]\n" +
      feed + reaction);
  REQUIRE(duty.target.demands.size() == 4);
  CHECK(duty.target.demands[0].bound == Approx(0.8));
  CHECK(duty.target.demands[1].on == Demand::On::selectivity);
  CHECK(duty.target.demands[2].bound == Approx(100));
  CHECK_FALSE(duty.target.demands[2].at_least);
  CHECK(duty.target.demands[3].at_least);
  CHECK_FALSE(duty.target.conversion.has_value());
}

TEST_CASE("a bare number on the outlet of a gas is a mole fraction, of a liquid a fault", "[input][target]") {
  const std::string outlet = "outlet = [{ species = \"A\", at_most = 0.1 }]\n";
  const Duty gas = right_duty("format = 1\nphase = \"gas\"\nconversion_of = \"A\"\n" + target + outlet +
                              "[feed]\ntemperature = \"300 K\"\nfraction = { A = 1 }\n" + reaction);
  CHECK(gas.target.demands.at(0).on == Demand::On::fraction);
  CHECK_FALSE(read_duty(head + target + outlet + feed + reaction).problems.has_value());
}

TEST_CASE("the feed rate of the command line stands in place of the duty's", "[input][target]") {
  const ReadResult result = read_texts({"site.toml", one_tank, ""}, FileText{"duty.toml", glycol(""), ""}, "3 m3/h");
  CHECK(right(result).duty.target.feed_m3_s == Approx(3.0 / 3600));
  const ReadResult wrong = read_texts({"site.toml", one_tank, ""}, FileText{"duty.toml", glycol(""), ""}, "3 m3");
  CHECK(told(wrong).find("--feed-rate:1:1: target, feed_rate: found \"3 m3\", a volume; expected a flow: per hour?") !=
        std::string::npos);
}
