#include "vatwright/numeric/matrix.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <random>

#include "support/catch.hpp"

using namespace vatwright;

TEST_CASE("a linear system gives back the x that made it", "[matrix]") {
  std::mt19937 random(20);
  std::uniform_real_distribution<double> uniform(-1, 1);
  for (int n = 1; n <= 12; ++n)
    for (int trial = 0; trial < 20; ++trial) {
      const auto size = static_cast<std::size_t>(n);
      std::vector<double> A(size * size), x(size), b(size, 0.0);
      for (double& a : A) a = uniform(random);
      for (double& each : x) each = uniform(random);
      for (std::size_t i = 0; i < size; ++i) A[i * size + i] += 3;  // far from singular
      for (std::size_t i = 0; i < size; ++i)
        for (std::size_t j = 0; j < size; ++j) b[i] += A[i * size + j] * x[j];
      REQUIRE(solve_linear(A, b));
      for (std::size_t i = 0; i < size; ++i) CHECK(b[i] == Approx(x[i]).margin(1e-12));
    }
}

TEST_CASE("a system that needs a swap of rows is solved, a singular one is not", "[matrix]") {
  std::vector<double> A{0, 1, 2, 0}, b{3, 4};
  REQUIRE(solve_linear(A, b));
  CHECK(b[0] == 2);
  CHECK(b[1] == 3);
  std::vector<double> singular{1, 2, 2, 4}, c{1, 1};
  CHECK_FALSE(solve_linear(singular, c));
  std::vector<double> broken{std::nan(""), 1, 1, 1}, d{1, 1};
  CHECK_FALSE(solve_linear(broken, d));
}

TEST_CASE("eigenvalues agree with closed forms", "[matrix]") {
  const std::vector<double> turn{0, -2, 2, 0};  // +-2i
  auto pair = eigenvalues(turn, 2);
  REQUIRE(pair.size() == 2);
  CHECK(std::abs(pair[0].real()) < 1e-14);
  CHECK(std::abs(pair[0].imag()) == Approx(2));
  // -1, 2 and -1 on the three diagonals: 2 - 2 cos(pi k/(n + 1))
  const std::vector<double> chain{2, -1, 0, -1, 2, -1, 0, -1, 2};
  auto three = eigenvalues(chain, 3);
  REQUIRE(three.size() == 3);
  std::ranges::sort(three, {}, [](auto z) { return z.real(); });
  CHECK(three[0].real() == Approx(2 - std::sqrt(2.0)));
  CHECK(three[1].real() == Approx(2));
  CHECK(three[2].real() == Approx(2 + std::sqrt(2.0)));
}

TEST_CASE("no eigenvalues of what is not finite", "[matrix]") {
  const std::vector<double> broken{1, std::numeric_limits<double>::infinity(), 0, 1};
  CHECK(eigenvalues(broken, 2).empty());
}

TEST_CASE("the rank counts independent reactions", "[matrix]") {
  // Columns A -> B, B -> C, A -> C over species A, B, C: the third is the sum of the others.
  CHECK(rank_of(std::vector<double>{-1, 0, -1, 1, -1, 0, 0, 1, 1}, 3, 3) == 2);
  CHECK(rank_of(std::vector<double>{1, 2, 3, 2, 4, 6}, 2, 3) == 1);
  CHECK(rank_of(std::vector<double>{0, 0, 0, 0}, 2, 2) == 0);
  CHECK(rank_of(std::vector<double>{1e-6, 0, 0, 1e6}, 2, 2) == 1);  // below the threshold of 1e-10, as told
  CHECK(rank_of(std::vector<double>{}, 0, 0) == 0);
}
