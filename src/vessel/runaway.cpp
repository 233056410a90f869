#include "runaway.hpp"

#include <array>
#include <cmath>
#include <limits>
#include <optional>

#include "tube_balance.hpp"
#include "vatwright/numeric/march.hpp"
#include "vatwright/numeric/root.hpp"

namespace vatwright {
namespace {

constexpr double least_share = 0.1, most_share = 2;
constexpr int samples = 24;
constexpr double worth_the_name = 2;

/// One march in V/v with the medium at one temperature and a share of U.
class Trial {
 public:
  Trial(const Setup& setup, double medium_K, double share) : setup_(setup), medium_K_(medium_K) {
    setup_.jacket.UA_W_K *= share;
    setup_.jacket.supply_K = medium_K;
  }

  /// A space time by which the hot spot is well past: the rise has come back to half its greatest, or nothing is left
  /// that could make one.
  double past_hot_spot() {
    double most = 0, end = 1e-3;
    for (int stage = 0; stage < 40; ++stage, end *= 2) {
      const auto track = march_to(end);
      if (!track) return end;
      path_ = &*track;
      const double greatest = greatest_rise(), last = rise(end);
      most = std::max(most, greatest);
      if (stage > 4 && most > 0 && last < most / 2) break;
    }
    return end;
  }

  /// ln of the greatest T - T_medium up to end_s; -infinity where it is never above zero.
  double ln_rise(double end_s) {
    const auto track = march_to(end_s);
    if (!track) return std::numeric_limits<double>::quiet_NaN();
    path_ = &*track;
    const double most = greatest_rise();
    return most > 0 ? std::log(most) : -std::numeric_limits<double>::infinity();
  }

 private:
  std::optional<Track> march_to(double end_s) {
    TubeBalance balance(setup_, TubeBalance::Coordinate::space_time, 1);
    const auto f = [&](double, std::span<const double> y, std::span<double> dy) { balance(y, dy); };
    const auto by_amounts = [&](double, std::span<const double> y, std::span<double> J) { balance.jacobian(y, J); };
    const Jacobian jacobian(by_amounts);
    const auto scale = balance.scale();
    auto track = march(f, balance.at_inlet(medium_K_), 0, end_s, {.rel_tol = 1e-8, .abs_tol = 1e-10, .scale = scale},
                       {}, &jacobian);
    if (std::holds_alternative<NoAnswer>(track)) return std::nullopt;
    return std::get<Track>(std::move(track));
  }
  double rise(double s) const {
    std::vector<double> y(static_cast<std::size_t>(path_->size()));
    path_->read(s, y);
    return y[setup_.capacity.size()] - medium_K_;  // the temperature stands behind the extents
  }
  double greatest_rise() const {
    const auto& nodes = path_->nodes();
    std::size_t hottest = 0;
    double most = rise(0);
    for (std::size_t k = 1; k < nodes.size(); ++k)
      if (const double here = rise(nodes[k]); here > most) most = here, hottest = k;
    if (hottest > 0 && hottest + 1 < nodes.size())
      most = std::max(
          most, find_peak([this](double s) { return rise(s); }, nodes[hottest - 1], nodes[hottest + 1], 1e-7).value);
    return most;
  }

  Setup setup_;
  double medium_K_;
  const Track* path_ = nullptr;
};

}  // namespace

double Runaway::share(double medium_K) {
  const auto kept = [this](int step, double K) {
    const auto [at, is_new] = at_step_.try_emplace(step);
    if (is_new) at->second = share_at(K);
    return at->second;
  };
  if (TubeBalance::serves_all_rates(setup_)) return kept(0, setup_.jacket.supply_K);
  const double steps = medium_K / step_K, below = std::floor(steps), between = steps - below;
  const auto step = static_cast<int>(below);
  return (1 - between) * kept(step, step_K * below) + between * kept(step + 1, step_K * (below + 1));
}

double Runaway::share_at(double medium_K) {
  const double end_s = Trial(setup_, medium_K, 1).past_hot_spot();
  const auto at = [&](double ln_share) { return Trial(setup_, medium_K, std::exp(ln_share)).ln_rise(end_s); };
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
