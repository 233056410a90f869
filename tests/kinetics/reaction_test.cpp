#include "vatwright/kinetics/reaction.hpp"

#include <cmath>

#include "samples.hpp"
#include "support/catch.hpp"
#include "vatwright/numeric/quadrature.hpp"

using namespace vatwright;
using namespace vatwright::samples;

TEST_CASE("Arrhenius: ethane cracking", "[reaction]") {
  // H. S. Fogler, Elements of Chemical Reaction Engineering, 4th ed., example 4-4 (from memory): 0.072 1/s at 1000 K,
  // 82 kcal/mol, printed 3.07 1/s at 1100 K.
  const RateConstant k = arrhenius(0.072, 1000, 82 * 4184);
  CHECK(k.at(1100) == Approx(3.07).margin(0.005));
  CHECK(k.at(1000) == 0.072);
}

TEST_CASE("Arrhenius: butane to isobutane", "[reaction]") {
  // Fogler, 3rd ed., example 8-6: k = 31.1 exp[7906 (T - 360)/(360 T)] 1/h.
  const RateConstant k = arrhenius(31.1, 360, 7906 * gas_constant);
  for (double T : {300.0, 338.7, 360.0, 420.0})
    CHECK(k.at(T) == Approx(31.1 * std::exp(7906 * (T - 360) / (360 * T))).epsilon(1e-13));
}

TEST_CASE("theta and no law at all", "[reaction]") {
  RateConstant k = constant(0.1);
  CHECK(k.at(250) == 0.1);
  CHECK(k.at(400) == 0.1);
  k.moves = RateConstant::Moves::theta;
  k.at_K = 293.15;
  k.theta = 1.047;  // oxygen demand of sewage, H. W. Streeter, E. B. Phelps, 1925 (from memory)
  CHECK(k.at(293.15) == 0.1);
  CHECK(k.at(303.15) == Approx(0.1 * std::pow(1.047, 10)));
}

TEST_CASE("a rate constant is finite at and below zero kelvin", "[reaction]") {
  CHECK(arrhenius(1, 300, 5e4).at(0) == 0);
  CHECK(arrhenius(1, 300, 5e4).at(-20) == 0);
  CHECK(arrhenius(1, 300, 5e4).at(1e-3) == 0);
}

TEST_CASE("heat of reaction moves with the heat capacities: acetone cracking", "[reaction]") {
  // Fogler, 3rd ed., example 8-7: dH = 80770 + 6.8 (T - 298) - 0.00575 (T^2 - 298^2) - 1.27e-6 (T^3 - 298^3) J/mol.
  const HeatOfReaction heat{80770, 298, {6.8, -0.0115, -3.81e-6}};
  const auto printed = [](double T) {
    return 80770 + 6.8 * (T - 298) - 0.00575 * (T * T - 298.0 * 298) - 1.27e-6 * (T * T * T - 298.0 * 298 * 298);
  };
  for (double T : {250.0, 298.0, 600.0, 1035.0}) CHECK(heat.at(T) == Approx(printed(T)).epsilon(1e-12));
  CHECK(HeatOfReaction{-62e3, 298.15, {}}.at(500) == -62e3);
}

TEST_CASE("equilibrium by van 't Hoff: adiabatic A <-> B", "[reaction]") {
  // Fogler, 3rd ed., example 8-8: Ke 1e5 at 298 K, -20 000 cal/mol, printed Xe 0.80 at 425 K, 0.53 at 450 K. Its
  // formula Ke = 1e5 exp[-33.78 (T - 298)/T], recomputed: 0.80513, 0.52568, 0.25454 (475 K).
  const auto Xe = [](const Equilibrium& K, double T) { return K.at(T) / (1 + K.at(T)); };
  const Equilibrium printed{1e5, 298.0, HeatOfReaction{-20000 * 4.184, 298.15, {}}};
  CHECK(Xe(printed, 425) == Approx(0.80).margin(0.006));
  CHECK(Xe(printed, 450) == Approx(0.53).margin(0.005));
  const Equilibrium formula{1e5, 298.0, HeatOfReaction{-33.78 * 298 * gas_constant, 298.15, {}}};
  CHECK(Xe(formula, 425) == Approx(0.80513).margin(1e-5));
  CHECK(Xe(formula, 450) == Approx(0.52568).margin(1e-5));
  CHECK(Xe(formula, 475) == Approx(0.25454).margin(1e-5));
}

TEST_CASE("equilibrium by van 't Hoff: Levenspiel's line", "[reaction]") {
  // O. Levenspiel, Chemical Reaction Engineering, 3rd ed., example 9.2: dG298 -14 130 J/mol, dH -75 300 J/mol, R 8.314.
  const Equilibrium K{std::exp(14130 / (8.314 * 298)), 298.0, HeatOfReaction{-75300, 298, {}}};
  const auto [T_degC, X] = GENERATE(table<double, double>(
      {{5, 0.9996}, {25, 0.9967}, {45, 0.9779}, {55, 0.9490}, {65, 0.8915}, {75, 0.7919}, {85, 0.6478}, {95, 0.4805}}));
  const double there = K.at(T_degC + 273);
  CHECK(there / (1 + there) == Approx(X).margin(1.5e-4));
}

TEST_CASE("K with a moving heat is the integral of dH/(R T^2)", "[reaction]") {
  const Equilibrium K{2.5, 350.0, HeatOfReaction{-42e3, 298.15, {12.3, -0.031, 4.4e-6, 1e-9}}};
  for (double T : {300.0, 350.0, 351.0, 500.0, 900.0}) {
    const auto integral = integrate([&](double u) { return K.heat->at(u) / (gas_constant * u * u); }, 350, T);
    CHECK(K.at(T) == Approx(2.5 * std::exp(answer(integral)->value)).epsilon(1e-10));
  }
}

TEST_CASE("K without a heat, or without a temperature, stays", "[reaction]") {
  CHECK(Equilibrium{4.1, 333.15, std::nullopt}.at(400) == 4.1);
  CHECK(Equilibrium{4.1, std::nullopt, HeatOfReaction{-5e4, 298.15, {}}}.at(400) == 4.1);
}
