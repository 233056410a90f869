// Vessels on their jackets, side by side with the same cases marched by Boost.Odeint's explicit pair, by a general
// stiff integrator library in C where it is there, and by a script on a general ODE library. Figures of one run are to
// be compared with each other only. The errors are those at the outlet against a march at 1e-12.
#include <array>
#include <boost/numeric/odeint/integrate/integrate_adaptive.hpp>
#include <boost/numeric/odeint/stepper/controlled_runge_kutta.hpp>
#include <boost/numeric/odeint/stepper/generation.hpp>
#include <boost/numeric/odeint/stepper/generation/make_controlled.hpp>
#include <boost/numeric/odeint/stepper/runge_kutta_dopri5.hpp>
#include <cmath>
#include <cstdlib>

#ifdef VATWRIGHT_WITH_CVODE
#include <cvode/cvode.h>
#include <nvector/nvector_serial.h>
#include <sunlinsol/sunlinsol_dense.h>
#include <sunmatrix/sunmatrix_dense.h>
#endif

#include "clock.hpp"
#include "vatwright/vessel/run.hpp"

namespace {
using namespace vatwright;
namespace odeint = boost::numeric::odeint;

constexpr double c_A = 2000, rho_cp = 2e6, feed_K = 330, E_R = 9000, k_feed = 2e-3;
constexpr double bore = 0.05, area_per_m3 = 4 / bore;

/// A tube of 0.4 m3 fed with A -> B; which differ in heat, U and feed.
struct TubeCase {
  const char* name;
  double U, medium_K, dH, feed_m3_s;
  double feed = 0;
};
constexpr double tube_m3 = 0.4;
constexpr TubeCase mild{"mild: 7 exchange times", 350, 325, -60e3, 8e-4};
constexpr TubeCase stiff{"stiff: 4600 exchange times", 230e3, 325, -60e3, 8e-4};

Chemistry chemistry_of(double dH) {
  Chemistry chemistry;
  for (const char* name : {"A", "B"}) {
    Species s;
    s.name = name;
    chemistry.feed.species.push_back(s);
  }
  chemistry.feed.c_mol_m3 = {c_A, 0};
  chemistry.feed.temperature_K = feed_K;
  chemistry.feed.density_kg_m3 = 1000;
  chemistry.feed.heat_capacity_J_kg_K = rho_cp / 1000;
  Reaction r;
  r.name = r.equation = "A -> B";
  r.nu = {{0, -1}, {1, 1}};
  r.left = {{0, 1}};
  r.right = {{1, 1}};
  RateLaw law;
  RateConstant k;
  k.k = k_feed;
  k.moves = RateConstant::Moves::arrhenius;
  k.at_K = feed_K;
  k.activation_J_mol = E_R * gas_constant;
  law.law = PowerLaw{k, {{0, 1}}};
  r.forward = law;
  r.heat = HeatOfReaction{dH, 298.15, {}};
  chemistry.kinetics = Kinetics({std::move(r)}, 2, 0, c_A);
  return chemistry;
}

struct Plant {
  Plant(const TubeCase& c, Passage passage, double medium_m3_s)
      : chemistry(chemistry_of(c.dH)), medium{"medium", c.medium_K} {
    vessel.tag = "L";
    vessel.kind = Tube{bore, tube_m3 / (0.25 * 3.14159265358979 * bore * bore), 1, 0};
    vessel.jacket = Jacket{{"medium"}, std::nullopt, c.U, 0, passage};
    operation.thermal = Thermal::jacketed;
    operation.medium = &medium;
    if (medium_m3_s > 0) operation.medium_flow_m3_s = medium_m3_s;
  }
  Plant(const Plant&) = delete;
  Chemistry chemistry;
  Utility medium;
  Vessel vessel;
  Operation operation;
  Start start;
  Stream feed{0, {0.0}, feed_K, 3e5};
};

using State = std::array<double, 2>;  // conversion, temperature

/// The balances written out, per space time.
struct Balances {
  const TubeCase& c;
  long* calls;
  void operator()(const State& y, State& dy, double) const {
    ++*calls;
    const double r = k_feed * std::exp(-E_R * (1 / y[1] - 1 / feed_K)) * (1 - y[0]);
    dy[0] = r;
    dy[1] = (-c.dH * c_A * r - c.U * area_per_m3 * (y[1] - c.medium_K)) / rho_cp;
  }
};

State march_plain(const TubeCase& c, double tol, long& calls) {
  State y{0, feed_K};
  const double tau = tube_m3 / c.feed_m3_s;
  odeint::integrate_adaptive(odeint::make_controlled(tol, tol, odeint::runge_kutta_dopri5<State>()),
                             Balances{c, &calls}, y, 0.0, tau, tau / 1000);
  return y;
}

#ifdef VATWRIGHT_WITH_CVODE
struct CvodeCase {
  const TubeCase* c;
  long* calls;
};
int cvode_rhs(realtype, N_Vector y, N_Vector dy, void* data) {
  const auto* with = static_cast<CvodeCase*>(data);
  State at{NV_Ith_S(y, 0), NV_Ith_S(y, 1)}, d{};
  Balances{*with->c, with->calls}(at, d, 0);
  NV_Ith_S(dy, 0) = d[0];
  NV_Ith_S(dy, 1) = d[1];
  return 0;
}
State march_cvode(const TubeCase& c, double tol, long& calls) {
  SUNContext context;
  SUNContext_Create(nullptr, &context);
  N_Vector y = N_VNew_Serial(2, context);
  NV_Ith_S(y, 0) = 0;
  NV_Ith_S(y, 1) = feed_K;
  void* memory = CVodeCreate(CV_BDF, context);
  CvodeCase with{&c, &calls};
  CVodeInit(memory, cvode_rhs, 0, y);
  CVodeSStolerances(memory, tol, tol);
  CVodeSetUserData(memory, &with);
  CVodeSetMaxNumSteps(memory, 100000);
  SUNMatrix A = SUNDenseMatrix(2, 2, context);
  SUNLinearSolver solver = SUNLinSol_Dense(y, A, context);
  CVodeSetLinearSolver(memory, solver, A);
  double t = 0;
  CVode(memory, tube_m3 / c.feed_m3_s, y, &t, CV_NORMAL);
  const State end{NV_Ith_S(y, 0), NV_Ith_S(y, 1)};
  N_VDestroy(y);
  SUNMatDestroy(A);
  SUNLinSolFree(solver);
  CVodeFree(&memory);
  SUNContext_Free(&context);
  return end;
}
#endif

volatile double sink;

void bench_tube(const TubeCase& c) {
  static long calls = 0, own_calls = 0;
  Plant plant(c, Passage::uniform, 0);
  const State exact = march_plain(c, 1e-12, calls);
  const auto own = [&] {
    VesselRun run(plant.vessel, plant.chemistry, plant.operation, plant.start, plant.feed);
    const auto outcome = run.at(c.feed_m3_s, Detail::map);
    own_calls = run.rate_calls();
    return answer(outcome)->conversion;
  };
  std::printf("\n%s; error in X: this program %.0e", c.name, std::abs(own() - exact[0]));
  std::vector<bench::Way> ways = {{"this program, track and reach", [&] { sink = own(); }, [] { return own_calls; }}};
  for (const double tol : {1e-11, 1e-9}) {
    std::printf(", explicit pair at %.0e %.0e", tol, std::abs(march_plain(c, tol, calls)[0] - exact[0]));
    ways.push_back({"Boost.Odeint's explicit pair at " + std::string(tol < 1e-10 ? "1e-11" : "1e-9"),
                    [&c, tol] { sink = march_plain(c, tol, calls)[0]; },
                    [&c, tol] {
                      calls = 0;
                      march_plain(c, tol, calls);
                      return calls;
                    }});
  }
#ifdef VATWRIGHT_WITH_CVODE
  for (const double tol : {1e-11, 1e-9}) {
    std::printf(", C library at %.0e %.0e", tol, std::abs(march_cvode(c, tol, calls)[0] - exact[0]));
    ways.push_back({"CVODE of SUNDIALS at " + std::string(tol < 1e-10 ? "1e-11" : "1e-9"),
                    [&c, tol] { sink = march_cvode(c, tol, calls)[0]; },
                    [&c, tol] {
                      calls = 0;
                      march_cvode(c, tol, calls);
                      return calls;
                    }});
  }
#endif
  std::printf("\n");
  bench::print_case("the tube rated once", ways);
}

void bench_counter_current() {
  static long calls = 0;
  Plant plant(mild, Passage::counter_current, 1.5e-3);
  bench::print_case("a counter-current tube, all its solutions",
                    {{"this program",
                      [&] {
                        VesselRun run(plant.vessel, plant.chemistry, plant.operation, plant.start, plant.feed);
                        sink = answer(run.at(mild.feed_m3_s, Detail::map))->conversion;
                        calls = run.rate_calls();
                      },
                      [] { return calls; }}});
}

void bench_tank() {
  static long calls = 0;
  static double rate = 4e-4;
  TubeCase c = mild;
  c.dH = -180e3;
  Plant plant(c, Passage::uniform, 0);
  plant.vessel.kind = StirredTank{tube_m3, {0, 1}, 0};
  plant.vessel.jacket->area_m2 = 2;
  plant.start.temperature_K = 325;
  static VesselRun kept(plant.vessel, plant.chemistry, plant.operation, plant.start, plant.feed);
  bench::print_case("all states of a jacketed tank and which the start comes to",
                    {{"this program, states alone where one is stable",
                      [&] {
                        rate = rate > 8e-4 ? 4e-4 : rate * 1.001;
                        sink = answer(kept.at(rate, Detail::map))->conversion;
                        calls = kept.rate_calls();
                      }},
                     {"this program, the start-up followed", [&] {
                        rate = rate > 8e-4 ? 4e-4 : rate * 1.001;
                        const auto outcome = kept.at(rate, Detail::full);
                        sink = answer(outcome) != nullptr ? answer(outcome)->conversion : 0;
                      }}});
}

}  // namespace

int main(int, char** argv) {
  std::printf("medians of rounds taken in turn; the last column is the ratio to the first line of each case\n");
  bench_tube(mild);
  bench_tube(stiff);
  bench_counter_current();
  bench_tank();
  std::fflush(stdout);
  const std::string here(argv[0]);
  const std::string program = here.substr(0, here.find_last_of('/') + 1) + "vatwright";
  const std::string demo = std::string(VATWRIGHT_SOURCE_DIR) + "/vessels/";
  const std::string script = std::string(VATWRIGHT_SOURCE_DIR) + "/tests/benchmark/general_library_heat.py";
  std::printf("\nthe same tubes by a script on a general ODE library\n");
  std::fflush(stdout);
  if (std::system(("for p in python3 /usr/bin/python3; do $p -c 'import scipy' 2>/dev/null && exec $p '" + script +
                   "'; done; exit 1")
                      .c_str()) != 0)
    std::printf("  (needs python3 with SciPy: not run)\n");
  std::printf("\nwhole processes, one thread\n");
  for (const char* duty : {"isomer", "cyclisate"}) {
    const std::string command =
        program + " screen " + demo + "brackwater.toml " + demo + duty + ".toml --json --threads 1 > /dev/null 2>&1";
    const auto s = bench::time_in_turn({{duty, [&] { sink = std::system(command.c_str()); }}}, 5, 0.0);
    std::printf("  screen of 12 vessels, %-38s %12.1f ms\n", duty, s[0] * 1e3);
  }
  const auto forty =
      bench::time_in_turn({{"forty",
                            [&] {
                              sink = std::system((program + " screen " + demo + "../tests/benchmark/forty.toml " +
                                                  demo + "isomer.toml --json --threads 1 > /dev/null 2>&1")
                                                     .c_str());
                            }}},
                          5, 0.0);
  std::printf("  screen of 40 jacketed vessels with windows          %12.1f ms\n", forty[0] * 1e3);
}
