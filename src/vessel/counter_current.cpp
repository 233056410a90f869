#include "counter_current.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

#include "vatwright/numeric/root.hpp"
#include "vatwright/thermal/adiabatic.hpp"

namespace vatwright {
namespace {

constexpr int samples = 32;             // of the temperature at which the medium leaves
constexpr double most_mismatch = 1e-8;  // relative to the supply temperature

class Shooting {
 public:
  Shooting(const Setup& setup, double feed_m3_s) : setup_(setup), feed_m3_s_(feed_m3_s) {
    const auto& xi_in = setup.arrives.xi_mol_m3;
    const double supply = setup.jacket.supply_K;
    const auto hottest = adiabatic_range(setup.chemistry, xi_in, std::max(setup.inlet_K, supply));
    const auto coldest = adiabatic_range(setup.chemistry, xi_in, std::min(setup.inlet_K, supply));
    low_ = std::max(1.0, coldest.coldest_K);
    high_ = hottest.warmest_K;
  }

  Outcome<CounterCurrent> run() {
    CounterCurrent found;
    for (const double near : places()) {
      if (const auto leaving = polish(near)) add(*leaving, found);
    }
    found.calls = calls_;
    if (!found.solutions.empty()) return found;
    if (failed_) return *failed_;
    return unsolved("no temperature of the medium at the feed's end brings it to its supply at the far end");
  }

 private:
  using Accuracy = TubeMarch::Accuracy;

  /// About where the mismatch passes zero, by rough marches.
  std::vector<double> places() {
    if (!(high_ > low_)) return {low_};
    std::vector<double> at;
    for (int k = 0; k <= samples; ++k) at.push_back(low_ + (high_ - low_) * k / samples);
    auto roots = find_all_roots([this](double K) { return mismatch(K, Accuracy::rough); }, at, 0, {.rel_tol = 1e-8});
    if (auto* all = std::get_if<std::vector<double>>(&roots)) return std::move(*all);
    if (!failed_) failed_ = std::get<NoAnswer>(roots);
    return {};
  }

  /// The zero by full marches, in a bracket that grows around a rough one.
  std::optional<double> polish(double near) {
    const auto full = [this](double K) { return mismatch(K, Accuracy::full); };
    if (!(high_ > low_)) return near;
    for (double width = 1e-5; width < 1; width *= 8) {
      const double a = near - width * (high_ - low_), b = near + width * (high_ - low_);
      if (!(full(a) * full(b) <= 0)) continue;
      const auto root = find_root(full, a, b, {.rel_tol = 1e-15});
      if (const double* K = answer(root)) return *K;
    }
    return std::nullopt;
  }

  TubeMarch shoot(double leaving_K, Accuracy accuracy) {
    TubeMarch march(TubeBalance(setup_, TubeBalance::Coordinate::length, feed_m3_s_), leaving_K, accuracy);
    // a trial may leave what is possible and come back; only one that runs away is cut short
    const double room = 50 + 3 * (high_ - low_);
    march.keep_medium_within(std::max(low_ / 2, low_ - room), high_ + room);
    march.go_to(1);
    calls_ += march.balance().calls();
    return march;
  }

  /// Of the medium at the far end; where it left its range before that, as far as it got.
  double mismatch(double leaving_K, Accuracy accuracy) {
    const TubeMarch march = shoot(leaving_K, accuracy);
    // a march that freezes on the way shows a medium far too cold
    if (march.failed() && march.balance().temperature(march.state()) < 0.7 * low_) return low_ - high_ - 1;
    if (march.failed() || march.used_up()) {
      if (march.failed()) failed_ = march.failed();
      if (march.used_up()) failed_ = NoAnswer{NoAnswer::Kind::does_not_pass, "the pressure is used up on the way"};
      return std::numeric_limits<double>::quiet_NaN();
    }
    return march.balance().medium(march.state()) - setup_.jacket.supply_K;
  }

  void add(double leaving_K, CounterCurrent& found) {
    TubeMarch march = shoot(leaving_K, Accuracy::full);
    const double off = std::abs(march.balance().medium(march.state()) / setup_.jacket.supply_K - 1);
    if (march.failed() || march.used_up() || march.medium_left() != 0 || !(off <= most_mismatch)) return;
    const auto conversion = [&](const TubeMarch& of) {
      return setup_.chemistry.kinetics.conversion(std::span(of.state()).first(of.balance().extents()));
    };
    const double X = conversion(march);
    const auto at =
        std::ranges::find_if(found.solutions, [&](const auto& other) { return conversion(other.march) > X; });
    found.solutions.insert(at, {std::move(march), off});
  }

  const Setup& setup_;
  double feed_m3_s_, low_ = 0, high_ = 0;
  std::optional<NoAnswer> failed_;
  long calls_ = 0;
};

}  // namespace

Outcome<CounterCurrent> find_counter_current(const Setup& setup, double feed_m3_s) {
  return Shooting(setup, feed_m3_s).run();
}

}  // namespace vatwright
