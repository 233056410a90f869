#include "runaway.hpp"

#include <array>
#include <cmath>
#include <limits>

#include "tube_balance.hpp"
#include "vatwright/numeric/march.hpp"
#include "vatwright/numeric/root.hpp"

namespace vatwright {
namespace {

constexpr double least_share = 0.1, most_share = 2;
constexpr int samples = 24;
constexpr double worth_the_name = 2;

/// ln of the greatest T - T_medium along the way at a share of U; -infinity where it is never above zero.
double ln_rise(Setup setup, double medium_K, double share, double end_s) {
  setup.jacket.UA_W_K *= share;
  setup.jacket.supply_K = medium_K;
  TubeBalance balance(setup, TubeBalance::Coordinate::space_time, 1);
  const auto f = [&](double, std::span<const double> y, std::span<double> dy) { balance(y, dy); };
  const auto by_amounts = [&](double, std::span<const double> y, std::span<double> J) { balance.jacobian(y, J); };
  const Jacobian jacobian(by_amounts);
  const auto scale = balance.scale();
  const auto track = march(f, balance.at_inlet(medium_K), 0, end_s, {.rel_tol = 1e-8, .abs_tol = 1e-10, .scale = scale},
                           {}, &jacobian);
  const Track* path = answer(track);
  if (path == nullptr) return std::numeric_limits<double>::quiet_NaN();
  std::vector<double> y(scale.size());
  const auto rise = [&](double s) {
    path->read(s, y);
    return balance.temperature(y) - medium_K;
  };
  const auto& nodes = path->nodes();
  std::size_t hottest = 0;
  double most = rise(0);
  for (std::size_t k = 1; k < nodes.size(); ++k)
    if (const double here = rise(nodes[k]); here > most) most = here, hottest = k;
  if (hottest > 0 && hottest + 1 < nodes.size())
    most = std::max(most, find_peak(rise, nodes[hottest - 1], nodes[hottest + 1], 1e-7).value);
  return most > 0 ? std::log(most) : -std::numeric_limits<double>::infinity();
}

}  // namespace

double runaway_share(const Setup& setup, double medium_K, double hot_spot_s) {
  const auto at = [&](double ln_share) { return ln_rise(setup, medium_K, std::exp(ln_share), 4 * hot_spot_s); };
  const double lo = std::log(least_share), step = (std::log(most_share) - lo) / samples;
  int steepest = -1;
  double most = worth_the_name, before = at(lo);
  for (int k = 0; k < samples; ++k) {
    const double after = at(lo + step * (k + 1)), answers = (before - after) / step;
    if (std::isfinite(answers) && answers > most) most = answers, steepest = k;
    before = after;
  }
  if (steepest < 0) return 0;
  constexpr double width = 1e-3;
  const auto answers = [&](double ln_share) { return (at(ln_share - width) - at(ln_share + width)) / (2 * width); };
  return std::exp(find_peak(answers, lo + step * (steepest - 0.5), lo + step * (steepest + 1.5), 1e-3).at);
}

}  // namespace vatwright
