// Heat along a held tube, and what a jacket that nothing holds takes, against closed forms worked out beside each
// check.
#include "plant.hpp"
#include "support/catch.hpp"

using namespace vatwright;

namespace {
/// First order, 2000 mol/m3, 60 kJ/mol, 2 MJ/m3/K.
Plant warm() {
  Plant plant({2000, 0});
  plant.react({{0, -1}, {1, 1}}, 1e-3, {{0, 1}}).heat = HeatOfReaction{-60e3, 298.15, {}};
  plant.feed.density_kg_m3 = 1000;
  plant.feed.heat_capacity_J_kg_K = 2000;
  plant.feed.temperature_K = 350;
  return plant;
}
}  // namespace

TEST_CASE("what the wall of a held tube must take falls with the rate", "[vessel][tube][heat]") {
  Rated tube(warm(), tube_of(1));
  const VesselOutcome outcome = tube.at(1e-3, Detail::profile);
  const Profile& along = *outcome.profile;
  REQUIRE(along.flux_W_m2.size() == along.length_m.size());
  const double bore = std::sqrt(4 / 3.14159265358979323846);
  for (std::size_t i = 0; i < along.length_m.size(); ++i) {
    const double c = 2000 * std::exp(-1e-3 * along.volume_m3[i] / 1e-3);            // first order, plug flow
    CHECK(along.flux_W_m2[i] == Approx(1e-3 * c * 60e3 * bore / 4).epsilon(1e-9));  // volume over surface
  }
  CHECK(outcome.heat->most_flux_W_m2 == Approx(1e-3 * 2000 * 60e3 * bore / 4).epsilon(1e-9));
}

TEST_CASE("a tube of which nothing reacts comes to its jacket as an exponential", "[vessel][tube][heat]") {
  // T - Tm falls as exp(-U A/(v rho cp)): 500 W/m2/K, 1e-3 m3/s
  Plant plant = warm();
  constant_of(plant.reactions[0]).k = 0;
  Utility medium;
  medium.name = "medium";
  medium.supply_K = 300;
  plant.operation.thermal = Thermal::jacketed;
  plant.operation.medium = &medium;
  Vessel vessel = tube_of(1);
  vessel.jacket = Jacket{{"medium"}, std::nullopt, 500, 0, Passage::uniform};
  const double area = 3.14159265358979323846 * std::sqrt(4 / 3.14159265358979323846);
  Rated tube(plant, vessel);
  const VesselOutcome outcome = tube.at(1e-3);
  const double T = 300 + 50 * std::exp(-500 * area / (1e-3 * 2e6));
  CHECK(outcome.outlet.temperature_K == Approx(T).epsilon(1e-9));
  CHECK(outcome.heat->cooling_W == Approx(1e-3 * 2e6 * (350 - T)).epsilon(1e-8));
  CHECK_FALSE(outcome.runaway_share);
}

TEST_CASE("if cooling fails the worst place is the inlet of a held tube and the start of a tank", "[vessel][heat]") {
  // complete reaction of the feed: 350 + 60e3*2000/2e6 = 410 K
  Rated tube(warm(), tube_of(1)), tank(warm(), tank_of(1));
  CHECK(*tube.at(1e-3).uncooled_K == Approx(410).epsilon(1e-12));
  CHECK(*tank.at(1e-3).uncooled_K == Approx(410).epsilon(1e-12));
  Plant late = warm();
  late.start.filled_with = Start::Filled::product;
  Rated safer(late, tank_of(1));
  const VesselOutcome outcome = safer.at(1e-3);  // X = 1/2: what is left warms it by 30 K
  CHECK(outcome.conversion == Approx(0.5).epsilon(1e-12));
  CHECK(*outcome.uncooled_K == Approx(380).epsilon(1e-12));
}

TEST_CASE("R T^2/E is told where a tank gives off heat", "[vessel][heat]") {
  Plant plant = warm();
  RateConstant& k = constant_of(plant.reactions[0]);
  k.moves = RateConstant::Moves::arrhenius;
  k.at_K = 350;
  k.activation_J_mol = 90e3;
  plant.start.filled_with = Start::Filled::product;
  Vessel vessel = tank_of(1);
  vessel.jacket = Jacket{{"medium"}, 4.0, 500, 0, Passage::uniform};
  Rated tank(plant, vessel);
  const VesselOutcome outcome = tank.at(1e-3);
  REQUIRE(outcome.driving);
  CHECK(outcome.driving->most_K == Approx(8.314462618 * 350 * 350 / 90e3).epsilon(1e-4));
  CHECK(outcome.driving->contents_K == Approx(60e3 * 1000 * 1e-3 / (500 * 4.0)).epsilon(1e-9));  // Q/(U A)
}
