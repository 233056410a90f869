// What every kind of vessel keeps, over the one list of kinds: a new kind joins unasked.
#include <cmath>
#include <random>

#include "plant.hpp"
#include "support/catch.hpp"

using namespace vatwright;

namespace {

Vessel sample(const StirredTank&) { return tank_of(1); }
Vessel sample(const Tube&) { return tube_of(1); }
Vessel sample(const PackedTube&) { return bed_of(2.5, 0.4); }  // 1 m3 of voids
template <class Kind>
Vessel sample() {
  return sample(Kind{});
}

Plant esterification() {
  Plant plant({3200, 3900, 0, 0});
  Reaction& r = plant.react({{0, -1}, {1, -1}, {2, 1}, {3, 1}}, 7e-7, {{0, 1}, {1, 1}});
  constant_of(r).at_K = 333.15;
  constant_of(r).moves = RateConstant::Moves::arrhenius;
  constant_of(r).activation_J_mol = 58000;
  r.heat = HeatOfReaction{.dH_J_mol = -62000, .at_K = 298.15, .dCp = {}};
  plant.feed.temperature_K = 298.15;
  plant.feed.density_kg_m3 = 930;
  plant.feed.heat_capacity_J_kg_K = 2100;
  plant.feed.viscosity_Pa_s = 8e-4;
  plant.operation.hold_K = 343.15;
  return plant;
}

/// A random duty of one to three reactions among six species, orders 0 to 2, some reversible.
Plant random_duty(std::mt19937& random, int reactions) {
  std::uniform_real_distribution<double> u(0, 1);
  Plant plant({1 + u(random), 1 + u(random), 0, 0.3 * u(random), 0, 0});
  const int from[] = {0, 2, 1}, with[] = {1, 3, 4}, to[] = {2, 4, 5};
  for (int j = 0; j < reactions; ++j) {
    const double orders[] = {0, 0.5, 1, 1.5, 2};
    Reaction& r = plant.react({{from[j], -1}, {with[j], -1}, {to[j], 1}}, std::pow(10, 2 * u(random) - 1),
                              {{from[j], orders[random() % 5]}, {with[j], orders[1 + random() % 4]}});
    if (u(random) < 0.3 && std::get<PowerLaw>(law_of(r).law).orders[0].value >= 1 &&
        std::get<PowerLaw>(law_of(r).law).orders[1].value >= 1)
      r.equilibrium = Equilibrium{.K = std::pow(10, 3 * u(random) - 1), .at_K = {}, .heat = {}};
  }
  return plant;
}

}  // namespace

TEMPLATE_LIST_TEST_CASE("every kind keeps its balances", "[vessel][conformance]", AnyVessel) {
  Rated rated(esterification(), sample<TestType>());
  for (double feed : {1e-9, 1e-5, 1e-3, 1e-2}) {
    const auto outcome = rated.at(feed, Detail::profile);
    CHECK(outcome.residual <= 1e-9);
    CHECK(outcome.isothermal);
    CHECK(outcome.conversion == Approx(outcome.outlet.xi_mol_m3[0] / 3200).epsilon(1e-14));
    REQUIRE(outcome.heat);
    // heat in by the feed and the reaction, out by the outlet and the wall
    const double capacity = 930 * 2100.0, reaction = feed * 62000 * outcome.outlet.xi_mol_m3[0];
    const double warming = feed * capacity * (343.15 - 298.15);
    CHECK(outcome.heat->cooling_W - outcome.heat->preheat_W == Approx(reaction - warming).epsilon(1e-12));
    CHECK(outcome.hottest_K == 343.15);
    CHECK_FALSE(outcome.inside.empty());
    const bool is_tank = std::is_same_v<TestType, StirredTank>;
    CHECK(outcome.profile.has_value() != is_tank);
    CHECK(outcome.states.empty() != is_tank);
    CHECK(outcome.pressure_drop_Pa.has_value() != is_tank);
  }
}

TEMPLATE_LIST_TEST_CASE("every kind rises by the reaction's heat when adiabatic", "[vessel][conformance]", AnyVessel) {
  Plant plant = esterification();
  plant.adiabatic();
  plant.feed.temperature_K = 330;
  Rated rated(plant, sample<TestType>());
  for (double feed : {1e-5, 1e-4, 1e-2}) {
    const auto outcome = rated.at(feed);
    const double rise = 62000 * outcome.outlet.xi_mol_m3[0] / (930 * 2100);
    CHECK(outcome.outlet.temperature_K == Approx(330 + rise).epsilon(1e-12));
    CHECK(outcome.hottest_K == Approx(330 + rise).epsilon(1e-12));
    CHECK(outcome.residual <= 1e-6);
    CHECK_FALSE(outcome.isothermal);
  }
}

TEMPLATE_LIST_TEST_CASE("the order of asking does not change an answer", "[vessel][conformance]", AnyVessel) {
  std::mt19937 random(7);
  for (int reactions : {1, 2, 3}) {
    const Plant plant = random_duty(random, reactions);
    Rated first(plant, sample<TestType>()), second(plant, sample<TestType>());
    const double feeds[] = {1e-3, 5.0, 0.02, 80, 0.3};
    std::vector<double> rising;
    for (double feed : {1e-3, 0.02, 0.3, 5.0, 80.0}) rising.push_back(first.conversion(feed));
    CHECK(second.conversion(feeds[1]) == rising[3]);
    CHECK(second.conversion(feeds[0]) == rising[0]);
    CHECK(second.conversion(feeds[4]) == rising[2]);
    CHECK(second.conversion(feeds[2]) == rising[1]);
    CHECK(second.conversion(feeds[3]) == rising[4]);
  }
}

TEST_CASE("two tubes after each other are one of the summed volume", "[vessel][property]") {
  std::mt19937 random(11);
  std::uniform_real_distribution<double> u(0, 1);
  for (int i = 0; i < 120; ++i) {
    const int reactions = 1 + i % 3;
    const Plant plant = random_duty(random, reactions);
    const double feed = std::pow(10, 2 * u(random) - 1), cut = u(random);
    INFO("case " << i << ", feed " << feed << ", cut " << cut);
    Rated whole(plant, tube_of(1)), head(plant, tube_of(cut));
    Stream between = head.at(feed).outlet;
    Rated tail(plant, tube_of(1 - cut), between);
    const auto one = whole.at(feed), two = tail.at(feed);
    for (std::size_t j = 0; j < one.outlet.xi_mol_m3.size(); ++j)
      CHECK(two.outlet.xi_mol_m3[j] == Approx(one.outlet.xi_mol_m3[j]).epsilon(2e-9).margin(1e-9));
  }
}

TEST_CASE("a tube never does less than a tank of its volume where the rate falls", "[vessel][property]") {
  std::mt19937 random(3);
  std::uniform_real_distribution<double> u(0, 1);
  for (int i = 0; i < 200; ++i) {
    const Plant plant = random_duty(random, 1);
    const double feed = std::pow(10, 4 * u(random) - 2);
    INFO("case " << i << ", feed " << feed);
    const double tube = Rated(plant, tube_of(1)).conversion(feed), tank = Rated(plant, tank_of(1)).conversion(feed);
    CHECK(tube >= tank - 1e-12);
    CHECK(tank >= 0);
    CHECK(tube <= 1);
  }
}

TEST_CASE("the amounts that leave are those fed and made, none below zero", "[vessel][property]") {
  std::mt19937 random(5);
  std::uniform_real_distribution<double> u(0, 1);
  for (int i = 0; i < 150; ++i) {
    const Plant plant = random_duty(random, 1 + i % 3);
    const double feed = std::pow(10, 8 * u(random) - 5);
    for (const Vessel& vessel : {tank_of(1), tube_of(1)}) {
      Rated rated(plant, vessel);
      INFO("case " << i << ", feed " << feed << ", " << vessel.tag);
      const auto outcome = rated.at(feed);
      std::vector<double> c(6);
      rated.chemistry().kinetics.amounts(plant.feed.c_mol_m3, outcome.outlet.xi_mol_m3, c);
      for (double amount : c) CHECK(amount >= -1e-12);
      CHECK(outcome.residual <= 1e-9);
    }
  }
}

TEST_CASE("equal tanks beside each other are one of their sum", "[vessel][property]") {
  const Plant plant = esterification();
  CHECK(Rated(plant, tank_of(0.5)).conversion(5e-4) ==
        Approx(Rated(plant, tank_of(1)).conversion(1e-3)).epsilon(1e-13));
}

TEST_CASE("what a vessel can not serve is told in words", "[vessel]") {
  Plant plant({1, 0});
  law_of(plant.react({{0, -1}, {1, 1}}, 1, {{0, 1}})).per = Per::catalyst;
  const auto why = [](const Plant& p, const Vessel& vessel) {
    auto outcome = Rated(p, vessel).run().at(1, Detail::full);
    const auto* no = std::get_if<NoAnswer>(&outcome);
    return no != nullptr && no->kind == NoAnswer::Kind::cannot_tell ? no->why : "";
  };
  CHECK(why(plant, tank_of(1)).find("loading") != std::string::npos);
  CHECK(why(plant, tube_of(1)).find("holds none") != std::string::npos);
  CHECK(why(plant, bed_of(1)).empty());
  plant.operation.catalyst_kg_m3 = 35;
  CHECK(Rated(plant, tank_of(1)).conversion(1) == Approx(35 / 36.0).epsilon(1e-12));
  law_of(plant.reactions[0]).per = Per::unsaid;
  CHECK(why(plant, bed_of(1)).find("packed tube") != std::string::npos);
  CHECK(why(plant, tank_of(1)).empty());
  law_of(plant.reactions[0]).per = Per::bed;
  CHECK_FALSE(why(plant, tank_of(1)).empty());
}

TEST_CASE("a measured table ends where it was measured", "[vessel][table]") {
  Plant plant({10, 0});
  Reaction& r = plant.react({{0, -1}, {1, 1}}, 1, {{0, 1}});
  r.forward = RateTable{{0, 0.4, 0.8}, {0.1, 0.1, 0.1}, {}};  // constant: 0.1 mol/m3/s
  Rated tube(plant, tube_of(1)), tank(plant, tank_of(1));
  CHECK(tube.conversion(1 / 50.0) == Approx(0.5).epsilon(1e-12));
  CHECK(tank.conversion(1 / 50.0) == Approx(0.5).epsilon(1e-12));
  for (Rated* rated : {&tube, &tank}) {
    auto beyond = rated->run().at(1 / 90.0, Detail::full);
    REQUIRE(answer(beyond) == nullptr);
    CHECK(std::get<NoAnswer>(beyond).kind == NoAnswer::Kind::cannot_tell);
  }
}

TEST_CASE("a measured table with sharp bends is answered at every feed rate within it", "[vessel][table]") {
  Plant plant({2000, 0});
  Reaction& r = plant.react({{0, -1}, {1, 1}}, 1, {{0, 1}});
  r.forward = RateTable{{0, 0.2, 0.4, 0.6, 0.8}, {9.1 / 60, 11.6 / 60, 5.9 / 60, 4.0 / 60, 2.05 / 60}, {}};
  Rated tube(plant, tube_of(1));
  // space times from scipy 1.10's PchipInterpolator through 1/consumption (its end slopes are the ones wanted here)
  CHECK(tube.conversion(1 / 8653.826817113199) == Approx(0.55).epsilon(1e-10));
  CHECK(tube.conversion(1 / 17400.99761678746) == Approx(0.78).epsilon(1e-10));
  for (double v = 1 / 17400.0; v < 0.1; v *= 1.003) {
    INFO(v);
    const auto outcome = tube.run().at(v, Detail::full);
    REQUIRE(answer(outcome) != nullptr);  // the check of the balances heeds the bends too
    REQUIRE(answer(outcome)->residual < 1e-10);
  }
}

TEST_CASE("a let-down to more than arrives is kept for the limits", "[vessel][pressure]") {
  Plant plant = esterification();
  plant.feed.pressure_Pa = 3e5;
  plant.operation.pressure_Pa = 5e5;
  const auto outcome = Rated(plant, tube_of(1)).at(1e-3);
  REQUIRE(outcome.let_down_above_Pa);
  CHECK(*outcome.let_down_above_Pa == 5e5);
  CHECK(outcome.highest_Pa == 3e5);
  plant.operation.pressure_Pa = 2e5;
  const auto below = Rated(plant, tube_of(1)).at(1e-3);
  CHECK_FALSE(below.let_down_above_Pa);
  CHECK(below.highest_Pa == 2e5);
}

TEST_CASE("cost is counted in evaluations of the rates", "[vessel][cost]") {
  Rated tube(esterification(), tube_of(1));
  tube.at(1e-4, Detail::map);
  const long built = tube.run().rate_calls();
  CHECK(built <= 140);
  for (int i = 1; i < 200; ++i) tube.at(1e-4 * i, Detail::map);
  CHECK(tube.run().rate_calls() == built);  // one track serves all feed rates above
  Rated tank(esterification(), tank_of(1));
  tank.at(1e-4, Detail::map);
  CHECK(tank.run().rate_calls() <= 20);
  Plant lit = esterification();
  lit.adiabatic();
  Rated curve(lit, tank_of(1));
  CHECK(curve.run().rate_calls() <= 110);
}
