// Feeds and what meets before the first vessel. Expected figures are worked out by hand beside each check.
#include "read_text.hpp"
#include "support/catch.hpp"

using namespace vatwright;
using namespace vatwright::test;
namespace {

const std::string no_rate = "[target]\nconversion = 0.8\n";
const std::string salt = "[[reaction]]\nequation = \"A + B -> C\"\n[reaction.rate]\nk = \"1 L/mol/min\"\n";

std::string stream(const std::string& name, const std::string& rate, const std::string& T, const std::string& rest) {
  return "[[feed]]\nname = \"" + name + "\"\nfeed_rate = \"" + rate + "\"\ntemperature = \"" + T + "\"\n" + rest;
}

}  // namespace

TEST_CASE("liquid streams mix by volume, mass and enthalpy", "[input][feed]") {
  // 2 m3/h of 900 kg/m3, 2 kJ/kg/K at 20 degC and 1 m3/h of 1200 kg/m3, 3 kJ/kg/K at 50 degC:
  // volume 3 m3/h; A 3 mol/L * 2/3 = 2 mol/L; B 6 * 1/3 = 2 mol/L; density (1800 + 1200)/3 = 1000 kg/m3;
  // heat capacity (1800*2 + 1200*3)/3000 = 2.4 kJ/kg/K; temperature (3600*20 + 3600*50)/7200 = 35 degC; pressure the
  // lower.
  const Problem problem = right(read_duty(head + no_rate +
                                          stream("one", "2 m3/h", "20 degC",
                                                 "pressure = \"4 bara\"\nconcentration = { A = \"3 mol/L\" }\ndensity "
                                                 "= \"900 kg/m3\"\nheat_capacity = \"2 kJ/kg/K\"\n") +
                                          stream("two", "1 m3/h", "50 degC",
                                                 "pressure = \"2 bara\"\nconcentration = { B = \"6 mol/L\" }\ndensity "
                                                 "= \"1200 kg/m3\"\nheat_capacity = \"3 kJ/kg/K\"\n") +
                                          salt));
  const Duty& duty = problem.duty;
  const Feed& mixed = duty.chemistry.feed;
  CHECK(duty.target.feed_m3_s == Approx(3.0 / 3600));
  CHECK(fed(duty, "A") == Approx(2000));
  CHECK(fed(duty, "B") == Approx(2000));
  CHECK(*mixed.density_kg_m3 == Approx(1000));
  CHECK(*mixed.heat_capacity_J_kg_K == Approx(2400));
  CHECK(mixed.temperature_K == Approx(308.15));
  CHECK(mixed.pressure_Pa == Approx(2e5));
  CHECK(assumed(problem, "target.feed_rate") == "3 m3/h");
}

TEST_CASE("a rate that the target states keeps the proportions of the streams", "[input][feed]") {
  const std::string streams = stream("one", "2 m3/h", "20 degC", "concentration = { A = \"3 mol/L\" }\n") +
                              stream("two", "1 m3/h", "20 degC", "concentration = { B = \"6 mol/L\" }\n");
  const Duty duty = right_duty(head + target + streams + salt);  // 2 m3/h in all
  CHECK(duty.target.feed_m3_s == Approx(2.0 / 3600));
  CHECK(fed(duty, "A") == Approx(2000));
  CHECK(duty.chemistry.feed.temperature_K == 293.15);
}

TEST_CASE("a stream by mass counts by its density", "[input][feed]") {
  // 1800 kg/h of 900 kg/m3 is 2 m3/h
  const Duty duty = right_duty(
      head + no_rate +
      stream("one", "1800 kg/h", "20 degC", "concentration = { A = \"3 mol/L\" }\ndensity = \"900 kg/m3\"\n") +
      stream("two", "1 m3/h", "20 degC", "concentration = { B = \"6 mol/L\" }\n") + salt);
  CHECK(duty.target.feed_m3_s == Approx(3.0 / 3600));
  CHECK(fed(duty, "B") == Approx(2000));
  CHECK_FALSE(duty.chemistry.feed.density_kg_m3.has_value());
}

TEST_CASE("where only one stream states its pressure, the other is assumed and said", "[input][feed]") {
  const Problem problem = right(
      read_duty(head + no_rate +
                stream("one", "2 m3/h", "20 degC", "pressure = \"4 bara\"\nconcentration = { A = \"3 mol/L\" }\n") +
                stream("two", "1 m3/h", "20 degC", "concentration = { B = \"6 mol/L\" }\n") + salt));
  CHECK(problem.duty.chemistry.feed.pressure_Pa == Approx(101325));
  CHECK(assumed(problem, "feed.two.pressure") == "1.01325 bar");
}

TEST_CASE("gas streams mix by moles; heat capacities that are constants give the enthalpy", "[input][feed]") {
  // 1 kmol/h of A at 400 K, 40 J/mol/K and 3 kmol/h of N2 at 300 K, 30 J/mol/K: fractions 1/4 and 3/4,
  // temperature (40*400 + 90*300)/130 = 330.769 K, pressure 2 bar, c = P/(R T)
  const std::string gas = "format = 1\nphase = \"gas\"\nconversion_of = \"A\"\n";
  const Duty duty = right_duty(
      gas + no_rate + stream("one", "1 kmol/h", "400 K", "pressure = \"2 bara\"\nfraction = { A = 1 }\n") +
      stream("two", "3 kmol/h", "300 K", "pressure = \"3 bara\"\nfraction = { N2 = 1 }\n") +
      "[species.A]\nheat_capacity = \"40 J/mol/K\"\n[species.N2]\nheat_capacity = \"30 J/mol/K\"\n" + reaction);
  const Feed& mixed = duty.chemistry.feed;
  const double T = 43000.0 / 130, c = 2e5 / (8.314462618 * T);
  CHECK(mixed.temperature_K == Approx(T));
  CHECK(fed(duty, "A") == Approx(c / 4));
  CHECK(fed(duty, "N2") == Approx(c * 3 / 4));
  CHECK(duty.target.feed_m3_s == Approx(4000.0 / 3600 / c));
}

TEST_CASE("gas streams whose heat capacity moves with temperature mix by its integral", "[input][feed]") {
  // equal moles of one species at 300 K and 500 K, cp = 20 + 0.05 T + 1e-4 T^2 J/mol/K: the root of 2 H(T) = H(300 K) +
  // H(500 K), H = 20 T + 0.025 T^2 + 1e-4/3 T^3, by scipy.optimize.brentq is 411.45397030626054 K
  const Duty duty =
      right_duty("format = 1\nphase = \"gas\"\nconversion_of = \"A\"\n" + no_rate +
                 stream("one", "1 kmol/h", "300 K", "pressure = \"2 bara\"\nfraction = { A = 1 }\n") +
                 stream("two", "1 kmol/h", "500 K", "pressure = \"2 bara\"\nfraction = { A = 1 }\n") +
                 "[species.A]\nheat_capacity = [\"20 J/mol/K\", \"0.05 J/mol/K2\", \"1e-4 J/mol/K3\"]\n" + reaction);
  CHECK(duty.chemistry.feed.temperature_K == Approx(411.45397030626054).epsilon(1e-11));
}

TEST_CASE("a gas feed is ideal, and weighs what its molar masses say", "[input][feed]") {
  // 2 bar, 500 K, half A of 30 g/mol, half N2 of 28 g/mol: c = 2e5/(8.314462618*500) = 48.109 mol/m3, 29 g/mol
  const std::string gas =
      "format = 1\nphase = \"gas\"\nconversion_of = \"A\"\n[target]\nconversion = 0.5\nfeed_rate = ";
  const std::string rest =
      "[feed]\ntemperature = \"500 K\"\npressure = \"2 bara\"\nfraction = { A = 0.5, N2 = 0.5 }\n"
      "[species.A]\nmolar_mass = \"30 g/mol\"\n[species.N2]\nmolar_mass = \"28 g/mol\"\n" +
      reaction;
  const double c = 2e5 / (8.314462618 * 500);
  const Duty by_mass = right_duty(gas + "\"100 kg/h\"\n" + rest), by_moles = right_duty(gas + "\"5 kmol/h\"\n" + rest);
  CHECK(fed(by_mass, "A") == Approx(c / 2));
  CHECK(*by_mass.chemistry.feed.density_kg_m3 == Approx(c * 0.029));
  CHECK(by_mass.target.feed_m3_s == Approx(100.0 / 3600 / (c * 0.029)));
  CHECK(by_moles.target.feed_m3_s == Approx(5000.0 / 3600 / c));
}

TEST_CASE("a gas without a pressure is at that of the air, and that is said", "[input][feed]") {
  const Problem problem = right(read_duty("format = 1\nphase = \"gas\"\nconversion_of = \"A\"\n" + target +
                                          "[feed]\ntemperature = \"300 K\"\nfraction = { A = 1 }\n" + reaction));
  CHECK(problem.duty.inlet_pressure_Pa == 101325);
  CHECK(assumed(problem, "feed.pressure") == "1.01325 bar");
}

TEST_CASE("a named solvent fills up to the density", "[input][feed]") {
  // 930 kg/m3 less 2 mol/L of 100 g/mol is 730 kg/m3; at 73 g/mol that is 10 mol/L
  const std::string masses =
      "[species.A]\nmolar_mass = \"100 g/mol\"\n[species.S]\nsolvent = true\nmolar_mass = \"73 g/mol\"\n";
  const Duty duty = right_duty(head + target + feed + "density = \"930 kg/m3\"\n" + masses + reaction);
  CHECK(fed(duty, "S") == Approx(10000));
  CHECK_FALSE(duty.chemistry.feed.unnamed_solvent);
  CHECK(right_duty(head + target + feed + "density = \"930 kg/m3\"\n" + reaction).chemistry.feed.unnamed_solvent);
}

TEST_CASE("concentrations by mass are turned by the molar mass", "[input][feed]") {
  // 180 g/L of 60 g/mol is 3 mol/L
  const std::string by_mass = "[feed]\ntemperature = \"25 degC\"\nconcentration = { A = \"180 g/L\" }\n";
  CHECK(fed(right_duty(head + target + by_mass + "[species.A]\nmolar_mass = \"60 g/mol\"\n" + reaction), "A") ==
        Approx(3000));
  CHECK(told(read_duty(head + target + by_mass + reaction)).find("expected species.A.molar_mass, or moles") !=
        std::string::npos);
}

TEST_CASE("amounts by mass count kilograms throughout", "[input][feed]") {
  // 300 mg/L is 0.3 kg/m3; 6 mg/L/h is 6e-3 kg/m3/h; 60 mg/L is 0.06 kg/m3
  const Duty duty = right_duty(
      "format = 1\nphase = \"liquid\"\nconversion_of = \"A\"\namounts = \"mass\"\n" + target +
      "[feed]\ntemperature = \"20 degC\"\nconcentration = { A = \"300 mg/L\" }\n[[reaction]]\nequation = \"A -> B\"\n"
      "[reaction.rate]\nmost = \"6 mg/L/h\"\nhalf = { A = \"60 mg/L\" }\n");
  CHECK(fed(duty, "A") == Approx(0.3));
  const auto& law = std::get<Saturating>(law_of(duty).law);
  CHECK(law.most.k == Approx(6e-3 / 3600));
  CHECK(law.half[0].value == Approx(0.06));
}

TEST_CASE("rates given twice, not at all, or where they do not belong are told", "[input][feed]") {
  CHECK(told(read_duty(head + no_rate + feed + reaction)).find("target, feed_rate: missing") != std::string::npos);
  CHECK(told(read_duty(head + target + feed + "feed_rate = \"2 m3/h\"\n" + reaction))
            .find("feed, feed_rate: found a rate in a single [feed]") != std::string::npos);
  CHECK(told(read_duty(head + no_rate +
                       "[[feed]]\nname = \"one\"\ntemperature = \"20 degC\"\nconcentration = { A = \"3 mol/L\" }\n" +
                       reaction))
            .find("feed one, feed_rate: missing") != std::string::npos);
  CHECK(told(read_duty(head + "[target]\nconversion = 0.8\nfeed_rate = \"3 kmol/h\"\n" + feed + reaction))
            .find("moles are for gases") != std::string::npos);
}

TEST_CASE("figures that make an infinite one are told", "[input][feed]") {
  const std::string gas = "format = 1\nphase = \"gas\"\nconversion_of = \"A\"\n" + target;
  CHECK_FALSE(read_duty(gas + "[feed]\ntemperature = \"1e-290 K\"\npressure = \"1e290 bara\"\nfraction = { A = 1 }\n" +
                        reaction)
                  .problems.has_value());
  CHECK_FALSE(read_duty(head + "[target]\nconversion = 0.8\nfeed_rate = \"1e290 kg/h\"\n" + feed +
                        "density = \"1e-290 kg/m3\"\n" + reaction)
                  .problems.has_value());
  CHECK_FALSE(read_duty(head +
                        "[target]\nconversion = 0.8\nproduction = { species = \"B\", amount = \"1e290 mol/s\" }\n"
                        "[feed]\ntemperature = \"25 degC\"\nconcentration = { A = \"1e-290 mol/L\" }\n" +
                        reaction)
                  .problems.has_value());
}
