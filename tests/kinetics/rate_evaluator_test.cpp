#include <array>
#include <cmath>
#include <random>

#include "samples.hpp"
#include "support/allocation_watch.hpp"
#include "support/catch.hpp"
#include "vatwright/kinetics/kinetics.hpp"

using namespace vatwright;
using namespace vatwright::samples;

TEST_CASE("power laws of every order, fast or not, are k times the product of powers", "[rates]") {
  const double order = GENERATE(0.0, 0.5, 1.0, 2.0, 3.0, 1.5, 0.7, -1.0, -0.5);
  const Reaction one = reaction({{0, -1}, {1, -1}, {2, 1}}, power_law(constant(0.3), {{0, 1}, {1, order}}));
  CHECK(rate(one, {2, 5, 1}) == Approx(0.3 * 2 * std::pow(5, order)).epsilon(1e-14));
}

TEST_CASE("published rates", "[rates]") {
  // J. Q. Bond, CEN587 course notebooks, N18 P1: 2 A + 3 B -> C, r = k CA CB, k 37.2 L/mol/h, 0.74 and 2.50 mol/L.
  CHECK(rate(reaction({{0, -2}, {1, -3}, {2, 1}}, power_law(constant(37.2), {{0, 1}, {1, 1}})), {0.74, 2.5, 0}) ==
        Approx(37.2 * 0.74 * 2.5));
  // O. Levenspiel, Chemical Reaction Engineering, 3rd ed., example 5.3: A + 2 B <-> R, 12.5 CA CB^2 - 1.5 CR mol/L/min.
  Reaction two = reaction({{0, -1}, {1, -2}, {2, 1}}, power_law(constant(12.5), {{0, 1}, {1, 2}}));
  two.reverse = power_law(constant(1.5), {{2, 1}});
  CHECK(rate(two, {1.1, 0.2, 0.3}) == Approx(0.10).epsilon(1e-12));  // 12.5 1.1 0.04 - 1.5 0.3 = 0.55 - 0.45
}

TEST_CASE("a rate of a species is divided by its coefficient", "[rates]") {
  RateLaw law = power_law(constant(8), {{0, 1}});
  law.of_coefficient = 2;
  CHECK(rate(reaction({{0, -2}, {1, 1}}, law), {3, 0}) == Approx(12));
}

TEST_CASE("Michaelis and Menten: urea", "[rates]") {
  // H. S. Fogler, Elements of Chemical Reaction Engineering, 4th ed., example 7-4 (from memory): Vmax 0.000266
  // mol/dm3/s, Km 0.0266 mol/dm3: half of Vmax at C = Km.
  const Reaction urea = reaction({{0, -1}, {1, 1}}, saturating(constant(0.266), {{0, 26.6}}));
  CHECK(rate(urea, {26.6, 0}) == Approx(0.133));
  CHECK(rate(urea, {100, 0}) == Approx(0.266 * 100 / 126.6));
  CHECK(rate(urea, {0, 50}) == 0);
}

TEST_CASE("adsorption: the rate maximum of k C/(1 + K C)^2 is at K C = 1", "[rates]") {
  RateLaw law = power_law(constant(1), {{0, 1}});
  law.adsorption = figures({{0, 20}});
  law.adsorption_power = 2;
  const Reaction one = reaction({{0, -1}, {1, 1}}, law);
  CHECK(rate(one, {0.05, 0}) == Approx(0.05 / 4));
  CHECK(rate(one, {0.05, 0}) > rate(one, {0.0501, 0}));
  CHECK(rate(one, {0.05, 0}) > rate(one, {0.0499, 0}));
}

TEST_CASE("reversible with K: butane to isobutane", "[rates]") {
  // H. S. Fogler, 3rd ed., example 8-6, per pure A of 9.3 kmol/m3: rate k CA0 [1 - (1 + 1/Kc) X] at T = 330 + 43.3 X is
  // printed 52.8 (X 0.2), 58.6 (0.4) kmol/m3/h by hand; recomputed 53.000, 58.858, and 6.1654 at X 0.7.
  Reaction one = reaction({{0, -1}, {1, 1}}, power_law(arrhenius(31.1, 360, 7906 * gas_constant), {{0, 1}}));
  one.equilibrium = Equilibrium{3.03, 333.0, HeatOfReaction{-830.3 * gas_constant, 333, {}}};
  const auto [X, expected] = GENERATE(table<double, double>({{0.2, 53.000}, {0.4, 58.858}, {0.7, 6.1654}}));
  CHECK(rate(one, {9.3 * (1 - X), 9.3 * X}, 330 + 43.3 * X) == Approx(expected).epsilon(1e-4));
}

TEST_CASE("reversible with K stops at equilibrium and runs back from the products", "[rates]") {
  Reaction one = elementary({{0, -1}, {1, -1}, {2, 1}, {3, 1}}, 0.7);
  one.equilibrium = Equilibrium{4, std::nullopt, std::nullopt};
  CHECK(std::abs(rate(one, {1, 1, 2, 2})) < 1e-15);
  CHECK(rate(one, {0, 0, 2, 2}) == Approx(-0.7 * 4 / 4.0));  // forward part zero, reverse k C D/K
  CHECK(rate(one, {1, 1, 0, 2}) == Approx(0.7));
}

TEST_CASE("the reverse part keeps the forward orders: n_r - |nu_r|", "[rates]") {
  // 2 A <-> B with order 3 in A: r = k (A^3 - A B/K); a catalyst S of order 1 speeds both ways alike.
  Reaction one = reaction({{0, -2}, {1, 1}}, power_law(constant(2), {{0, 3}, {2, 1}}));
  one.equilibrium = Equilibrium{5, std::nullopt, std::nullopt};
  CHECK(rate(one, {0.5, 0.8, 3}) == Approx(2 * 3 * (0.125 - 0.5 * 0.8 / 5)));
  CHECK(std::abs(rate(one, {0.4, 0.8, 3})) < 1e-15);  // B/A^2 = 5
}

TEST_CASE("partial pressures: p = C R T, constants per Pa", "[rates]") {
  const double T = 500, RT = gas_constant * T;
  RateLaw law = power_law(constant(3e-5), {{0, 1}, {1, 0.5}});
  law.basis = Basis::pressure;
  law.adsorption = figures({{1, 2e-5}});
  Reaction one = reaction({{0, -1}, {1, -1}, {2, 1}}, law);
  const std::vector<double> C{10, 20, 5};
  const double pA = 10 * RT, pB = 20 * RT, pC = 5 * RT;
  CHECK(rate(one, C, T) == Approx(3e-5 * pA * std::sqrt(pB) / (1 + 2e-5 * pB)).epsilon(1e-13));
  one.equilibrium = Equilibrium{1e-4, std::nullopt, std::nullopt};  // 1/Pa
  const double forward = 3e-5 * pA * std::sqrt(pB), Q = pC / (pA * pB);
  CHECK(rate(one, C, T) == Approx(forward * (1 - Q / 1e-4) / (1 + 2e-5 * pB)).epsilon(1e-12));
  RateLaw hyperbola = saturating(constant(7), {{0, 3e4}});
  hyperbola.basis = Basis::pressure;
  CHECK(rate(reaction({{0, -1}, {2, 1}}, hyperbola), C, T) == Approx(7 * pA / (3e4 + pA)).epsilon(1e-13));
}

TEST_CASE("nothing left: the forward part stops at zero whatever the order", "[rates]") {
  const double order = GENERATE(0.0, 0.5, 1.0, -1.0);
  const Reaction one = reaction({{0, -1}, {1, -1}, {2, 1}}, power_law(constant(1), {{0, order}, {1, 1}}));
  CHECK(rate(one, {0, 2, 1}) == 0);
  CHECK(rate(one, {-1e-9, 2, 1}) == 0);
  CHECK(rate(one, {1e-9, 2, 1}) > 0);
}

TEST_CASE("order zero is one above zero", "[rates]") {
  const Reaction one = reaction({{0, -1}, {1, 1}}, power_law(constant(0.025), {{0, 0}}));
  CHECK(rate(one, {1e-300, 0}) == 0.025);
  CHECK(rate(one, {0, 0}) == 0);
}

TEST_CASE("autocatalysis does not start without its product", "[rates]") {
  // A + R -> 2 R, r = k CA CR (O. Levenspiel, 3rd ed., sec. 6.3): net A -1, R +1.
  const Reaction one = reaction({{0, -1}, {1, 1}}, power_law(constant(1), {{0, 1}, {1, 1}}));
  CHECK(rate(one, {1, 0}) == 0);
  CHECK(rate(one, {0.5, 0.5}) == 0.25);
}

TEST_CASE("a negative order on what is absent is counted, told by name, and no infinity", "[rates]") {
  const Reaction one = reaction({{0, -1}, {1, 1}}, power_law(constant(1), {{0, 1}, {1, -1}}));
  const Kinetics kinetics({one}, 2, 0, 1);
  RateEvaluator evaluate(kinetics);
  std::array r{-1.0};
  evaluate(std::array{2.0, 4.0}, 300, 0, r);
  CHECK(r[0] == 0.5);
  CHECK(evaluate.no_value() == 0);
  evaluate(std::array{2.0, 0.0}, 300, 0, r);
  CHECK(r[0] == 0);
  CHECK(evaluate.no_value() == 1);
  CHECK(kinetics.absent_with_negative_order(std::array{2.0, 0.0}) == std::pair{0, 1});
  CHECK_FALSE(kinetics.absent_with_negative_order(std::array{2.0, 4.0}));
  CHECK_FALSE(kinetics.absent_with_negative_order(std::array{0.0, 0.0}));  // the part does not run
}

TEST_CASE("a table is read in 1/consumption, per coefficient, and has no value outside", "[rates]") {
  Reaction one;
  one.nu = figures({{0, -2}, {1, 1}});
  one.forward = RateTable{{0.0, 0.5}, {4.0, 2.0}, 343.15};
  const Kinetics kinetics({one}, 2, 0, 1);
  CHECK(rates(kinetics, {1, 0}, 343.15, 0.25)[0] == Approx(1 / 0.375 / 2));  // straight line in 1/r: 3/8
  CHECK(rates(kinetics, {1, 0}, 343.15, 0.5)[0] == Approx(1));
  CHECK(std::isnan(rates(kinetics, {1, 0}, 343.15, 0.51)[0]));
}

TEST_CASE("the temperature moves the constants, and the last one is kept", "[rates]") {
  const Reaction one = reaction({{0, -1}, {1, 1}}, power_law(arrhenius(0.072, 1000, 82 * 4184), {{0, 1}}));
  const Kinetics kinetics({one}, 2, 0, 1);
  RateEvaluator evaluate(kinetics);
  std::array r{0.0};
  for (double T : {1000.0, 1000.0, 1100.0, 1000.0}) {
    evaluate(std::array{1.0, 0.0}, T, 0, r);
    CHECK(r[0] == (T == 1000 ? Approx(0.072) : Approx(3.07).margin(0.005)));
  }
  CHECK(evaluate.calls() == 4);
}

namespace {

Reaction random_reaction(std::mt19937& random, int species) {
  const auto pick = [&](std::initializer_list<double> of) {
    return *(of.begin() + std::uniform_int_distribution<int>(0, static_cast<int>(of.size()) - 1)(random));
  };
  Figures nu, orders;
  for (int i = 0; i < species; ++i) {
    nu.emplace_back(i, pick({-2, -1, 0, 1, 2}));
    orders.emplace_back(i, pick({-1, 0, 0, 0.5, 1, 2, 1.7}));
  }
  RateLaw law =
      pick({0, 1}) > 0 ? power_law(arrhenius(1, 300, 6e4), orders) : saturating(constant(2), {{0, 3.0}, {1, 0.1}});
  if (pick({0, 1}) > 0) law.adsorption = figures({{0, 0.3}, {2, 1.0}});
  law.adsorption_power = pick({1, 2, 0.5});
  law.basis = pick({0, 1}) > 0 ? Basis::pressure : Basis::concentration;
  Reaction one = reaction(nu, law);
  const double kind = pick({0, 1, 2});
  if (kind == 1) one.equilibrium = Equilibrium{3, 300.0, HeatOfReaction{-4e4, 298.15, {}}};
  if (kind == 2) one.reverse = power_law(constant(0.4), {{1, 1}, {2, 0.5}});
  return one;
}

}  // namespace

TEST_CASE("never NaN, never infinity: random laws at random compositions, zeros and negatives among them", "[rates]") {
  std::mt19937 random(77);
  std::uniform_real_distribution<double> exponent(-300, 6), share(0, 1);
  for (int trial = 0; trial < 400; ++trial) {
    const Kinetics kinetics({random_reaction(random, 4), random_reaction(random, 4)}, 4, 0, 1);
    RateEvaluator evaluate(kinetics);
    for (int place = 0; place < 50; ++place) {
      std::array<double, 4> C{};
      for (double& c : C) c = share(random) < 0.3 ? 0 : std::pow(10, exponent(random) * share(random));
      if (share(random) < 0.2) C[1] = -C[1];
      std::array<double, 2> r{};
      evaluate(C, 200 + 1000 * share(random), 0, r);
      CHECK(std::isfinite(r[0]));
      CHECK(std::isfinite(r[1]));
    }
  }
}

namespace {

/// The same law read straight from the reaction, as it stands in a book: no caching, no gathering of constants.
double by_the_book(const Reaction& one, const std::array<double, 4>& C, double T) {
  const auto law_rate = [&](const RateLaw& law) {
    const double unit = law.basis == Basis::pressure ? gas_constant * T : 1;
    const auto amount = [&](const SpeciesFigure& f) { return unit * C[static_cast<std::size_t>(f.species)]; };
    double r = 0;
    if (const auto* power = std::get_if<PowerLaw>(&law.law)) {
      r = power->k.at(T);
      for (const SpeciesFigure& n : power->orders) r *= std::pow(amount(n), n.value);
    } else {
      const auto& form = std::get<Saturating>(law.law);
      r = form.most.at(T);
      for (const SpeciesFigure& half : form.half) r *= amount(half) / (half.value + amount(half));
    }
    double covered = 1;
    for (const SpeciesFigure& K : law.adsorption) covered += K.value * amount(K);
    return r / law.of_coefficient / std::pow(covered, law.adsorption_power);
  };
  const RateLaw& forward = std::get<RateLaw>(one.forward);
  if (one.reverse) return law_rate(forward) - law_rate(*one.reverse);
  if (!one.equilibrium) return law_rate(forward);
  double Q = 1;
  const double unit = forward.basis == Basis::pressure ? gas_constant * T : 1;
  for (const SpeciesFigure& nu : one.nu) Q *= std::pow(unit * C[static_cast<std::size_t>(nu.species)], nu.value);
  return law_rate(forward) * (1 - Q / one.equilibrium->at(T));
}

}  // namespace

TEST_CASE("random laws agree with the formula read straight from the reaction", "[rates]") {
  std::mt19937 random(12);
  std::uniform_real_distribution<double> amount(0.1, 5), temperature(250, 600);
  for (int trial = 0; trial < 500; ++trial) {
    const Reaction one = random_reaction(random, 4);
    const std::array C{amount(random), amount(random), amount(random), amount(random)};
    const double T = temperature(random), expected = by_the_book(one, C, T);
    const auto forward = rates(Kinetics({one}, 4, 0, 1), {C.begin(), C.end()}, T);
    Reaction no_reverse = one;
    no_reverse.reverse.reset();
    no_reverse.equilibrium.reset();
    const double size = std::abs(by_the_book(no_reverse, C, T));
    CHECK(forward[0] == Approx(expected).epsilon(1e-11).margin(1e-11 * size));
  }
}

TEST_CASE("an evaluation allocates nothing, at a new temperature neither", "[rates]") {
  Reaction one = elementary({{0, -1}, {1, -1}, {2, 1}}, 1);
  one.equilibrium = Equilibrium{4, 300.0, HeatOfReaction{-4e4, 298.15, {1, 2}}};
  Reaction two = reaction({{2, -1}, {3, 1}}, saturating(arrhenius(1, 300, 5e4), {{2, 0.5}}));
  const Kinetics kinetics({one, two}, 4, 0, 1);
  RateEvaluator evaluate(kinetics);
  const std::array C{1.0, 2.0, 0.5, 0.1};
  std::array<double, 2> r{};
  const AllocationWatch watch;
  for (int i = 0; i < 100; ++i) evaluate(C, 300 + i / 2, 0, r);
  CHECK(watch.count() == 0);
  CHECK(r[0] != 0);
}

TEST_CASE("an evaluator outlives the kinetics that it was made of", "[rates]") {
  auto kinetics = std::make_unique<Kinetics>(std::vector{elementary({{0, -1}, {1, 1}}, 0.5)}, 2, 0, 1.0);
  RateEvaluator first(*kinetics);
  kinetics.reset();
  RateEvaluator second(first);
  std::array r{0.0};
  second(std::array{3.0, 0.0}, 300, 0, r);
  CHECK(r[0] == 1.5);
}
