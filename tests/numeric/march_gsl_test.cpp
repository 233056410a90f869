// Random smooth systems against the GNU Scientific Library, which the product does not use. Without the library this
// file is empty, and the build says so.
#include "support/catch.hpp"

#if __has_include(<gsl/gsl_odeiv2.h>)
#include <gsl/gsl_errno.h>
#include <gsl/gsl_odeiv2.h>

#include <cmath>
#include <random>

#include "vatwright/numeric/march.hpp"

using namespace vatwright;

namespace {

/// dy_i/dt = sum_j a_ij sin(y_j) + sum_jk b_ijk y_j y_k/(1 + y_j^2 + y_k^2) + c_i cos(w_i t) - d_i y_i: smooth and
/// bounded.
struct RandomSystem {
  std::size_t n;
  std::vector<double> a, b, c, w, d, y0;

  explicit RandomSystem(unsigned seed, double fastest) {
    std::mt19937 random(seed);
    std::uniform_real_distribution<double> uniform(-1, 1);
    n = 1 + seed % 6;
    const auto fill = [&](std::vector<double>& v, std::size_t size) {
      v.resize(size);
      for (double& each : v) each = uniform(random);
    };
    fill(a, n * n);
    fill(b, n * n * n);
    fill(c, n);
    fill(w, n);
    fill(d, n);
    fill(y0, n);
    for (double& each : d) each = std::pow(fastest, std::abs(each));
  }

  void operator()(double t, const double* y, double* dydt) const {
    for (std::size_t i = 0; i < n; ++i) {
      double sum = c[i] * std::cos(w[i] * t) - d[i] * y[i];
      for (std::size_t j = 0; j < n; ++j) {
        sum += a[i * n + j] * std::sin(y[j]);
        for (std::size_t k = 0; k < n; ++k)
          sum += b[(i * n + j) * n + k] * y[j] * y[k] / (1 + y[j] * y[j] + y[k] * y[k]);
      }
      dydt[i] = sum;
    }
  }
};

int as_gsl(double t, const double y[], double dydt[], void* system) {
  (*static_cast<const RandomSystem*>(system))(t, y, dydt);
  return GSL_SUCCESS;
}

std::vector<double> by_gsl(const RandomSystem& system, double t1, int places, std::size_t n) {
  gsl_odeiv2_system description{as_gsl, nullptr, n, const_cast<RandomSystem*>(&system)};
  gsl_odeiv2_driver* driver = gsl_odeiv2_driver_alloc_y_new(&description, gsl_odeiv2_step_rk8pd, 1e-3, 1e-13, 1e-13);
  std::vector<double> y(system.y0), all;
  double t = 0;
  for (int i = 1; i <= places; ++i) {
    if (gsl_odeiv2_driver_apply(driver, &t, t1 * i / places, y.data()) != GSL_SUCCESS) return {};
    all.insert(all.end(), y.begin(), y.end());
  }
  gsl_odeiv2_driver_free(driver);
  return all;
}

double largest_difference(unsigned seed, double fastest, double t1) {
  const RandomSystem system(seed, fastest);
  const auto f = [&](double t, std::span<const double> y, std::span<double> d) { system(t, y.data(), d.data()); };
  constexpr int places = 7;
  const auto expected = by_gsl(system, t1, places, system.n);
  REQUIRE(expected.size() == places * system.n);
  const auto track = march(f, system.y0, 0, t1);
  REQUIRE(answer(track) != nullptr);
  std::vector<double> y(system.n);
  double worst = 0;
  for (int i = 1; i <= places; ++i) {
    answer(track)->read(t1 * i / places, y);
    for (std::size_t k = 0; k < system.n; ++k) {
      const double reference = expected[static_cast<std::size_t>(i - 1) * system.n + k];
      worst = std::max(worst, std::abs(y[k] - reference) / (1 + std::abs(reference)));
    }
  }
  return worst;
}

}  // namespace

TEST_CASE("240 random smooth systems agree with another library to 1e-8", "[march][gsl]") {
  for (unsigned seed = 1; seed <= 240; ++seed) {
    INFO("seed " << seed);
    CHECK(largest_difference(seed, 3, 5) < 1e-8);
  }
}

TEST_CASE("60 random systems with a fast decay agree with another library to 1e-8", "[march][gsl][stiff]") {
  for (unsigned seed = 1; seed <= 60; ++seed) {
    INFO("seed " << seed);
    CHECK(largest_difference(1000 + seed, 300, 5) < 1e-8);
  }
}
#endif
