// Stiff problems: where the explicit method is held by stability the march goes over to collocation.
#include <algorithm>
#include <cmath>

#include "support/catch.hpp"
#include "track_reading.hpp"
#include "vatwright/numeric/march.hpp"

using namespace vatwright;

namespace {

constexpr auto robertson = [](double, In y, Out d) {
  d[0] = -0.04 * y[0] + 1e4 * y[1] * y[2];
  d[2] = 3e7 * y[1] * y[1];
  d[1] = -d[0] - d[2];
};

}  // namespace

TEST_CASE("Robertson's reactions end where the test set says", "[march][stiff]") {
  // E. Hairer, G. Wanner, Solving Ordinary Differential Equations II, sec. IV.10, and the test set for initial value
  // problem solvers of F. Mazzia and C. Magherini (figures from memory).
  const auto [t, y1, y2, y3] = GENERATE(table<double, double, double, double>(
      {{40, 0.7158270688, 0.9185534764e-5, 0.2841637457},
       {1e11, 0.2083340149701255e-7, 0.8333360770334713e-13, 0.9999999791665050}}));
  const std::vector<double> y0{1, 0, 0};
  const auto track = march(robertson, y0, 0, t, {.rel_tol = 1e-10, .abs_tol = 1e-18});
  REQUIRE(answer(track) != nullptr);
  const auto end = at(*answer(track), t);
  CHECK(end[0] == Approx(y1).epsilon(2e-9));
  CHECK(end[1] == Approx(y2).epsilon(2e-9));
  CHECK(end[2] == Approx(y3).epsilon(2e-9));
  CHECK(answer(track)->calls() < 12'000);
}

TEST_CASE("a fast part that follows a slow one: readings hold the tolerance too", "[march][stiff]") {
  // A. Prothero, A. Robinson, Math. Comp. 28 (1974) 145 (from memory): y' = -L (y - cos t) - sin t, y = cos t.
  const double L = GENERATE(1e3, 1e5, 1e7), tol = GENERATE(1e-5, 1e-7, 1e-9, 1e-10);
  const auto f = [L](double t, In y, Out d) { d[0] = -L * (y[0] - std::cos(t)) - std::sin(t); };
  const std::vector<double> y0{1};
  const auto track = march(f, y0, 0, 3, {.rel_tol = tol, .abs_tol = tol});
  REQUIRE(answer(track) != nullptr);
  double worst = 0;
  for (int i = 0; i <= 1000; ++i)
    worst = std::max(worst, std::abs(at(*answer(track), 0.003 * i)[0] - std::cos(0.003 * i)));
  CHECK(worst < 5 * tol);
  CHECK(answer(track)->calls() < 2000);
}

TEST_CASE("a linear stiff system from off its slow part: fast transient, then the slow one", "[march][stiff]") {
  // y1' = 998 y1 + 1998 y2, y2' = -999 y1 - 1999 y2 from (1, 0): y1 = 2 exp(-t) - exp(-1000 t), y2 = -exp(-t) +
  // exp(-1000 t).
  const auto f = [](double, In y, Out d) {
    d[0] = 998 * y[0] + 1998 * y[1];
    d[1] = -999 * y[0] - 1999 * y[1];
  };
  const std::vector<double> y0{1, 0};
  const auto track = march(f, y0, 0, 10);
  REQUIRE(answer(track) != nullptr);
  CHECK(answer(track)->stiff_steps() > 0);
  for (double t : {1e-4, 1e-3, 0.01, 0.3, 1.0, 4.0, 10.0}) {
    CHECK(at(*answer(track), t)[0] == Approx(2 * std::exp(-t) - std::exp(-1000 * t)).epsilon(2e-9));
    CHECK(at(*answer(track), t)[1] == Approx(-std::exp(-t) + std::exp(-1000 * t)).epsilon(2e-9));
  }
  CHECK(answer(track)->calls() < 4000);
}

TEST_CASE("a Jacobian that is given serves as well as differences", "[march][stiff]") {
  const auto jacobian = [](double, In y, Out J) {
    const double rows[] = {-0.04,       1e4 * y[2], 1e4 * y[1], 0.04, -1e4 * y[2] - 6e7 * y[1],
                           -1e4 * y[1], 0,          6e7 * y[1], 0};
    std::ranges::copy(rows, J.begin());
  };
  const Jacobian given = jacobian;
  const std::vector<double> y0{1, 0, 0};
  const MarchOptions options{.rel_tol = 1e-9, .abs_tol = 1e-16};
  const auto with = march(robertson, y0, 0, 1e4, options, {}, &given);
  const auto without = march(robertson, y0, 0, 1e4, options);
  REQUIRE(answer(with) != nullptr);
  REQUIRE(answer(without) != nullptr);
  for (std::size_t i = 0; i < 3; ++i)
    CHECK(at(*answer(with), 1e4)[i] == Approx(at(*answer(without), 1e4)[i]).epsilon(1e-7));
  CHECK(answer(with)->calls() < answer(without)->calls());
}

TEST_CASE("an event in a stiff march", "[march][stiff]") {
  const auto f = [](double t, In y, Out d) { d[0] = -1e5 * (y[0] - std::cos(t)) - std::sin(t); };
  const auto zero = [](double, In y) { return y[0]; };
  const Event events[] = {zero};
  const std::vector<double> y0{1};
  const auto track = march(f, y0, 0, 3, {}, events);
  REQUIRE(answer(track) != nullptr);
  CHECK(answer(track)->ended_by() == 0);
  CHECK(answer(track)->end() == Approx(std::acos(-1.0) / 2).epsilon(1e-9));
}

TEST_CASE("van der Pol's swing goes to and fro between the methods", "[march][stiff]") {
  // y'' = ((1 - y^2) y' - y)/eps, eps = 1e-6, from (2, 0); at t = 2: 1.706167732170469, -0.8928097010248125 (the test
  // set of Hairer and Wanner, from memory).
  const auto f = [](double, In y, Out d) {
    d[0] = y[1];
    d[1] = ((1 - y[0] * y[0]) * y[1] - y[0]) / 1e-6;
  };
  const std::vector<double> y0{2, 0};
  const auto track = march(f, y0, 0, 2, {.rel_tol = 1e-10, .abs_tol = 1e-10});
  REQUIRE(answer(track) != nullptr);
  CHECK(at(*answer(track), 2)[0] == Approx(1.706167732170469).epsilon(1e-8));
  CHECK(at(*answer(track), 2)[1] == Approx(-0.8928097010248125).epsilon(1e-8));
  CHECK(answer(track)->calls() < 60'000);
}

TEST_CASE("a reactant that runs out while something else follows it fast", "[march][stiff]") {
  // dC/dt = -C^n, n below 1: C = (1 - (1 - n) t)^(1/(1 - n)), gone at 1/(1 - n); y' = -L (y - C).
  const double n = GENERATE(0.0, 0.3, 0.5, 0.9), L = GENERATE(1.0, 1e3, 1e6);
  const auto f = [=](double, In y, Out d) {
    d[0] = y[0] > 0 ? -std::pow(y[0], n) : 0;
    d[1] = -L * (y[1] - y[0]);
  };
  const std::vector<double> y0{1, 1};
  const auto track = march(f, y0, 0, 12);
  REQUIRE(answer(track) != nullptr);
  for (double t = 0; t < 12; t += 0.0625) {
    const double C = std::pow(std::max(0.0, 1 - (1 - n) * t), 1 / (1 - n));
    CHECK(at(*answer(track), t)[0] == Approx(C).margin(5e-10));
  }
  CHECK(answer(track)->calls() < 5000);
}
