// Rate laws, equilibria and what is asked beside them. Expected figures: unit conversions by hand.
#include <cmath>

#include "read_text.hpp"
#include "support/catch.hpp"

using namespace vatwright;
using namespace vatwright::test;
namespace {

const std::string two = "[feed]\ntemperature = \"60 degC\"\nconcentration = { A = \"2 mol/L\", B = \"3 mol/L\" }\n";
const std::string gas_head =
    "format = 1\nphase = \"gas\"\nconversion_of = \"A\"\n" + target +
    "[feed]\ntemperature = \"400 K\"\npressure = \"2 bara\"\nfraction = { A = 0.5, B = 0.5 }\n";

std::string react(const std::string& equation, const std::string& rate, const std::string& rest = "") {
  return "[[reaction]]\nequation = \"" + equation + "\"\n[reaction.rate]\n" + rate + rest;
}
std::string liquid(const std::string& reactions) { return head + target + two + reactions; }

}  // namespace

TEST_CASE("orders left out are 1 each where every reactant counts once", "[input][reaction]") {
  const Duty duty = right_duty(liquid(react("A + B -> C", "k = \"0.06 L/mol/min\"\n")));
  REQUIRE(power_of(duty).orders.size() == 2);
  CHECK(power_of(duty).orders[0].value == 1);
  CHECK(power_of(duty).k.k == Approx(1e-6));  // 0.06e-3 m3/mol/60 s
  CHECK(law_of(duty).of_coefficient == 1);
}

TEST_CASE("broken and negative orders, and orders on a product, fit their unit", "[input][reaction]") {
  // order 0.5 in A, -0.5 in B, 1 in C: overall 1
  const Duty duty =
      right_duty(liquid(react("A + B -> C", "k = \"0.06 1/min\"\norders = { A = 0.5, B = -0.5, C = 1 }\n")));
  CHECK(power_of(duty).k.k == Approx(1e-3));
  CHECK(power_of(duty).orders[1].value == -0.5);
  // order 1/2: mol^0.5/L^0.5/s is sqrt(1000) mol^0.5/m^1.5/s
  const Duty half = right_duty(liquid(react("A -> C", "k = \"0.06 mol^0.5/L^0.5/s\"\norders = { A = 0.5 }\n")));
  CHECK(power_of(half).k.k == Approx(0.06 * std::sqrt(1000.0)));
}

TEST_CASE("a constant may be of the reaction or of a species", "[input][reaction]") {
  const std::string rest = "orders = { A = 2 }\n";
  const Duty of_A = right_duty(liquid(react("2 A -> C", "k = \"0.3 L/mol/min\"\nof = \"A\"\n" + rest)));
  const Duty of_all = right_duty(liquid(react("2 A -> C", "k = \"0.3 L/mol/min\"\nof = \"reaction\"\n" + rest)));
  const Duty of_made = right_duty(liquid(react("A -> 3 C", "k = \"0.3 1/min\"\nof = \"C\"\n")));
  CHECK(law_of(of_A).of_coefficient == 2);
  CHECK(law_of(of_all).of_coefficient == 1);
  CHECK(law_of(of_made).of_coefficient == 3);
  CHECK(told(read_duty(liquid(react("A -> C", "k = \"0.3 1/min\"\nof = \"B\"\n"))))
            .find("found \"B\", not in the equation") != std::string::npos);
}

TEST_CASE("a constant moves by activation energy or theta, from where it holds", "[input][reaction]") {
  const Duty E =
      right_duty(liquid(react("A -> C", "k = \"0.3 1/min\"\nat = \"50 degC\"\nactivation_energy = \"60 kJ/mol\"\n")));
  CHECK(power_of(E).k.moves == RateConstant::Moves::arrhenius);
  CHECK(*power_of(E).k.at_K == Approx(323.15));
  const Duty theta = right_duty(liquid(react("A -> C", "k = \"0.3 1/min\"\nat = \"50 degC\"\ntheta = 1.05\n")));
  CHECK(power_of(theta).k.theta == 1.05);
  CHECK(told(read_duty(liquid(react("A -> C", "k = \"0.3 1/min\"\ntheta = 1.05\n")))).find("rate.at: missing") !=
        std::string::npos);
  CHECK(told(read_duty(liquid(react("A -> C",
                                    "k = \"0.3 1/min\"\nat = \"60 degC\"\ntheta = 1.05\n"
                                    "activation_energy = \"60 kJ/mol\"\n"))))
            .find("found both theta and activation_energy") != std::string::npos);
}

TEST_CASE("a constant without either is refused only where it would be used elsewhere", "[input][reaction]") {
  const std::string text =
      liquid(react("A -> C", "k = \"0.3 1/min\"\nat = \"60 degC\"\n"));  // held at the feed's 60 degC
  CHECK(read_duty(text).problems.has_value());
  CHECK_FALSE(read_duty(text + "[operation]\ntemperature = \"70 degC\"\n").problems.has_value());
}

TEST_CASE("rates by mass are turned by the species they are of", "[input][reaction]") {
  // 6 g/L/h of A of 60 g/mol is 0.1 mol/L/h = 100/3600 mol/m3/s; 3 g/L is 50 mol/m3
  const std::string mass = "[species.A]\nmolar_mass = \"60 g/mol\"\n";
  const std::string most = "most = \"6 g/L/h\"\nhalf = { A = \"3 g/L\" }\n";
  for (const std::string& of : {std::string(), std::string("of = \"A\"\n")}) {
    const Duty duty = right_duty(liquid(mass + react("A -> C", most + of)));
    const auto& law = std::get<Saturating>(law_of(duty).law);
    CHECK(law.most.k == Approx(100.0 / 3600));
    CHECK(law.half[0].value == Approx(50));
  }
  CHECK_FALSE(read_duty(liquid(react("A -> C", most))).problems.has_value());             // no molar mass
  CHECK_FALSE(read_duty(liquid(mass + react("A + B -> C", most))).problems.has_value());  // of which?
}

TEST_CASE("most moves as k does, and counts per and adsorption too", "[input][reaction]") {
  const Duty duty = right_duty(liquid(
      react("A -> C",
            "most = \"2 mol/kg/h\"\nhalf = { A = \"0.5 mol/L\" }\nper = \"catalyst\"\nat = \"30 degC\"\ntheta = 1.07\n"
            "adsorption = { B = \"0.4 L/mol\" }\nadsorption_power = 2\n")));
  const auto& law = std::get<Saturating>(law_of(duty).law);
  CHECK(law.most.k == Approx(2.0 / 3600));
  CHECK(law.most.theta == 1.07);
  CHECK(law_of(duty).per == Per::catalyst);
  CHECK(law_of(duty).adsorption.at(0).value == Approx(0.4e-3));
  CHECK(law_of(duty).adsorption_power == 2);
}

TEST_CASE("partial pressures take constants by pressure, in rates, adsorption and equilibrium", "[input][reaction]") {
  const Duty duty = right_duty(gas_head + react("A + B <-> C",
                                                "basis = \"pressure\"\nk = \"0.5 mol/L/s/bar2\"\n"
                                                "adsorption = { A = \"0.2 1/bar\" }\n",
                                                "[reaction.equilibrium]\nK = \"3 1/bar\"\n"));
  CHECK(power_of(duty).k.k == Approx(500 / 1e10));  // 500 mol/m3/s / (1e5 Pa)^2
  CHECK(law_of(duty).adsorption.at(0).value == Approx(2e-6));
  CHECK(duty.chemistry.kinetics.reaction(0).equilibrium->K == Approx(3e-5));
  CHECK_FALSE(
      read_duty(liquid(react("A -> C", "basis = \"pressure\"\nk = \"0.5 mol/L/s/bar\"\n"))).problems.has_value());
}

TEST_CASE("an equilibrium is in concentrations where the rate is", "[input][reaction]") {
  const std::string rate = "k = \"0.06 L/mol/min\"\n";
  const Duty duty = right_duty(liquid(react("A + B <-> C", rate, "[reaction.equilibrium]\nK = \"4 L/mol\"\n")));
  CHECK(duty.chemistry.kinetics.reaction(0).equilibrium->K == Approx(4e-3));
  const std::string bare = liquid(react("A + B <-> C", rate, "[reaction.equilibrium]\nK = 4\n"));
  CHECK_FALSE(read_duty(bare).problems.has_value());
  const Problem still = right(read_duty(liquid(react("A + B <-> C + D", rate, "[reaction.equilibrium]\nK = 4\n"))));
  CHECK(assumed(still, "reaction.A + B <-> C + D.equilibrium.K") == "the same at any temperature");
}

TEST_CASE("the orders of a reverse rate are the coefficients of the products, where they are left out",
          "[input][reaction]") {
  const Duty duty = right_duty(
      liquid(react("A <-> 2 C", "k = \"0.06 1/min\"\n", "[reaction.reverse]\nk = \"0.6 L/mol/min\"\nof = \"C\"\n")));
  const Reaction& r = duty.chemistry.kinetics.reaction(0);
  REQUIRE(r.reverse.has_value());
  const auto& back = std::get<PowerLaw>(r.reverse->law);
  REQUIRE(back.orders.size() == 1);
  CHECK(back.orders[0].value == 2);
  CHECK(back.k.k == Approx(1e-5));
  CHECK(r.reverse->of_coefficient == 2);
  CHECK(
      told(read_duty(liquid(react("A <-> 2 C", "k = \"0.06 1/min\"\n", "[reaction.reverse]\nk = \"0.6 L/mol/min\"\n"))))
          .find("reverse.of: missing where C stands with 2") != std::string::npos);
}

TEST_CASE("an absent reactant of too low an order is refused beside an equilibrium", "[input][reaction]") {
  const std::string rate = "k = \"0.06 1/min\"\norders = { A = 1 }\n";
  CHECK(told(read_duty(liquid(react("A + E <-> C", rate, "[reaction.equilibrium]\nK = \"4 L/mol\"\n"))))
            .find("order 0 of E, which is not fed, is below its coefficient 1") != std::string::npos);
}

TEST_CASE("heats take their sign from the word", "[input][reaction]") {
  const auto heat = [](const std::string& line) {
    return right_duty(head + target + two + "[[reaction]]\nequation = \"A -> C\"\n" + line +
                      "[reaction.rate]\nk = \"1 1/h\"\n")
        .chemistry.kinetics.reaction(0)
        .heat->dH_J_mol;
  };
  CHECK(heat("releases = \"62 kJ/mol\"\n") == -62000);
  CHECK(heat("absorbs = \"10 kcal/mol\"\n") == Approx(41840));
}

TEST_CASE("heats move with the heat capacities of species, from the temperature that is assumed and said",
          "[input][reaction]") {
  // A of 100 J/mol/K, C of 60 + 0.1 T: dCp = -40 + 0.1 T
  const std::string cp =
      "[species.A]\nheat_capacity = \"100 J/mol/K\"\n[species.B]\nheat_capacity = \"75 J/mol/K\"\n"
      "[species.C]\nheat_capacity = [\"60 J/mol/K\", \"0.1 J/mol/K2\"]\n";
  const std::string fractions =
      "format = 1\nphase = \"gas\"\nconversion_of = \"A\"\n" + target +
      "[feed]\ntemperature = \"400 K\"\npressure = \"2 bara\"\nfraction = { A = 0.5, B = 0.5 }\n";
  const Problem problem = right(read_duty(fractions + cp +
                                          "[[reaction]]\nname = \"r\"\nequation = \"A -> C\"\n"
                                          "releases = \"62 kJ/mol\"\n[reaction.rate]\nk = \"1 1/h\"\n"));
  const HeatOfReaction& heat = *problem.duty.chemistry.kinetics.reaction(0).heat;
  REQUIRE(heat.dCp.size() == 2);
  CHECK(heat.dCp[0] == Approx(-40));
  CHECK(heat.dCp[1] == Approx(0.1));
  CHECK(heat.at_K == 298.15);
  CHECK(assumed(problem, "reaction.r.heat_at") == "25 degC");
}

TEST_CASE("a measured table is read from keys and from a file beside the duty", "[input][reaction]") {
  const std::string folder = std::string(VATWRIGHT_SOURCE_DIR) + "/tests/input/fixtures/";
  const std::string keys =
      "conversion = [0, 0.4, 0.8]\nconsumption = [\"9 mol/m3/min\", \"6 mol/m3/min\", \"3 mol/m3/min\"]\n";
  for (const std::string& rate : {keys, std::string("table = \"rates.csv\"\n")}) {
    const ReadResult result = read_texts(
        {"site.toml", one_tank, ""}, FileText{folder + "duty.toml", head + target + feed + react("A -> C", rate), ""});
    const auto& table = std::get<RateTable>(right(result).duty.chemistry.kinetics.reaction(0).forward);
    REQUIRE(table.conversion.size() == 3);
    CHECK(table.conversion[1] == 0.4);
    CHECK(table.consumption_mol_m3_s[1] == Approx(0.1));
  }
  const ReadResult none =
      read_texts({"site.toml", one_tank, ""},
                 FileText{folder + "duty.toml", head + target + feed + react("A -> C", "table = \"none.csv\"\n"), ""});
  CHECK(told(none).find("\"none.csv\": no such file; expected a CSV file beside the duty") != std::string::npos);
}

TEST_CASE("what a measured table has no use for is told, not left out", "[input][reaction]") {
  const std::string keys = "conversion = [0, 0.8]\nconsumption = [\"9 mol/m3/min\", \"6 mol/m3/min\"]\n";
  for (const char* beside : {"activation_energy = \"58 kJ/mol\"\n", "theta = 1.05\n", "of = \"A\"\n",
                             "per = \"catalyst\"\n", "adsorption = { A = \"1 L/mol\" }\n"}) {
    CAPTURE(beside);
    CHECK_FALSE(read_duty(liquid(react("A -> C", keys + beside))).problems.has_value());
  }
  CHECK_FALSE(read_duty(liquid(react("A -> C", keys) + react("B -> D", "k = \"1 1/h\"\n"))).problems.has_value());
}

TEST_CASE("the range in which a rate was measured is kept", "[input][reaction]") {
  const Duty duty = right_duty(liquid(react("A -> C",
                                            "k = \"1 1/h\"\nmeasured = { temperature = [\"50 degC\", \"75 degC\"], "
                                            "conversion = [0.0, 0.9], source = \"lab book 4471\" }\n")));
  const Measured& measured = *duty.chemistry.kinetics.reaction(0).measured;
  CHECK(measured.temperature_K->second == Approx(348.15));
  CHECK(measured.conversion->second == 0.9);
  CHECK(measured.source == "lab book 4471");
}

TEST_CASE("spreads are named with their full path", "[input][reaction]") {
  const Duty duty =
      right_duty(head + target +
                 "[feed]\ntemperature = \"60 degC\"\nconcentration = { A = \"2 mol/L\", B = \"3 mol/L\" }\n"
                 "spread = { \"concentration.A\" = \"5 %\", temperature = \"2 K\" }\n" +
                 "[[reaction]]\nname = \"main\"\nequation = \"A -> C\"\n[reaction.rate]\nk = \"1 1/h\"\nspread = { k = "
                 "\"0.2 1/h\" }\n");
  REQUIRE(duty.spreads.size() == 3);
  CHECK(duty.spreads[0].key == "feed.concentration.A");
  CHECK(duty.spreads[0].relative);
  CHECK(duty.spreads[0].half_width == Approx(0.05));
  CHECK(duty.spreads[1].key == "feed.temperature");
  CHECK(duty.spreads[1].half_width == Approx(2));
  CHECK(duty.spreads[2].key == "reaction.main.rate.k");
  CHECK(duty.spreads[2].half_width == Approx(0.2 / 3600));
}
