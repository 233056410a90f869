// Acetonitrile and nitromethane: J. M. Smith, H. C. Van Ness, M. M. Abbott, Introduction to Chemical Engineering
// Thermodynamics, example of Raoult's law (ln p/kPa = 14.2724 - 2945.47/(t + 224.00) and 14.2043 - 2972.64/(t +
// 209.00), t in degC): at 70 kPa the pure boiling points are 69.84 and 89.58 degC, the bubble point of x1 = 0.6
// is 76.42 degC (from memory).
#include <cmath>

#include "limits/scene.hpp"
#include "support/catch.hpp"

using namespace vatwright;
using namespace vatwright::test;

namespace {
Antoine natural(double A, double B, double C) { return {A / std::log(10.0), B / std::log(10.0), C, 1000, 273.15}; }

Scene pair(double x1) {
  Scene s;
  s.chemistry.feed.species[0].antoine = natural(14.2724, 2945.47, 224.00);
  s.chemistry.feed.species[1].antoine = natural(14.2043, 2972.64, 209.00);
  s.outcome.inside = {Stream{s.feed_m3_s, {1000 * (1 - x1)}, 70 + 273.15, 70e3}};
  return s;
}
}  // namespace

TEST_CASE("bubble point by Raoult's law", "[limits][bubble]") {
  const Scene s = pair(0.6);
  const auto limit = s.limit("bubble point");
  REQUIRE(limit);
  CHECK(holds(limit));
  CHECK(limit->unit == "K");
  CHECK(*limit->value == Approx(343.15));
  CHECK(*limit->bound - 273.15 == Approx(76.42).margin(0.005));
  CHECK(*limit->margin == Approx(6.42).margin(0.005));
  CHECK(*pair(1).limit("bubble point")->bound - 273.15 == Approx(69.84).margin(0.005));
  CHECK(*pair(0).limit("bubble point")->bound - 273.15 == Approx(89.58).margin(0.005));
  CHECK(broken(pair(1).limit("bubble point")));
}

TEST_CASE("a bubble point meets its own equation", "[limits][bubble]") {
  const Scene s = pair(0.6);
  const auto& species = s.chemistry.feed.species;
  for (const double P : {1e2, 1e4, 1e5, 1e6}) {
    for (const double x1 : {0.0, 0.01, 0.5, 1.0}) {
      const auto T = bubble_temperature(species, {x1, 1 - x1}, P);
      REQUIRE(T);
      CHECK(x1 * species[0].antoine->pressure_Pa(*T) + (1 - x1) * species[1].antoine->pressure_Pa(*T) ==
            Approx(P).epsilon(1e-10));
    }
  }
}

TEST_CASE("the worst place counts, at its own pressure", "[limits][bubble]") {
  Scene s = pair(0.6);
  Stream lower = s.outcome.inside.front();
  lower.pressure_Pa = 50e3;
  s.outcome.inside.push_back(lower);
  CHECK(*s.limit("bubble point")->bound < 76.42 + 273.15);
  CHECK(broken(s.limit("bubble point")));
}

TEST_CASE("a salt has no vapour pressure and lifts the bubble point", "[limits][bubble]") {
  Scene s = pair(0.6);
  s.chemistry.feed.species[1].is_volatile = false;
  s.chemistry.feed.species[1].antoine.reset();
  const auto limit = s.limit("bubble point");
  REQUIRE(limit);
  CHECK(0.6 * s.chemistry.feed.species[0].antoine->pressure_Pa(*limit->bound) == Approx(70e3).epsilon(1e-10));
  s.chemistry.feed.species[0].is_volatile = false;
  CHECK_FALSE(s.limit("bubble point"));  // nothing can boil
}

TEST_CASE("boiling: forbid, ignore, a given temperature, unsaid", "[limits][bubble]") {
  Scene s = pair(0.6);
  s.product.boiling = ProductLimits::Boiling::ignore;
  CHECK_FALSE(s.limit("bubble point"));
  s.product.boiling = ProductLimits::Boiling::at;
  s.product.boiling_K = 340;
  CHECK(broken(s.limit("bubble point")));
  CHECK(*s.limit("bubble point")->bound == 340);

  s.chemistry.feed.species[1].antoine.reset();
  s.product.boiling = ProductLimits::Boiling::unsaid;
  CHECK_FALSE(s.limit("bubble point"));
  s.product.boiling = ProductLimits::Boiling::forbid;
  CHECK(untold(s.limit("bubble point")));
  CHECK(s.limit("bubble point")->why == "bubble point: no vapour pressure given for B");
  s.outcome.inside.front().xi_mol_m3 = {0};  // none of B is there
  CHECK(holds(s.limit("bubble point")) == false);
  CHECK(*s.limit("bubble point")->bound - 273.15 == Approx(69.84).margin(0.005));

  Scene solvent = pair(0.6);
  solvent.chemistry.feed.unnamed_solvent = true;
  CHECK_FALSE(solvent.limit("bubble point"));
  solvent.product.boiling = ProductLimits::Boiling::forbid;
  CHECK(untold(solvent.limit("bubble point")));

  Scene gas = pair(0.6);
  gas.chemistry.feed.phase = Phase::gas;
  gas.product.boiling = ProductLimits::Boiling::forbid;
  CHECK_FALSE(gas.limit("bubble point"));
}
