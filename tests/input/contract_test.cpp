// The two big examples of the contract on files, and each of the other forms, as whole files: every line is read
// without a fault, and says what it says there. Expected figures: unit conversions by hand.
#include "read_text.hpp"
#include "support/catch.hpp"

using namespace vatwright;
using namespace vatwright::test;

TEST_CASE("the inventory with every kind and key is read whole", "[input][contract]") {
  const ReadResult result =
      read_texts({"whole-inventory.toml", file_text("tests/input/fixtures/whole-inventory.toml"), ""}, std::nullopt);
  CHECK(told(result).empty());
  REQUIRE(result.site.has_value());
  const Site& site = *result.site;
  CHECK(site.name == "Harrow Quay, east bay");
  REQUIRE(site.utilities.size() == 2);
  CHECK(site.utilities[0].supply_K == Approx(299.15));
  CHECK(*site.utilities[0].flow_m3_s == Approx(30.0 / 3600));
  CHECK(site.utilities[1].condensing);
  REQUIRE(site.vessels.size() == 4);
  const auto& k201 = std::get<StirredTank>(site.vessels[0].kind);
  const auto& k202 = std::get<StirredTank>(site.vessels[1].kind);
  CHECK(k201.volume_m3 == 6.3);
  CHECK(k202.volume_m3 == 6.3);
  CHECK(k201.agitator_W == Approx(4100));
  CHECK(site.vessels[0].pressure_Pa->first == Approx(1325));
  CHECK(site.vessels[0].jacket->U_W_m2_K == 380);
  CHECK(site.vessels[1].jacket->U_W_m2_K == 300);
  CHECK(*site.vessels[1].jacket->area_m2 == 14.2);
  CHECK(site.vessels[0].note == "spare since the resin line closed");
  CHECK(site.vessels[1].note.empty());  // tag, note and source are not taken over
  const auto& p11 = std::get<Tube>(site.vessels[2].kind);
  CHECK(p11.bore_m == Approx(0.0525));
  CHECK(p11.roughness_m == Approx(4.6e-5));
  CHECK(*site.vessels[2].pressure_drop_Pa == Approx(3e5));
  CHECK(site.vessels[2].jacket->passage == Passage::counter_current);
  const auto& b3 = std::get<PackedTube>(site.vessels[3].kind);
  CHECK(b3.tubes == 180);
  CHECK(b3.voidage == 0.41);
}

TEST_CASE("the duty with every table is read whole", "[input][contract]") {
  const ReadResult result =
      read_texts({"whole-inventory.toml", file_text("tests/input/fixtures/whole-inventory.toml"), ""},
                 FileText{"whole-duty.toml", file_text("tests/input/fixtures/whole-duty.toml"), ""});
  CHECK(told(result).empty());
  REQUIRE(result.problems.has_value());
  const Duty& duty = result.problems->base.duty;
  CHECK(duty.name == "Acetate trial for spring");
  CHECK(duty.target.conversion == 0.90);
  CHECK(duty.target.feed_m3_s == Approx(2.4 / 3600));
  CHECK(fed(duty, "A") == Approx(3200));
  CHECK(duty.chemistry.feed.pressure_Pa == Approx(401325));
  CHECK(*duty.chemistry.feed.viscosity_Pa_s == Approx(8e-4));
  CHECK(power_of(duty).k.k == Approx(0.042e-3 / 60));
  CHECK(power_of(duty).k.activation_J_mol == Approx(58000));
  CHECK(duty.chemistry.kinetics.reaction(0).heat->dH_J_mol == Approx(-62000));
  CHECK(duty.hold_K == Approx(343.15));
  CHECK(*duty.operation_of.at("K-201").temperature_K == Approx(353.15));
  CHECK(duty.start.filled_with == Start::Filled::feed);
  CHECK(*duty.limits.coldest_K == Approx(273.15));
  CHECK(*duty.limits.hottest_K == Approx(383.15));
  CHECK(duty.limits.boiling == ProductLimits::Boiling::at);
  REQUIRE(duty.spreads.size() == 2);
  CHECK(duty.spreads[0].key == "reaction.acylation.rate.k");
  CHECK(duty.spreads[0].half_width == Approx(0.15));
  CHECK(duty.spreads[1].key == "reaction.acylation.rate.activation_energy");
  CHECK_FALSE(duty.spreads[1].relative);
  CHECK(duty.spreads[1].half_width == Approx(4000));
  REQUIRE(result.problems->cases.size() == 1);
  const Problem& winter = result.problems->cases[0].second;
  CHECK(winter.duty.chemistry.feed.temperature_K == Approx(277.15));
  CHECK(winter.site.utilities[0].supply_K == Approx(281.15));
  CHECK(winter.duty.target.feed_m3_s == Approx(2.4 / 3600));
}

TEST_CASE("forms that stand in place of others are read", "[input][contract]") {
  const std::string inventory = file_text("tests/input/fixtures/whole-inventory.toml");
  for (const char* name : {"form-production", "form-two-feeds", "form-gas", "form-reversible", "form-most",
                           "form-reverse", "form-table"}) {
    CAPTURE(name);
    const std::string path = std::string("tests/input/fixtures/") + name + ".toml";
    REQUIRE_FALSE(file_text(path).empty());
    const ReadResult result = read_texts({"whole-inventory.toml", inventory, ""},
                                         FileText{std::string(VATWRIGHT_SOURCE_DIR) + "/" + path, file_text(path), ""});
    CHECK(told(result).empty());
    CHECK(result.problems.has_value());
  }
}

TEST_CASE("a duty worked in batches is read, and refused in plain words alone", "[input][contract]") {
  const ReadResult result =
      read_texts({"whole-inventory.toml", file_text("tests/input/fixtures/whole-inventory.toml"), ""},
                 FileText{"form-dosed.toml", file_text("tests/input/fixtures/form-dosed.toml"), ""});
  REQUIRE(result.diagnostics.sorted().size() == 1);
  CHECK(result.diagnostics.sorted()[0].found == "\"dosed\" is read and checked, but this version can not reckon it");
}
