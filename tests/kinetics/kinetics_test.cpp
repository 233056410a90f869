#include "vatwright/kinetics/kinetics.hpp"

#include <array>

#include "samples.hpp"
#include "support/catch.hpp"

using namespace vatwright;
using namespace vatwright::samples;

TEST_CASE("net coefficients, mole change and independent reactions", "[kinetics]") {
  // Benzene pyrolysis, J. B. Rawlings, J. G. Ekerdt, Chemical Reactor Analysis and Design Fundamentals, 2nd ed.,
  // example 4.5: 2 B <-> D + H, B + D <-> T + H; no mole change in either, both independent.
  const Kinetics kinetics({elementary({{0, -2}, {1, 1}, {2, 1}}, 1), elementary({{0, -1}, {1, -1}, {3, 1}, {2, 1}}, 1)},
                          4, 0, 10);
  CHECK(kinetics.independent() == 2);
  CHECK(kinetics.mole_change(0) == 0);
  CHECK(kinetics.mole_change(1) == 0);
  CHECK(kinetics.nu(0, 0) == -2);
  CHECK(kinetics.nu(3, 0) == 0);
  CHECK(kinetics.nu(1, 1) == -1);
  CHECK_FALSE(kinetics.has_table());
  CHECK_FALSE(table_range(kinetics));
}

TEST_CASE("of A -> B, B -> C, A -> C two are independent", "[kinetics]") {
  const Kinetics kinetics(
      {elementary({{0, -1}, {1, 1}}, 1), elementary({{1, -1}, {2, 1}}, 1), elementary({{0, -1}, {2, 1}}, 1)}, 3, 0, 1);
  CHECK(kinetics.reactions() == 3);
  CHECK(kinetics.independent() == 2);
}

TEST_CASE("a reaction runs until its limiting reactant is gone", "[kinetics]") {
  // A + 3 B -> 6 R of 100 A, 200 B: B is gone at 200/3
  const Kinetics kinetics({elementary({{0, -1}, {1, -3}, {2, 6}}, 1)}, 4, 0, 100);
  CHECK(kinetics.left_to_run(0, std::vector<double>{100, 200, 0, 100}) == Approx(200.0 / 3));
  CHECK(kinetics.left_to_run(0, std::vector<double>{100, 0, 0, 100}) == 0);
  CHECK(kinetics.left_to_run(0, std::vector<double>{-1e-12, 5, 0, 100}) == 0);
}

TEST_CASE("amounts and conversion of a gas with several species", "[kinetics]") {
  // O. Levenspiel, Chemical Reaction Engineering, 3rd ed., example 4.1: A + 3 B -> 6 R; 100 A, 200 B, 100 inert. At X_A
  // = 0.5: A 50, B 50, R 300, inert 100; X_B = 0.75.
  const Reaction one = elementary({{0, -1}, {1, -3}, {2, 6}}, 1);
  const std::vector<double> feed{100, 200, 0, 100};
  std::vector<double> c(4);
  const std::array xi{50.0};
  const Kinetics of_A({one}, 4, 0, 100), of_B({one}, 4, 1, 200);
  of_A.amounts(feed, xi, c);
  CHECK(c == std::vector<double>{50, 50, 300, 100});
  CHECK(of_A.conversion(xi) == 0.5);
  CHECK(of_B.conversion(xi) == 0.75);
  CHECK(of_A.mole_change(0) == 2);
}

TEST_CASE("no reaction, no conversion, and no minus zero", "[kinetics]") {
  const Kinetics kinetics({elementary({{0, -1}, {1, 1}}, 1)}, 2, 0, 5);
  const double X = kinetics.conversion(std::array{0.0});
  CHECK(X == 0);
  CHECK_FALSE(std::signbit(X));
  CHECK(kinetics.conversion(std::array{-1.0}) == Approx(-0.2));  // made instead of consumed: below zero, as it is
}

TEST_CASE("a measured table is told, with its range", "[kinetics]") {
  Reaction one;
  one.nu = figures({{0, -1}, {1, 1}});
  one.forward = RateTable{{0.0, 0.4, 0.85}, {3, 2, 1}, 343.15};
  const Kinetics kinetics({one}, 2, 0, 1);
  CHECK(kinetics.has_table());
  CHECK(table_range(kinetics)->first == 0);
  CHECK(table_range(kinetics)->second == 0.85);
}
