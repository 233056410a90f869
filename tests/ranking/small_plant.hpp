#pragma once
// Small plants by closed forms, apart from every solver of the project: rates over conversion alone, tubes and tanks
// turned to outlets, all of one reaction in a liquid.
#include <optional>
#include <vector>

namespace vatwright::test {

/// r(X) over k C0^(n-1) = 1 per s: (1 - X)^n of order 0.5, 1, 2; (1 - X)(X + seed); C/(1 + K C)^2, C = 1 - X; first
/// order by Arrhenius, adiabatic: (1 - X) exp(E/R (1/T0 - 1/T)), T = T0 + beta X.
enum class Shape { half, first, second, autocatalytic, hindered, adiabatic };
constexpr int shapes = 6;

constexpr double seed_conversion = 0.03;  ///< product in the feed, over reactant
constexpr double hindrance = 6;           ///< K C0
constexpr double feed_K = 298.15;         ///< T0
constexpr double rise_K = 40;             ///< beta
constexpr double activation_K = 8000;     ///< E/R

struct SmallVessel {
  bool is_tank = false;
  double volume_m3 = 1;
  std::optional<double> feed_line_m3_s;
};
struct SmallPlant {
  Shape shape = Shape::first;
  std::vector<SmallVessel> vessels;
};

double rate(Shape shape, double X);
/// Whether the rate falls all the way and every tank has one steady state.
constexpr bool rate_falls(Shape shape) {
  return shape == Shape::half || shape == Shape::first || shape == Shape::second;
}

/// What leaves a tube that is entered at x after space time tau, s: integral of dX/r from x is tau.
double tube_outlet(Shape shape, double x, double tau);

/// What leaves a tank that was filled with feed, entered at x: the lowest root from x on of X - x = tau r(X).
double tank_outlet(Shape shape, double x, double tau);

double outlet(Shape shape, const SmallVessel& vessel, double x, double feed_m3_s);

}  // namespace vatwright::test
