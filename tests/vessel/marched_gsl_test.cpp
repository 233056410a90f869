// Tubes against the integrator of a general library (GNU Scientific Library, rkf45 and rk8pd at 1e-13), which shares
// nothing with the ways of this room: amounts of species as states, temperature by its own balance.
#if __has_include(<gsl/gsl_odeiv2.h>)
#include <gsl/gsl_errno.h>
#include <gsl/gsl_odeiv2.h>

#include <cmath>
#include <random>

#include "plant.hpp"
#include "support/catch.hpp"

using namespace vatwright;

namespace {

/// Written out anew: A + B -> C, C + D -> E, B + E -> F, power laws by pow, Arrhenius, constant heat capacity.
struct Duty {
  double c[6] = {}, k[3] = {}, E[3] = {}, n[3][2] = {}, dH[3] = {}, capacity = 0, T0 = 0, P = 0;
  int reactions = 1;
  bool gas = false, adiabatic = false;
};
constexpr int from[] = {0, 2, 1}, with[] = {1, 3, 4}, to[] = {2, 4, 5};

int slopes(double, const double y[], double dy[], void* data) {
  const Duty& d = *static_cast<const Duty*>(data);
  for (int i = 0; i < 7; ++i) dy[i] = 0;
  const double T = d.adiabatic ? y[6] : d.T0;
  double per_m3 = 1;
  if (d.gas) {
    double moles = 0;
    for (int i = 0; i < 6; ++i) moles += y[i];
    per_m3 = d.P / (8.314462618 * T) / moles;
  }
  for (int j = 0; j < d.reactions; ++j) {
    const double a = std::max(0.0, y[from[j]] * per_m3), b = std::max(0.0, y[with[j]] * per_m3);
    const double r = d.k[j] * std::exp(-d.E[j] / 8.314462618 * (1 / T - 1 / 350.0)) * std::pow(a, d.n[j][0]) *
                     std::pow(b, d.n[j][1]);
    dy[from[j]] -= r;
    dy[with[j]] -= r;
    dy[to[j]] += r;
    if (d.adiabatic) dy[6] -= d.dH[j] * r / d.capacity;
  }
  return GSL_SUCCESS;
}

Duty random_duty(std::mt19937& random, int reactions, bool gas, bool adiabatic) {
  std::uniform_real_distribution<double> u(0, 1);
  Duty d;
  d.reactions = reactions;
  d.gas = gas;
  d.adiabatic = adiabatic;
  d.T0 = 350;
  const double all = gas ? 60 : 1000;
  d.c[0] = all * (0.2 + u(random));
  d.c[1] = all * (0.2 + u(random));
  d.c[3] = all * u(random);
  d.P = (d.c[0] + d.c[1] + d.c[3]) * 8.314462618 * d.T0;
  d.capacity = all * 500;
  for (int j = 0; j < reactions; ++j) {
    d.n[j][0] = 1 + 0.5 * static_cast<double>(random() % 3);
    d.n[j][1] = 1 + 0.5 * static_cast<double>(random() % 3);
    d.k[j] = std::pow(10, 1.5 * u(random) - 1) / std::pow(all, d.n[j][0] + d.n[j][1] - 1);
    d.E[j] = 80000 * u(random);
    d.dH[j] = 40000 * (u(random) - 0.7);
  }
  return d;
}

Plant plant_of(const Duty& d) {
  Plant plant(std::vector<double>(d.c, d.c + 6));
  if (d.gas) plant.gas(d.T0, d.P);
  plant.feed.temperature_K = d.T0;
  plant.operation.hold_K = d.T0;
  plant.feed.density_kg_m3 = 1;
  plant.feed.heat_capacity_J_kg_K = d.capacity;
  if (d.adiabatic) plant.adiabatic();
  for (int j = 0; j < d.reactions; ++j) {
    Reaction& r =
        plant.react({{from[j], -1}, {with[j], -1}, {to[j], 1}}, d.k[j], {{from[j], d.n[j][0]}, {with[j], d.n[j][1]}});
    constant_of(r).at_K = 350;
    constant_of(r).moves = RateConstant::Moves::arrhenius;
    constant_of(r).activation_J_mol = d.E[j];
    r.heat = HeatOfReaction{.dH_J_mol = d.dH[j], .at_K = 350, .dCp = {}};
  }
  return plant;
}

}  // namespace

TEST_CASE("random tubes agree with a general integrator", "[vessel][gsl]") {
  std::mt19937 random(20);
  std::uniform_real_distribution<double> u(0, 1);
  for (int i = 0; i < 240; ++i) {
    Duty d = random_duty(random, 1 + i % 3, i % 2 == 1, i % 4 >= 2);
    const double t = std::pow(10, 2 * u(random) - 1);
    double y[7] = {d.c[0], d.c[1], d.c[2], d.c[3], d.c[4], d.c[5], d.T0};
    gsl_odeiv2_system system{slopes, nullptr, 7, &d};
    gsl_odeiv2_driver* driver = gsl_odeiv2_driver_alloc_y_new(&system, gsl_odeiv2_step_rk8pd, 1e-6 * t, 1e-10, 1e-13);
    double at = 0;
    const int status = gsl_odeiv2_driver_apply(driver, &at, t, y);
    gsl_odeiv2_driver_free(driver);
    REQUIRE(status == GSL_SUCCESS);
    Rated tube(plant_of(d), tube_of(1));
    const auto outcome = tube.at(1 / t);
    INFO("case " << i << ", reactions " << d.reactions << ", gas " << d.gas << ", adiabatic " << d.adiabatic << ", t "
                 << t);
    std::vector<double> c(6);
    tube.chemistry().kinetics.amounts(std::vector<double>(d.c, d.c + 6), outcome.outlet.xi_mol_m3, c);
    for (std::size_t s = 0; s < 6; ++s) CHECK(c[s] == Approx(y[s]).margin(1e-8 * d.c[0]).epsilon(0));
    CHECK(outcome.conversion == Approx(1 - y[0] / d.c[0]).margin(1e-8));
    if (d.adiabatic) CHECK(outcome.outlet.temperature_K == Approx(y[6]).epsilon(1e-9));
  }
}
#endif
