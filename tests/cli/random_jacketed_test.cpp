// Random duties of vessels on their jackets, reckoned apart from the program: tests/reference/random/jacketed.txt, made
// by generate_jacketed.py beside it.
#include <cstdlib>

#include "random_row.hpp"
#include "support/catch.hpp"

using namespace vatwright::reference;

namespace {

constexpr double tolerance = 1e-6, tolerance_K = 1e-4;

/// U A of the whole vessel: a tank's jacket of 1 m2, a tube 1 m2 across (its surface follows from its length).
std::string vessel_text(const Words& f) {
  const bool tank = f[0] == "tank";
  std::string text = "format = 1\n[site]\nname = \"Random\"\n[utility.medium]\nsupply = \"" + f[10] + " K\"\n";
  if (f[11] == "-")
    text += "condensing = true\n";
  else  // 1000 kg/m3 and 4 kJ/kg/K: 4e6 J/m3/K
    text += "density = \"1000 kg/m3\"\nheat_capacity = \"4 kJ/kg/K\"\nflow = \"" +
            number(std::atof(f[11].c_str()) / 4e6) + " m3/s\"\n";
  text += "[[vessel]]\ntag = \"V-1\"\n";
  const double UA = std::atof(f[9].c_str()), surface = 3.141592653589793 * 1.1283791670955126 * std::atof(f[2].c_str());
  if (tank)
    text += "kind = \"stirred-tank\"\nvolume = \"" + f[2] + " m3\"\n[vessel.jacket]\narea = \"1 m2\"\n";
  else
    text += "kind = \"tube\"\nbore = \"1.1283791670955126 m\"\nlength = \"" + f[2] + " m\"\n[vessel.jacket]\n" +
            "passage = \"" + f[12] + "\"\n";
  return text + "utilities = [\"medium\"]\nU = \"" + number(tank ? UA : UA / surface) + " W/m2/K\"\n";
}

Case case_of(const std::string& row, const std::string& place, int line) {
  const auto f = split(row, " | ");
  Case c;
  c.file = place;
  c.source = row;
  if (f.size() != 19) {
    c.faults.push_back("19 columns wanted");
    return c;
  }
  c.command = {"screen"};
  c.inventory = vessel_text(f);
  c.duty = "format = 1\nname = \"Random\"\nphase = \"" + f[1] +
           "\"\nconversion_of = \"A\"\n[target]\nconversion = 0.5\nfeed_rate = \"" + f[3] + " m3/s\"\n" +
           feed_text(f[1], f[4], f[5], f[6], f[7]);
  const auto reactions = split(f[8], " & ");
  for (std::size_t j = 0; j < reactions.size(); ++j) c.duty += reaction_text(reactions[j], j + 1);
  c.duty += "[operation]\nthermal = \"jacketed\"\n[start]\nfilled_with = \"" + f[14] + "\"\ntemperature = \"" + f[13] +
            " K\"\n";
  const std::string vessel = "vessels/0/";
  c.expected.push_back({line, vessel + "conversion", f[16], tolerance, false});
  c.expected.push_back({line, vessel + "outlet/temperature_K", f[17], tolerance_K, false});
  if (f[18] != "-") c.expected.push_back({line, vessel + "hottest_K", f[18], tolerance_K, false});
  if (f[15] == "-") return c;
  const auto states = split(f[15], " ; ");
  c.expected.push_back({line, vessel + "steady_states/size", std::to_string(states.size()), 0, true});
  for (std::size_t s = 0; s < states.size(); ++s) {
    const auto w = words(states[s]);
    const std::string at = vessel + "steady_states/" + std::to_string(s) + "/";
    c.expected.push_back({line, at + "conversion", w[0], tolerance, false});
    c.expected.push_back({line, at + "temperature_K", w[1], tolerance_K, false});
    c.expected.push_back({line, at + "stable", w[2] == "y" ? "true" : "false", 0, true});
  }
  return c;
}

}  // namespace

TEST_CASE("random jacketed duties come out as another library reckons them", "[reference][random][jacketed]") {
  CHECK(rows_as_expected("jacketed.txt", case_of) >= 300);
}
