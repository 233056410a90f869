#include "vatwright/numeric/root.hpp"

#include <cmath>
#include <limits>
#include <numbers>

#include "support/catch.hpp"

using namespace vatwright;

namespace {
std::string why(const Outcome<double>& outcome) { return std::get<NoAnswer>(outcome).why; }
std::vector<double> samples(double a, double b, int n) {
  std::vector<double> at;
  for (int i = 0; i <= n; ++i) at.push_back(a + (b - a) * i / n);
  return at;
}
}  // namespace

TEST_CASE("a root agrees with its closed form to rounding", "[root]") {
  const auto [f, a, b, expected] = GENERATE(table<double (*)(double), double, double, double>({
      {[](double x) { return x * x - 2; }, 0.0, 2.0, std::numbers::sqrt2},
      {[](double x) { return std::exp(x) - 10; }, 0.0, 5.0, std::numbers::ln10},
      {[](double x) { return std::sin(x); }, 3.0, 4.0, std::numbers::pi},
      {[](double x) { return std::pow(x - 0.25, 3); }, -1.0, 1.0, 0.25},
      {[](double x) { return x - 1e-7; }, 0.0, 1e-1, 1e-7},
      {[](double x) { return 1e-300 * (x - 3); }, 1.0, 10.0, 3.0},
  }));
  const auto root = find_root(f, a, b);
  REQUIRE(answer(root) != nullptr);
  CHECK(*answer(root) == Approx(expected).epsilon(2e-14));
}

TEST_CASE("an end that is a root is the root", "[root]") {
  CHECK(*answer(find_root([](double x) { return x; }, 0, 1)) == 0);
  CHECK(*answer(find_root([](double x) { return x - 1; }, 0, 1)) == 1);
}

TEST_CASE("a jump through zero is a root", "[root]") {
  const auto root = find_root([](double x) { return x < 0.3 ? -1.0 : 2.0; }, 0, 1);
  REQUIRE(answer(root) != nullptr);
  CHECK(*answer(root) == Approx(0.3).epsilon(1e-14));
}

TEST_CASE("a search without an answer says why", "[root]") {
  CHECK(why(find_root([](double x) { return x * x + 1; }, -1, 1)) == "no change of sign between -1 and 1");
  CHECK(why(find_root([](double x) { return std::log(x); }, -1, 2)) == "the function has no value at -1");
  CHECK(why(find_root([](double x) { return x > 0.4 && x < 0.6 ? std::nan("") : x - 0.5; }, 0, 1)) ==
        "the function has no value at 0.5");
  CHECK(why(find_root([](double x) { return x; }, -1, std::numeric_limits<double>::infinity())) ==
        "the range of a root is empty or not finite");
  const auto cut_short = find_root([](double x) { return std::exp(x) - 2; }, 0, 1, {.most_calls = 3});
  CHECK(why(cut_short).find("no root pinned down in 3 evaluations") == 0);
}

TEST_CASE("all roots of a cubic with three are found, rising", "[root]") {
  const auto cubic = [](double x) { return (x - 0.1) * (x - 0.45) * (x - 0.9); };
  const auto roots = find_all_roots(cubic, samples(0, 1, 16));
  REQUIRE(answer(roots) != nullptr);
  REQUIRE(answer(roots)->size() == 3);
  CHECK((*answer(roots))[0] == Approx(0.1).epsilon(1e-13));
  CHECK((*answer(roots))[1] == Approx(0.45).epsilon(1e-13));
  CHECK((*answer(roots))[2] == Approx(0.9).epsilon(1e-13));
}

TEST_CASE("two roots between two samples are seen by the extremum between them", "[root]") {
  const double gap = GENERATE(1e-2, 1e-4, 1e-6), middle = GENERATE(0.02, 0.03, 0.06, 0.53, 0.94, 0.97, 0.98);
  const auto f = [=](double x) { return (x - middle) * (x - middle) - gap * gap; };
  const auto roots = find_all_roots(f, samples(0, 1, 16));
  REQUIRE(answer(roots) != nullptr);
  REQUIRE(answer(roots)->size() == 2);
  CHECK((*answer(roots))[0] == Approx(middle - gap).margin(1e-12));
  CHECK((*answer(roots))[1] == Approx(middle + gap).margin(1e-12));
}

TEST_CASE("a double root counts once, within the touch that is asked", "[root]") {
  const auto touching = [](double x) { return (x - 0.53) * (x - 0.53) + 1e-12; };
  CHECK(answer(find_all_roots(touching, samples(0, 1, 16)))->empty());
  const auto roots = find_all_roots(touching, samples(0, 1, 16), 1e-10);
  REQUIRE(answer(roots)->size() == 1);
  CHECK(answer(roots)->front() == Approx(0.53).margin(1e-6));
}

TEST_CASE("two equal samples beside an extremum do not double the roots", "[root]") {
  const auto f = [](double x) { return (x - 0.5) * (x - 0.5) - 1e-4; };
  CHECK(answer(find_all_roots(f, {0, 0.4, 0.6, 1}))->size() == 2);
}

TEST_CASE("two samples alone show a dip between them", "[root]") {
  CHECK(answer(find_all_roots([](double x) { return (x - 0.4) * (x - 0.6); }, {0, 1}))->size() == 2);
  CHECK(answer(find_all_roots([](double x) { return x + 1; }, {0, 1}))->empty());
}

TEST_CASE("a root on a sample is found once", "[root]") {
  const auto roots = find_all_roots([](double x) { return x - 0.5; }, samples(0, 1, 4));
  REQUIRE(answer(roots)->size() == 1);
  CHECK(answer(roots)->front() == 0.5);
}

TEST_CASE("steady states of a stirred tank with a rate maximum", "[root]") {
  // r = k C/(1 + K C)^2, K C0 = 20: (20 - u)(1 + u)^2 = k tau u with u = K C; folds at k tau 75.7621 and 122.2379
  // (criterion of Matsuura and Kato, Chem. Eng. Sci. 22 (1967) 171, from memory; states by the cubic, recomputed).
  const auto [k_tau, states] = GENERATE(table<double, std::vector<double>>({
      {60, {16.822333}},
      {76, {1.0, 1.271584, 15.728416}},
      {90, {0.467194, 2.931933, 14.600873}},
      {110, {0.304852, 5.287522, 12.407626}},
      {125, {0.244945}},
  }));
  const auto balance = [k_tau = k_tau](double u) { return (20 - u) * (1 + u) * (1 + u) - k_tau * u; };
  const int cells = GENERATE(16, 64);
  const auto roots = find_all_roots(balance, samples(0, 20, cells));
  REQUIRE(answer(roots) != nullptr);
  REQUIRE(answer(roots)->size() == states.size());
  for (std::size_t i = 0; i < states.size(); ++i) CHECK((*answer(roots))[i] == Approx(states[i]).margin(1e-6));
}

TEST_CASE("a sample without a value is no silent gap", "[root]") {
  const auto roots = find_all_roots([](double x) { return x == 0.25 ? std::nan("") : x - 0.5; }, samples(0, 1, 4));
  CHECK(std::get<NoAnswer>(roots).why == "the function has no value at 0.25");
}

TEST_CASE("a peak lies where calculus puts it", "[root]") {
  // A -> B -> C in a tube: C_B is greatest at ln(k2/k1)/(k2 - k1); O. Levenspiel, Chemical Reaction Engineering, 3rd
  // ed., ch. 8.
  const double k1 = 0.5, k2 = 0.2;
  const auto c = [&](double t) { return k1 / (k2 - k1) * (std::exp(-k1 * t) - std::exp(-k2 * t)); };
  const Peak peak = find_peak(c, 0, 20);
  CHECK(peak.at == Approx(std::log(k2 / k1) / (k2 - k1)).epsilon(1e-7));
  CHECK(peak.value == Approx(std::pow(k1 / k2, k2 / (k2 - k1))).epsilon(1e-14));
}

TEST_CASE("a peak at an end of the range is that end", "[root]") {
  CHECK(find_peak([](double x) { return x; }, 0, 2).at == 2);
  CHECK(find_peak([](double x) { return -x; }, 0, 2).value == 0);
}

TEST_CASE("where there is no value there is no peak", "[root]") {
  const Peak peak = find_peak([](double x) { return x < 0.2 ? std::nan("") : -(x - 0.5) * (x - 0.5); }, 0, 1);
  CHECK(peak.at == Approx(0.5).margin(1e-7));
  CHECK(peak.value == Approx(0).margin(1e-14));
}
