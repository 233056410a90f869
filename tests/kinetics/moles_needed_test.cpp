#include <algorithm>
#include <numeric>
#include <random>

#include "samples.hpp"
#include "support/catch.hpp"
#include "vatwright/kinetics/kinetics.hpp"

using namespace vatwright;
using namespace vatwright::samples;

namespace {
Reaction by(const Figures& nu) { return elementary(nu, 1); }
}  // namespace

TEST_CASE("2 A -> D needs two", "[moles]") {
  const Kinetics kinetics({by({{0, -2}, {1, 1}})}, 2, 0, 1);
  CHECK(moles_needed(kinetics, {true, false}, 1) == 2);
}

TEST_CASE("A -> B -> C needs one of each", "[moles]") {
  const Kinetics kinetics({by({{0, -1}, {1, 1}}), by({{1, -1}, {2, 1}})}, 3, 0, 1);
  CHECK(moles_needed(kinetics, {true, false, false}, 1) == 1);
  CHECK(moles_needed(kinetics, {true, false, false}, 2) == 1);
}

TEST_CASE("van de Vusse: A -> B -> C, 2 A -> D", "[moles]") {
  const Kinetics kinetics({by({{0, -1}, {1, 1}}), by({{1, -1}, {2, 1}}), by({{0, -2}, {3, 1}})}, 4, 0, 1);
  CHECK(moles_needed(kinetics, {true, false, false, false}, 3) == 2);
  CHECK(moles_needed(kinetics, {true, false, false, false}, 2) == 1);
}

TEST_CASE("benzene pyrolysis: 2 B -> D + H, B + D -> T + H", "[moles]") {
  // By hand: D costs 2 B; T costs D and B, 3; H comes at 2 from the first alone, at 3/2 with the second: 3 B -> T + 2
  // H.
  const Kinetics kinetics({by({{0, -2}, {1, 1}, {2, 1}}), by({{0, -1}, {1, -1}, {3, 1}, {2, 1}})}, 4, 0, 1);
  const std::vector<bool> fed{true, false, false, false};
  CHECK(moles_needed(kinetics, fed, 1) == 2);
  CHECK(moles_needed(kinetics, fed, 3) == 3);
  CHECK(moles_needed(kinetics, fed, 2) == 1.5);
}

TEST_CASE("made without A, or not made, or A itself: none", "[moles]") {
  const Kinetics kinetics({by({{0, -1}, {2, 1}}), by({{1, -1}, {2, 1}}), by({{1, -2}, {3, 1}})}, 5, 0, 1);
  const std::vector<bool> fed{true, true, false, false, false};
  CHECK_FALSE(moles_needed(kinetics, fed, 2));  // from B as well
  CHECK_FALSE(moles_needed(kinetics, fed, 3));
  CHECK_FALSE(moles_needed(kinetics, fed, 4));
  CHECK_FALSE(moles_needed(kinetics, fed, 0));
}

TEST_CASE("other fed species are free, those made are not", "[moles]") {
  // A + B -> P, P + B -> Q: B fed is free; B made by A -> 2 B costs half an A each.
  const std::vector<Reaction> pair{by({{0, -1}, {1, -1}, {2, 1}}), by({{2, -1}, {1, -1}, {3, 1}})};
  CHECK(moles_needed(Kinetics(pair, 4, 0, 1), {true, true, false, false}, 3) == 1);
  std::vector<Reaction> three(pair);
  three.push_back(by({{0, -1}, {1, 2}}));
  CHECK(moles_needed(Kinetics(three, 4, 0, 1), {true, false, false, false}, 2) == 1.5);
  CHECK(moles_needed(Kinetics(three, 4, 0, 1), {true, false, false, false}, 3) == 2);
  CHECK_FALSE(moles_needed(Kinetics(pair, 4, 0, 1), {true, false, false, false}, 3));  // no B anywhere
}

TEST_CASE("autocatalysis A + R -> 2 R needs one", "[moles]") {
  CHECK(moles_needed(Kinetics({by({{0, -1}, {1, 1}})}, 2, 0, 1), {true, true}, 1) == 1);
}

TEST_CASE("the cheapest of several ways counts", "[moles]") {
  // 3 A -> S, and 2 A -> M, M -> S.
  const Kinetics kinetics({by({{0, -3}, {2, 1}}), by({{0, -2}, {1, 1}}), by({{1, -1}, {2, 1}})}, 3, 0, 1);
  CHECK(moles_needed(kinetics, {true, false, false}, 2) == 2);
}

TEST_CASE("a chain of ten, each taking two of the last, doubles each time", "[moles]") {
  std::vector<Reaction> chain;
  for (int i = 0; i < 10; ++i) chain.push_back(by({{i, -2}, {i + 1, 1}}));
  std::vector<bool> fed(11, false);
  fed[0] = true;
  CHECK(moles_needed(Kinetics(chain, 11, 0, 1), fed, 10) == 1024);
}

TEST_CASE("the order of the reactions does not matter, random schemes of ten", "[moles]") {
  std::mt19937 random(3);
  std::uniform_int_distribution<int> species(0, 7), coefficient(1, 3);
  for (int trial = 0; trial < 100; ++trial) {
    std::vector<Reaction> scheme;
    for (int j = 0; j < 10; ++j) {
      const int a = species(random), b = species(random), c = species(random);
      scheme.push_back(by({{a, -coefficient(random)}, {b, coefficient(random)}, {c, coefficient(random)}}));
    }
    const std::vector<bool> fed{true, false, false, false, false, false, false, true};
    std::vector<std::optional<double>> once, again;
    for (int s = 1; s < 8; ++s) once.push_back(moles_needed(Kinetics(scheme, 8, 0, 1), fed, s));
    std::ranges::shuffle(scheme, random);
    for (int s = 1; s < 8; ++s) again.push_back(moles_needed(Kinetics(scheme, 8, 0, 1), fed, s));
    for (std::size_t s = 0; s < once.size(); ++s) {
      REQUIRE(once[s].has_value() == again[s].has_value());
      if (once[s]) CHECK(*once[s] == Approx(*again[s]).epsilon(1e-9));
    }
  }
}
