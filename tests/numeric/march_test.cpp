#include "vatwright/numeric/march.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

#include "support/catch.hpp"
#include "track_reading.hpp"

using namespace vatwright;

namespace {

Track marched(Rhs f, std::vector<double> y0, double t0, double t1, const MarchOptions& options = {},
              std::span<const Event> events = {}) {
  auto track = march(f, y0, t0, t1, options, events);
  INFO((answer(track) != nullptr ? "" : std::get<NoAnswer>(track).why));
  REQUIRE(answer(track) != nullptr);
  return *answer(track);
}

std::string why(Rhs f, std::vector<double> y0, double t0, double t1, const MarchOptions& options = {}) {
  const auto track = march(f, y0, t0, t1, options);
  REQUIRE(std::holds_alternative<NoAnswer>(track));
  CHECK(std::get<NoAnswer>(track).kind == NoAnswer::Kind::unsolved);
  return std::get<NoAnswer>(track).why;
}

/// Largest |reading - exact| over many places and over the nodes alone.
struct Errors {
  double reading = 0, node = 0;
};
Errors errors(const Track& track, double (*exact)(double)) {
  Errors worst;
  for (int i = 0; i <= 2000; ++i) {
    const double t = track.begin() + (track.end() - track.begin()) * i / 2000;
    worst.reading = std::max(worst.reading, std::abs(at(track, t)[0] - exact(t)));
  }
  for (double t : track.nodes()) worst.node = std::max(worst.node, std::abs(at(track, t)[0] - exact(t)));
  return worst;
}

}  // namespace

TEST_CASE("readings are as good as the nodes, and follow the tolerance", "[march]") {
  const double tol = GENERATE(1e-5, 1e-7, 1e-9, 1e-10, 1e-11);
  const auto swing = [](double, In y, Out d) {
    d[0] = y[1];
    d[1] = -y[0];
  };
  const Track track = marched(swing, {0, 1}, 0, 10, {.rel_tol = tol, .abs_tol = tol});
  const Errors worst = errors(track, [](double t) { return std::sin(t); });
  CHECK(worst.reading < 20 * tol);
  CHECK(worst.reading < 3 * worst.node + tol);
  CHECK(track.stiff_steps() == 0);
}

TEST_CASE("the error falls with the fifth power of the step", "[march]") {
  // Dormand and Prince's pair is of order 5: the local error estimate goes with h^5, so a tolerance 2^5 times smaller
  // asks for twice the steps and leaves 2^5 times less error over the whole way.
  const auto decay = [](double, In y, Out d) { d[0] = -y[0]; };
  const auto exact = [](double t) { return std::exp(-t); };
  std::vector<double> steps, error;
  for (double tol : {1e-7, 1e-7 / 32, 1e-7 / 1024, 1e-7 / 32768}) {
    const Track track = marched(decay, {1}, 0, 5, {.rel_tol = tol, .abs_tol = 1e-30});
    steps.push_back(static_cast<double>(track.nodes().size() - 1));
    error.push_back(errors(track, exact).node);
  }
  for (std::size_t i = 0; i + 1 < steps.size(); ++i) {
    CHECK(std::log2(steps[i + 1] / steps[i]) == Approx(1).margin(0.1));
    CHECK(std::log2(error[i] / error[i + 1]) == Approx(5).margin(0.4));
  }
}

TEST_CASE("polynomials up to the order of the method are exact", "[march]") {
  const int degree = GENERATE(0, 1, 2, 3, 4);
  const auto f = [&](double t, In, Out d) { d[0] = (degree + 1) * std::pow(t, degree); };
  const Track track = marched(f, {0}, 0, 2, {.rel_tol = 1e-3, .abs_tol = 1e-3});
  for (double t : track.nodes()) CHECK(at(track, t)[0] == Approx(std::pow(t, degree + 1)).margin(1e-13));
  if (degree < 4)  // between the nodes the polynomial is of degree 4
    for (double t : {0.1, 0.77, 1.5}) CHECK(at(track, t)[0] == Approx(std::pow(t, degree + 1)).margin(1e-13));
}

TEST_CASE("nothing to march leaves the start", "[march]") {
  const auto decay = [](double, In y, Out d) { d[0] = -y[0]; };
  const Track none = marched(decay, {3}, 2, 2);
  CHECK(none.nodes() == std::vector<double>{2});
  CHECK(at(none, 2)[0] == 3);
  const Track still = marched([](double, In, Out d) { d[0] = 0; }, {3}, 0, 1e6);
  CHECK(at(still, 5e5)[0] == 3);
  CHECK(still.calls() < 100);
}

TEST_CASE("the ends of a track are those asked for, its nodes rise", "[march]") {
  const Track track = marched([](double t, In y, Out d) { d[0] = std::cos(t) * y[0]; }, {1}, -3, 0.1);
  CHECK(track.begin() == -3);
  CHECK(track.end() == 0.1);
  CHECK(std::ranges::is_sorted(track.nodes(), std::less_equal<>{}));
}

TEST_CASE("f is asked inside the range alone", "[march]") {
  const double stiffness = GENERATE(1.0, 1e5);
  double least = 1e9, most = -1e9;
  const auto f = [&](double t, In y, Out d) {
    least = std::min(least, t);
    most = std::max(most, t);
    d[0] = -stiffness * (y[0] - t) + 1;
  };
  marched(f, {1}, 0, 2, {.rel_tol = 1e-8, .abs_tol = 1e-8});
  CHECK(least >= 0);
  CHECK(most <= 2);
}

TEST_CASE("a reactant of half order runs out where it should, and the march goes on without a NaN", "[march]") {
  // dC/dt = -sqrt(C): C = (1 - t/2)^2, gone at t = 2.
  const auto f = [](double, In y, Out d) { d[0] = y[0] > 0 ? -std::sqrt(y[0]) : 0; };
  const Track track = marched(f, {1}, 0, 3);
  CHECK(at(track, 1)[0] == Approx(0.25).epsilon(1e-9));
  CHECK(std::abs(at(track, 2.5)[0]) < 1e-10);
  CHECK(track.calls() < 3000);
}

TEST_CASE("a rate without a value below zero stops the march and says where", "[march]") {
  const auto f = [](double, In y, Out d) { d[0] = -std::sqrt(y[0]); };
  CHECK(why(f, {1}, 0, 3) == "the march stopped at 2 of 3: the step fell below rounding");
}

TEST_CASE("depletion as an event", "[march]") {
  const auto left = [](double, In y) { return y[0]; };
  const Event events[] = {left};
  SECTION("order zero: a corner") {
    const Track track = marched([](double, In y, Out d) { d[0] = y[0] > 0 ? -1 : 0; }, {1}, 0, 3, {}, events);
    CHECK(track.ended_by() == 0);
    CHECK(track.end() == Approx(1).epsilon(1e-11));
  }
  SECTION("order zero, f going on below zero: to rounding") {
    const Track track = marched([](double, In, Out d) { d[0] = -1; }, {1}, 0, 3, {}, events);
    CHECK(track.end() == Approx(1).epsilon(1e-15));
  }
  SECTION("order one half: within what the tolerance says of C") {
    const auto f = [](double, In y, Out d) { d[0] = y[0] > 0 ? -std::sqrt(y[0]) : 0; };
    const Track track = marched(f, {1}, 0, 3, {}, events);
    CHECK(track.ended_by() == 0);
    CHECK(track.end() == Approx(2).epsilon(1e-5));  // C = (1 - t/2)^2 is 1e-11 there
  }
}

TEST_CASE("an event is located to rounding, the first of several ends the march", "[march]") {
  const auto swing = [](double, In y, Out d) {
    d[0] = y[1];
    d[1] = -y[0];
  };
  const auto never = [](double, In) { return 1.0; };
  const auto late = [](double t, In) { return 7 - t; };
  const auto sine_falls = [](double, In y) { return y[0]; };  // 0 at the start, then +, - at pi
  const Event events[] = {never, late, sine_falls};
  const Track track = marched(swing, {0, 1}, 0, 10, {.rel_tol = 1e-12, .abs_tol = 1e-12}, events);
  CHECK(track.ended_by() == 2);
  CHECK(track.end() == Approx(std::acos(-1.0)).epsilon(1e-11));
  CHECK(std::abs(at(track, track.end())[0]) < 1e-15);
  CHECK(at(track, 1.2345)[0] == Approx(std::sin(1.2345)).epsilon(1e-11));
}

TEST_CASE("a crossing from - to + is no event", "[march]") {
  const auto rising = [](double, In y) { return y[0] - 0.5; };
  const Event events[] = {rising};
  const Track track = marched([](double, In, Out d) { d[0] = 1; }, {0}, 0, 2, {}, events);
  CHECK_FALSE(track.ended_by());
  CHECK(track.end() == 2);
}

TEST_CASE("an event without a value is told", "[march]") {
  const auto f = [](double, In, Out d) { d[0] = -1; };
  const auto root = [](double, In y) { return std::log(y[0]) + 100; };
  const Event events[] = {root};
  const std::vector<double> y0{1};
  const auto track = march(f, y0, 0, 3, {}, events);
  REQUIRE(std::holds_alternative<NoAnswer>(track));
  CHECK(std::get<NoAnswer>(track).why.find("an event has no value") != std::string::npos);
}

TEST_CASE("the blow-up of y' = y^2 at t = 1 is answered, not chased", "[march]") {
  const auto f = [](double, In y, Out d) { d[0] = y[0] * y[0]; };
  CHECK(why(f, {1}, 0, 3) == "the march stopped at 1 of 3: the step fell below rounding");
  CHECK(at(marched(f, {1}, 0, 0.9), 0.9)[0] == Approx(10).epsilon(1e-8));
}

TEST_CASE("a march that can not start or not end says so", "[march]") {
  const double nan = std::nan("");
  CHECK(why([&](double, In, Out d) { d[0] = nan; }, {1}, 0, 1) ==
        "the march stopped at 0 of 1: the rates have no value there");
  CHECK(why([](double, In, Out d) { d[0] = 1; }, {nan}, 0, 1) ==
        "the march stopped at 0 of 1: the start is not finite");
  const auto rough = [](double t, In, Out d) { d[0] = std::sin(1e6 * t); };
  CHECK(why(rough, {0}, 0, 1, {.most_calls = 5000}).find("more than 5000 evaluations of the rates") !=
        std::string::npos);
}

TEST_CASE("NaN ahead is never stepped into, infinity neither", "[march]") {
  const double bad = GENERATE(std::nan(""), std::numeric_limits<double>::infinity());
  const auto f = [&](double t, In, Out d) { d[0] = t > 0.7 ? bad : 1; };
  CHECK(why(f, {0}, 0, 1).find("the march stopped at 0.7 of 1") == 0);
}

TEST_CASE("scales weigh components of very different size", "[march]") {
  const auto f = [](double t, In, Out d) {
    d[0] = 1e6 * std::cos(t);
    d[1] = 1e-6 * std::cos(t);
  };
  const double scale[] = {1e6, 1e-6};
  const Track track = marched(f, {0, 0}, 0, 3, {.rel_tol = 1e-9, .abs_tol = 1e-9, .scale = scale});
  CHECK(at(track, 3)[0] == Approx(1e6 * std::sin(3.0)).epsilon(1e-7));
  CHECK(at(track, 3)[1] == Approx(1e-6 * std::sin(3.0)).epsilon(1e-7));
}

TEST_CASE("the cost of the mild jacketed tube stays what it is", "[march]") {
  // A + B -> C + D, k 7e-7 m3/mol/s at 333.15 K, 58 kJ/mol, 60 kJ/mol released, 1.953 MJ/m3/K, U a/(rho cp) 0.0254 1/s.
  const auto f = [](double, In y, Out d) {
    const double k = 7e-7 * std::exp(-58000 / 8.314462618 * (1 / y[1] - 1 / 333.15));
    d[0] = k * (3000 - y[0]) * (3600 - y[0]);
    d[1] = 60000 * d[0] / 1.953e6 - 0.0254 * (y[1] - 320);
  };
  const double scale[] = {3000, 300};
  CHECK(marched(f, {0, 333}, 0, 3600, {.rel_tol = 1e-6, .abs_tol = 1e-6, .scale = scale}).calls() <= 280);
  CHECK(marched(f, {0, 333}, 0, 3600, {.rel_tol = 1e-9, .abs_tol = 1e-9, .scale = scale}).calls() <= 720);
}
