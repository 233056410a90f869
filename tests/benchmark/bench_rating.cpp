// Rates, isothermal tubes and tanks, and ceilings, side by side with the same cases marched and re-integrated by
// Boost.Odeint alone, and by a script on a general ODE library where Python and SciPy are there. Figures of one run are
// to be compared with each other only.
#include <array>
#include <boost/math/tools/toms748_solve.hpp>
#include <boost/numeric/odeint/integrate/integrate_adaptive.hpp>
#include <boost/numeric/odeint/stepper/controlled_runge_kutta.hpp>
#include <boost/numeric/odeint/stepper/generation.hpp>
#include <boost/numeric/odeint/stepper/generation/make_controlled.hpp>
#include <boost/numeric/odeint/stepper/runge_kutta_dopri5.hpp>
#include <cmath>
#include <cstdlib>

#include "clock.hpp"
#include "vatwright/vessel/run.hpp"

namespace {
using namespace vatwright;
namespace odeint = boost::numeric::odeint;

constexpr double c_A = 2000, c_B = 2600, tube_m3 = 0.4, feed_m3_s = 5e-4;
const double k_rate = 3.5e-3 / std::sqrt(c_A);  // order 1.5 in all: X about 0.95 in the tube

Reaction second_order() {
  Reaction r;
  r.name = r.equation = "A + B -> C";
  r.nu = {{0, -1}, {1, -1}, {2, 1}};
  r.left = {{0, 1}, {1, 1}};
  r.right = {{2, 1}};
  RateLaw law;
  law.law = PowerLaw{RateConstant{k_rate}, {{0, 1}, {1, 0.5}}};
  r.forward = law;
  return r;
}

/// C/(1 + K C)^2 with K C0 = 20: three steady states between k tau = 75.8 and 122.2.
Reaction hindered() {
  Reaction r;
  r.name = r.equation = "A -> C";
  r.nu = {{0, -1}, {2, 1}};
  r.left = {{0, 1}};
  r.right = {{2, 1}};
  RateLaw law;
  law.law = PowerLaw{RateConstant{1.0}, {{0, 1}}};
  law.adsorption = {{0, 20 / c_A}};
  law.adsorption_power = 2;
  r.forward = law;
  return r;
}

Chemistry chemistry_of(Reaction reaction) {
  Chemistry chemistry;
  for (const char* name : {"A", "B", "C"}) {
    Species s;
    s.name = name;
    chemistry.feed.species.push_back(s);
  }
  chemistry.feed.c_mol_m3 = {c_A, c_B, 0};
  chemistry.kinetics = Kinetics({std::move(reaction)}, 3, 0, c_A);
  return chemistry;
}

Vessel tube() {
  Vessel v;
  v.tag = "L";
  v.kind = Tube{0.05, tube_m3 / (0.25 * 3.14159265358979 * 0.05 * 0.05), 1, 0};
  return v;
}
Vessel tank() {
  Vessel v;
  v.tag = "R";
  v.kind = StirredTank{tube_m3, {0, 1}, 0};
  return v;
}

Operation held() {
  Operation o;
  o.thermal = Thermal::hold;
  o.hold_K = 333.15;
  return o;
}

/// The plain way: march d xi/d tau by the explicit pair at 1e-9, on the same rate law as it is read from a file.
double march_plain(const Chemistry& chemistry, double tau, long& calls) {
  using State = std::array<double, 1>;
  static RateEvaluator rate(chemistry.kinetics);
  static std::array<double, 3> C;
  static std::array<double, 1> r;
  State xi{0};
  auto rhs = [&](const State& x, State& dx, double) {
    ++calls;
    C = {c_A - x[0], c_B - x[0], x[0]};
    rate(C, 333.15, x[0] / c_A, r);
    dx[0] = r[0];
  };
  odeint::integrate_adaptive(odeint::make_controlled(1e-9 * c_A, 1e-9, odeint::runge_kutta_dopri5<State>()), rhs, xi,
                             0.0, tau, tau / 50);
  return xi[0] / c_A;
}

double ceiling_plain(const Chemistry& chemistry, double X, long& calls) {
  std::uintmax_t most = 100;
  auto miss = [&](double log_feed) { return march_plain(chemistry, tube_m3 / std::exp(log_feed), calls) - X; };
  const auto bracket = boost::math::tools::toms748_solve(miss, std::log(1e-6), std::log(1e-1),
                                                         boost::math::tools::eps_tolerance<double>(40), most);
  return std::exp(bracket.first);
}

/// The plain way to a tank's states: 200 samples of the balance and a bracketed root in each change of sign.
int states_plain(double k_tau, long& calls) {
  auto g = [&](double u) {
    ++calls;
    return 20 - u - k_tau * u / ((1 + u) * (1 + u));
  };
  int found = 0;
  double last = g(1e-9);
  for (int i = 1; i <= 200; ++i) {
    const double u0 = 20.0 * (i - 1) / 200 + 1e-9, u1 = 20.0 * i / 200, next = g(u1);
    if ((last > 0) != (next > 0)) {
      std::uintmax_t most = 60;
      boost::math::tools::toms748_solve(g, u0, u1, last, next, boost::math::tools::eps_tolerance<double>(46), most);
      ++found;
    }
    last = next;
  }
  return found;
}

volatile double sink;

void bench_rates() {
  static const auto chemistry = chemistry_of(second_order());
  static RateEvaluator rate(chemistry.kinetics);
  static std::vector<double> C{1500, 2100, 500}, r(1);
  bench::print_case("one evaluation of A + B -> C, orders 1 and 0.5, held", {{"this program", [] {
                                                                                rate(C, 333.15, 0.25, r);
                                                                                sink = r[0];
                                                                              }}});
}

void bench_tube() {
  static const auto chemistry = chemistry_of(second_order());
  static const auto vessel = tube();
  static const Stream feed{0, {0.0}, 333.15, 3e5};
  static long own_calls = 0, plain_calls = 0;
  bench::print_case("a held tube rated once", {{"this program, track and reach",
                                                [] {
                                                  VesselRun run(vessel, chemistry, held(), {}, feed);
                                                  sink = answer(run.at(feed_m3_s, Detail::map))->conversion;
                                                  own_calls = run.rate_calls();
                                                },
                                                [] { return own_calls; }},
                                               {"Boost.Odeint's explicit pair at 1e-9",
                                                [] {
                                                  plain_calls = 0;
                                                  sink = march_plain(chemistry, tube_m3 / feed_m3_s, plain_calls);
                                                },
                                                [] { return plain_calls; }}});
  bench::print_case("its ceiling for X = 0.9", {{"this program, off the track",
                                                 [] {
                                                   VesselRun run(vessel, chemistry, held(), {}, feed);
                                                   sink = *run.feed_at_conversion(0.9);
                                                   own_calls = run.rate_calls();
                                                 },
                                                 [] { return own_calls; }},
                                                {"one rating by this program",
                                                 [] {
                                                   VesselRun run(vessel, chemistry, held(), {}, feed);
                                                   sink = answer(run.at(feed_m3_s, Detail::map))->conversion;
                                                   own_calls = run.rate_calls();
                                                 }},
                                                {"re-integrated inside a root finder, Boost.Odeint",
                                                 [] {
                                                   plain_calls = 0;
                                                   sink = ceiling_plain(chemistry, 0.9, plain_calls);
                                                 },
                                                 [] { return plain_calls; }}});
}

void bench_tank() {
  static const auto chemistry = chemistry_of(hindered());
  static const auto vessel = tank();
  static const Stream feed{0, {0.0}, 333.15, 3e5};
  static long own_calls = 0, plain_calls = 0;
  static VesselRun kept(vessel, chemistry, held(), {}, feed);
  static double rate = tube_m3 / 90;
  if (answer(kept.at(tube_m3 / 90, Detail::map))->states.size() != 3 || states_plain(90, plain_calls) != 3)
    std::printf("the two ways do not find three states each\n");
  bench::print_case("all three states of a held tank", {{"this program, from nothing",
                                                         [] {
                                                           VesselRun run(vessel, chemistry, held(), {}, feed);
                                                           sink = answer(run.at(tube_m3 / 90, Detail::map))->conversion;
                                                           own_calls = run.rate_calls();
                                                         },
                                                         [] { return own_calls; }},
                                                        {"this program, at a further feed rate",
                                                         [] {
                                                           rate = rate * 1.0001 > tube_m3 / 80 ? tube_m3 / 90
                                                                                               : rate * 1.0001;
                                                           sink = answer(kept.at(rate, Detail::map))->conversion;
                                                         }},
                                                        {"200 samples and a root finder, rate written out",
                                                         [] {
                                                           plain_calls = 0;
                                                           sink = states_plain(90, plain_calls);
                                                         },
                                                         [] { return plain_calls; }}});
}

}  // namespace

int main(int, char** argv) {
  std::printf("medians of rounds taken in turn; the last column is the ratio to the first line of each case\n");
  bench_rates();
  bench_tube();
  bench_tank();
  std::fflush(stdout);
  const std::string script = std::string(VATWRIGHT_SOURCE_DIR) + "/tests/benchmark/general_library.py";
  std::printf("\nthe same by a script on a general ODE library\n");
  std::fflush(stdout);
  if (std::system(("for p in python3 /usr/bin/python3; do $p -c 'import scipy' 2>/dev/null && exec $p '" + script +
                   "'; done; exit 1")
                      .c_str()) != 0)
    std::printf("  (needs python3 with SciPy: not run)\n");
  std::printf("\nwhole processes, the demo\n");
  std::fflush(stdout);
  const std::string here(argv[0]);
  const std::string program = here.substr(0, here.find_last_of('/') + 1) + "vatwright";
  const std::string demo = std::string(VATWRIGHT_SOURCE_DIR) + "/vessels/";
  for (const char* duty : {"plasticizer", "acetate", "ketone", "mononitrile", "effluent"}) {
    const std::string command =
        program + " screen " + demo + "brackwater.toml " + demo + duty + ".toml --json > /dev/null 2>&1";
    const auto s = bench::time_in_turn({{duty, [&] { sink = std::system(command.c_str()); }}}, 5, 0.0);
    std::printf("  screen of 12 vessels, %-38s %12.1f ms\n", duty, s[0] * 1e3);
  }
  const auto forty =
      bench::time_in_turn({{"forty",
                            [&] {
                              sink = std::system((program + " screen " + demo + "../tests/benchmark/forty.toml " +
                                                  demo + "plasticizer.toml --json > /dev/null 2>&1")
                                                     .c_str());
                            }},
                           {"version", [&] { sink = std::system((program + " --version > /dev/null 2>&1").c_str()); }}},
                          9, 0.0);
  std::printf(
      "  screen of 40 vessels, start to answer              %12.1f ms\n  start and --version                           "
      "     %12.1f ms\n",
      forty[0] * 1e3, forty[1] * 1e3);
}
