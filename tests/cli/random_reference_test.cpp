// Random duties whose conversions were reckoned apart from the program: tests/reference/random/sets.txt, made by
// generate.py beside it. Here each row becomes a site and a duty, and goes through the whole program.
#include "random_row.hpp"
#include "support/catch.hpp"

using namespace vatwright::reference;

namespace {

std::string vessel_text(const std::string& kind, const std::string& volume_m3) {
  const std::string head = "format = 1\n[site]\nname = \"Random\"\n[[vessel]]\ntag = \"V-1\"\n";
  if (kind == "tank") return head + "kind = \"stirred-tank\"\nvolume = \"" + volume_m3 + " m3\"\n";
  return head + "kind = \"tube\"\nbore = \"1.1283791670955126 m\"\nlength = \"" + volume_m3 + " m\"\n";  // 1 m2 across
}

Case case_of(const std::string& row, const std::string& place, int line) {
  const auto f = split(row, " | ");
  Case c;
  c.file = place;
  c.source = row;
  if (f.size() != 13) {
    c.faults.push_back("13 columns wanted");
    return c;
  }
  c.command = {"screen"};
  c.inventory = vessel_text(f[0], f[3]);
  c.duty = "format = 1\nname = \"Random\"\nphase = \"" + f[1] +
           "\"\nconversion_of = \"A\"\n[target]\nconversion = 0.5\nfeed_rate = \"" + f[4] + " m3/s\"\n" +
           feed_text(f[1], f[5], f[6], f[7], f[8]);
  const auto reactions = split(f[9], " & ");
  for (std::size_t j = 0; j < reactions.size(); ++j) c.duty += reaction_text(reactions[j], j + 1);
  c.duty += "[operation]\nthermal = \"" + f[2] + "\"\n";
  c.expected.push_back({line, "vessels/0/conversion", f[11], 1e-8, false});
  c.expected.push_back({line, "vessels/0/outlet/temperature_K", f[12], 1e-6, false});
  if (f[10] != "-") c.expected.push_back({line, "vessels/0/steady_states/size", f[10], 0, true});
  return c;
}

}  // namespace

TEST_CASE("random duties come out as another library reckons them", "[reference][random]") {
  CHECK(rows_as_expected("sets.txt", case_of) >= 200);
}
