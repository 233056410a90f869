#include <cmath>
#include <random>
#include <string>

#include "support/catch.hpp"
#include "vatwright/quantity/quantity.hpp"
#include "vatwright/quantity/show.hpp"

using namespace vatwright;

namespace {

struct Base {
  const char* name;
  double log_factor;  // natural logarithm of one unit in SI; products become sums, apart from the code tested
  double exponents[5];
};

// NIST SP 811 (2008), appendix B.8
const Base bases[] = {{"kg", 0, {1, 0, 0, 0, 0}},
                      {"lb", std::log(0.45359237), {1, 0, 0, 0, 0}},
                      {"ft", std::log(0.3048), {0, 1, 0, 0, 0}},
                      {"L", std::log(0.001), {0, 3, 0, 0, 0}},
                      {"min", std::log(60.0), {0, 0, 1, 0, 0}},
                      {"kmol", std::log(1000.0), {0, 0, 0, 1, 0}},
                      {"degC", 0, {0, 0, 0, 0, 1}},
                      {"kW", std::log(1000.0), {1, 2, -3, 0, 0}},
                      {"bar", std::log(1e5), {1, -1, -2, 0, 0}}};

}  // namespace

TEST_CASE("random compounds agree with sums of logarithms", "[quantity][random]") {
  std::mt19937 random(3);
  const double powers[] = {1, 2, 3, -1, -2, 0.5, -0.5, 1.5, -0.25};
  for (int i = 0; i < 3000; ++i) {
    std::string unit;
    double log_factor = 0, sum[5] = {};
    const int units = 2 + static_cast<int>(random() % 4);
    bool stroke = false;
    for (int u = 0; u < units; ++u) {
      const Base& base = bases[random() % std::size(bases)];
      const double power = powers[random() % std::size(powers)];
      stroke = u > 0 && (stroke || random() % 2 == 0);
      if (u > 0) unit += stroke ? "/" : ".";
      unit += base.name;
      if (power != 1) unit.append(1, '^').append(shortest(power));
      const double signed_power = stroke ? -power : power;
      log_factor += signed_power * base.log_factor;
      for (int e = 0; e < 5; ++e) sum[e] += signed_power * base.exponents[e];
    }
    INFO(unit);
    const auto read = parse_quantity("2.5 " + unit);
    REQUIRE(std::holds_alternative<Quantity>(read));
    const auto& q = std::get<Quantity>(read);
    REQUIRE(q.si == Approx(2.5 * std::exp(log_factor)).epsilon(1e-12));
    REQUIRE(q.dimension == Dimension{sum[0], sum[1], sum[2], sum[3], sum[4]});
  }
}

TEST_CASE("brackets below a stroke divide as a whole", "[quantity]") {
  const auto flat = std::get<Quantity>(parse_quantity("7 kW/ft^2/degC/min"));
  const auto nested = std::get<Quantity>(parse_quantity("7 kW/(ft2.(degC.min))"));
  CHECK(nested.si == Approx(flat.si).epsilon(1e-14));
  CHECK(nested.dimension == flat.dimension);
}

TEST_CASE("every example reads back with its dimension", "[quantity][random]") {
  const auto check = [](Dimension d) {
    const std::string example = example_of(d);
    INFO(example << ", " << name_of(d));
    const auto read = parse_quantity(example);
    REQUIRE(std::holds_alternative<Quantity>(read));
    REQUIRE(std::get<Quantity>(read).dimension == d);
    REQUIRE_FALSE(name_of(d).empty());
  };
  std::mt19937 random(11);
  std::uniform_real_distribution<double> any(-3, 3);
  for (int i = 0; i < 2000; ++i) {
    const double n = i % 2 == 0 ? any(random) : static_cast<double>(static_cast<int>(random() % 13) - 6) / 2;
    const Dimension fluid = pow(dim::concentration, 1 - n) / dim::time;
    check(fluid);
    check(fluid * dim::volume / dim::mass);
    check(moles_as_mass(fluid));
    check(dim::concentration / dim::time / pow(dim::pressure, n));
    check(dim::amount / dim::mass / dim::time / pow(dim::pressure, n));
    check(pow(dim::concentration, n));
    check(pow(dim::pressure, n));
    check({any(random), any(random), any(random), any(random), any(random)});
  }
  for (const Dimension d : {dim::none,          dim::length,        dim::area,
                            dim::volume,        dim::mass,          dim::amount,
                            dim::time,          dim::temperature,   dim::pressure,
                            dim::energy,        dim::power,         dim::density,
                            dim::viscosity,     dim::volume_flow,   dim::mass_flow,
                            dim::molar_flow,    dim::concentration, dim::molar_mass,
                            dim::molar_energy,  dim::heat_capacity, dim::molar_heat_capacity,
                            dim::heat_transfer, dim::fouling,       dim::frequency})
    check(d);
}

TEST_CASE("rate constants get the unit in which the trade writes them", "[quantity]") {
  // k in (mol/L)^(1-n)/min follows from r = k C^n; the units of orders 0, 1, 2 are common practice, no source
  const auto fluid = [](double n) { return pow(dim::concentration, 1 - n) / dim::time; };
  const Dimension per_mass = dim::volume / dim::mass;
  CHECK(example_of(fluid(0)) == "0.042 mol/L/min");
  CHECK(example_of(fluid(1)) == "0.042 1/min");
  CHECK(example_of(fluid(2)) == "0.042 L/mol/min");
  CHECK(example_of(fluid(1.5)) == "0.042 L^0.5/mol^0.5/min");
  CHECK(example_of(fluid(3)) == "0.042 L2/mol2/min");
  CHECK(example_of(fluid(2) * per_mass) == "0.042 L2/mol/kg/min");
  CHECK(example_of(fluid(1) * per_mass) == "0.042 L/kg/min");
  CHECK(example_of(fluid(0) * per_mass) == "0.042 mol/kg/min");
  CHECK(example_of(dim::concentration / dim::time / dim::pressure) == "0.042 mol/L/min/bar");
  CHECK(example_of(dim::amount / dim::mass / dim::time / pow(dim::pressure, 0.5)) == "0.042 mol/kg/min/bar^0.5");
  CHECK(name_of(fluid(1.5)) == "a rate constant of order 1.5");
  CHECK(example_of(dim::temperature, Sense::difference) == "5 K");
}
