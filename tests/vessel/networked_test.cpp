// Several reactions and gases against published figures and closed forms.
#include <cmath>

#include "plant.hpp"
#include "support/catch.hpp"

using namespace vatwright;

namespace {

double flow(const Rated& rated, const VesselOutcome& outcome, int species) {
  std::vector<double> c(rated.chemistry().feed.c_mol_m3.size());
  rated.chemistry().kinetics.amounts(rated.chemistry().feed.c_mol_m3, outcome.outlet.xi_mol_m3, c);
  return c[static_cast<std::size_t>(species)];
}

}  // namespace

TEST_CASE("an intermediate in tube and tank", "[vessel][several]") {
  // O. Levenspiel, Chemical Reaction Engineering, 3rd ed. 1999, ch. 8: closed forms
  const double k1 = GENERATE(0.5, 1.0), k2 = GENERATE(0.2, 1.0, 30.0);
  Plant plant({20, 0, 0});
  plant.react({{0, -1}, {1, 1}}, k1, {{0, 1}});
  plant.react({{1, -1}, {2, 1}}, k2, {{1, 1}});
  Rated tube(plant, tube_of(1)), tank(plant, tank_of(1));
  for (double t : {0.1, 1.0, 3.054302, 20.0}) {
    INFO("k1 " << k1 << ", k2 " << k2 << ", t " << t);
    const double B =
        k1 == k2 ? 20 * k1 * t * std::exp(-k1 * t) : 20 * k1 / (k2 - k1) * (std::exp(-k1 * t) - std::exp(-k2 * t));
    const auto in_tube = tube.at(1 / t);
    CHECK(flow(tube, in_tube, 1) == Approx(B).epsilon(1e-8).margin(1e-9));
    const auto in_tank = tank.at(1 / t);
    CHECK(flow(tank, in_tank, 1) == Approx(20 * k1 * t / ((1 + k1 * t) * (1 + k2 * t))).epsilon(1e-9));
    CHECK(in_tank.states.size() == 1);
    CHECK(in_tank.states[0].stable == true);
    CHECK_FALSE(in_tank.states_complete);
  }
}

TEST_CASE("three reactions in a tank give two feed rates one yield", "[vessel][several]") {
  // B. W. Bequette, Process Control: Modeling, Design and Simulation, 2003, van de Vusse module, from memory
  Plant plant({10, 0, 0, 0});
  plant.react({{0, -1}, {1, 1}}, 5.0 / 6, {{0, 1}});
  plant.react({{1, -1}, {2, 1}}, 5.0 / 3, {{1, 1}});
  law_of(plant.react({{0, -2}, {3, 1}}, 1.0 / 6, {{0, 2}})).of_coefficient = 2;
  Rated tank(plant, tank_of(1));
  const auto first = tank.at(4.0 / 7);
  CHECK(flow(tank, first, 0) == Approx(3).epsilon(1e-9));
  CHECK(flow(tank, first, 1) == Approx(1.117021).epsilon(1e-6));
  CHECK(flow(tank, tank.at(2.8744), 1) == Approx(1.117021).epsilon(2e-5));
  CHECK(flow(tank, tank.at(1.292092), 1) == Approx(1.265986).epsilon(1e-6));
}

TEST_CASE("a zero order stage empties a tube inside, and the rest goes on", "[vessel][several]") {
  // Levenspiel, 3rd ed. 1999, Ex. 7.3-7.4: A to R, S, T at 1, 2 C, C^2 from C = 2: all gone at tau = 2/3, S = 2 ln 3 -
  // 4/3
  Plant plant({2, 0, 0, 0});
  plant.react({{0, -1}, {1, 1}}, 1, {{0, 0}});
  plant.react({{0, -1}, {2, 1}}, 2, {{0, 1}});
  plant.react({{0, -1}, {3, 1}}, 1, {{0, 2}});
  Rated tube(plant, tube_of(1));
  for (double t : {2.0 / 3 + 1e-6, 1.0, 1e4}) {
    const auto end = tube.at(1 / t);
    CHECK(end.conversion == Approx(1).epsilon(1e-10));
    CHECK(flow(tube, end, 2) == Approx(2 * std::log(3.0) - 4.0 / 3).epsilon(1e-9));
  }
  CHECK(tube.at(2).conversion < 1);
  Rated tank(plant, tank_of(1));  // C = 0.5 at tau 2/3: S 2/3
  const auto best = tank.at(1.5);
  CHECK(flow(tank, best, 0) == Approx(0.5).epsilon(1e-9));
  CHECK(flow(tank, best, 2) == Approx(2.0 / 3).epsilon(1e-9));
  CHECK(tank.at(1e-6).conversion == Approx(1).margin(1e-5));
}

TEST_CASE("what is used up at zero order lives from what is made", "[vessel][several]") {
  Plant plant({1, 0, 0});
  plant.react({{0, -1}, {1, 1}}, 1, {{0, 1}});
  plant.react({{1, -1}, {2, 1}}, 0.5, {{1, 0}});
  // made exp(-t) > 0.5 until t = ln 2: B rises as 1 - exp(-t) - t/2, then falls; gone at t = 1.5936 (root of that),
  // after that C = A reacted
  Rated tube(plant, tube_of(1));
  CHECK(flow(tube, tube.at(1 / 0.6), 1) == Approx(1 - std::exp(-0.6) - 0.3).epsilon(1e-9));
  CHECK(flow(tube, tube.at(1 / 3.0), 1) == Approx(0).margin(1e-9));
  CHECK(flow(tube, tube.at(1 / 3.0), 2) == Approx(1 - std::exp(-3.0)).epsilon(1e-9));
}

TEST_CASE("a gas of half order that grows", "[vessel][gas]") {
  // Levenspiel, 3rd ed. 1999, Ex. 5.4: A -> 3 R, 0.01 C^0.5 mol/L/s, half inert, 0.0625 mol/L: 33.2 s to 0.8
  Plant plant({62.5, 0, 62.5});
  plant.gas(5 * 101325 / (gas_constant * 125), 5 * 101325);  // 0.0625 mol/L as it is used there
  plant.react({{0, -1}, {1, 3}}, 0.01 * std::sqrt(1000.0), {{0, 0.5}});
  Rated tube(plant, tube_of(1));
  const auto feed = tube.run().feed_at_conversion(0.8);
  REQUIRE(feed);
  CHECK(1 / *feed == Approx(33.1824).epsilon(1e-5));
  CHECK(tube.conversion(1 / 33.1824) == Approx(0.8).epsilon(1e-5));
  CHECK(tube.conversion(1e-4) == 1);
}

TEST_CASE("benzene pyrolysis, two reversible gas reactions", "[vessel][gas]") {
  // J. B. Rawlings, J. G. Ekerdt, Chemical Reactor Analysis and Design Fundamentals, 2nd ed. 2012, Ex. 4.5: 403.3 L
  const double R = 0.08205736608, c = 1000 / (R * 1033);
  Plant plant({c, 0, 0, 0});
  plant.gas(1033, 101325);
  plant.feed.c_mol_m3[0] = 101325 / (gas_constant * 1033);
  plant.react({{0, -2}, {1, 1}, {2, 1}}, 7.0e5 * 1e-3 / 3600, {{0, 2}}).equilibrium =
      Equilibrium{.K = 0.31, .at_K = {}, .heat = {}};
  plant.react({{0, -1}, {1, -1}, {3, 1}, {2, 1}}, 4.0e5 * 1e-3 / 3600, {{0, 1}, {1, 1}}).equilibrium =
      Equilibrium{.K = 0.48, .at_K = {}, .heat = {}};
  const double feed = 60000 / 3600.0 / plant.feed.c_mol_m3[0];
  Rated tube(plant, tube_of(0.40332));
  const auto out = tube.at(feed);
  CHECK(out.conversion == Approx(0.5).margin(2e-5));
  CHECK(flow(tube, out, 1) * feed * 3600 == Approx(12179.75).epsilon(1e-4));
  CHECK(flow(tube, out, 3) * feed * 3600 == Approx(1880.17).epsilon(2e-4));
}

TEST_CASE("a gas in a packed tube that loses its pressure", "[vessel][gas][pressure]") {
  // Fogler, 4th ed. 2006, Ex. 4-4 and 4-6: with rho ~ P/moles Ergun's law is dy/dz = -a (1 + eps X)/(2 y); closed form
  // without mole change: y^2 = 1 - a z
  Plant plant({100, 0});
  plant.gas(400, 100 * gas_constant * 400);
  plant.feed.viscosity_Pa_s = 2e-5;
  plant.feed.species[0].molar_mass_kg_mol = plant.feed.species[1].molar_mass_kg_mol = 0.03;
  law_of(plant.react({{0, -1}, {1, 1}}, 0, {{0, 1}})).per = Per::bed;
  Vessel bed = bed_of(3);
  const double feed = 0.6;
  const auto out = Rated(plant, bed).at(feed);
  const double P0 = plant.feed.pressure_Pa, rho0 = 3;
  const double e = 0.4, dp = 0.004, u = feed,
               loss0 = 150 * 2e-5 * (1 - e) * (1 - e) / (e * e * e * dp * dp) * u +
                       1.75 * (1 - e) / (e * e * e * dp) * rho0 * u * u;
  CHECK(out.outlet.pressure_Pa == Approx(std::sqrt(P0 * P0 - 2 * P0 * loss0 * 3)).epsilon(1e-9));
  REQUIRE(out.pressure_drop_Pa);
  auto blocked = Rated(plant, bed).run().at(30, Detail::full);
  REQUIRE(answer(blocked) == nullptr);
  CHECK(std::get<NoAnswer>(blocked).kind == NoAnswer::Kind::does_not_pass);
}

TEST_CASE("two gas reactions in a packed tube with pressure drop", "[vessel][gas][pressure]") {
  // Fogler, 5th ed. 2016, Ex. 8-5 at constant pressure (alpha = 0), W = 1000 kg
  Plant plant({100, 100, 0, 0});
  plant.gas(500, 200 * gas_constant * 500);
  law_of(plant.react({{0, -1}, {1, -2}, {2, 1}}, 100 * 1e-9 / 60, {{0, 1}, {1, 2}})).per = Per::catalyst;
  law_of(plant.react({{0, -2}, {2, -3}, {3, 1}}, 500 * 1e-15 / 60, {{0, 2}, {2, 3}})).per = Per::catalyst;
  Vessel bed = bed_of(1);
  std::get<PackedTube>(bed.kind).bulk_density_kg_m3 = 1000;
  const double feed = 10 / 60.0 / 100;
  Rated rated(plant, bed);
  const auto out = rated.at(feed);
  CHECK(flow(rated, out, 0) * feed * 60 == Approx(2.414056).epsilon(1e-5));
  CHECK(flow(rated, out, 1) * feed * 60 == Approx(0.0542763).epsilon(1e-4));
  CHECK(flow(rated, out, 2) * feed * 60 == Approx(1.053238).epsilon(1e-5));
  CHECK(flow(rated, out, 3) * feed * 60 == Approx(1.306541).epsilon(1e-5));
}
