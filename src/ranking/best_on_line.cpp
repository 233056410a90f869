#include "best_on_line.hpp"

#include <algorithm>
#include <cmath>
#include <functional>
#include <limits>
#include <queue>

#include "vatwright/numeric/root.hpp"

namespace vatwright {
namespace {

constexpr double tie = 2e-9;   // relative: values that differ by less are kept side by side
constexpr double grows = 100;  // where rates rise, what a joint misses grows on the way
constexpr double steep = 0.05;
constexpr double hair = 1e-12;
constexpr double step_down = 0.97;  // of the feed rate, while too few reach the target

using Shape = std::pair<int, int>;  // vessels, free shares

}  // namespace

/// Keeps the best of each shape, and what a newcomer must reach.
class BestOnLine::List final : public Wanted {
 public:
  List(const BestOnLine& best, const BestAsked& asked) : best_(best), asked_(asked) { refresh(); }

  [[nodiscard]] double floor(int fewest, int most) const override {
    if (best_.z_target_) return *best_.z_target_ - missed;
    if (!asked_.by_shape) return least_[0];
    double least = std::numeric_limits<double>::infinity();
    for (int n = fewest; n <= most; ++n) least = std::min(least, least_[static_cast<std::size_t>(n)]);
    return least;
  }

  void found(OnTheLine hookup, Splits& splits) override {
    const double least = threshold(shape(hookup));
    if (!best_.z_target_) {
      if (hookup.z >= least) add({std::move(hookup), hookup.z});
      return;
    }
    const double cap = caps_pass(hookup.hookup, best_.vessels_), z = *best_.z_target_ - missed;
    if (cap < best_.feed_m3_s_ * (1 - hair) || cap < least) return;
    double from = feed_m3_s;
    if (least > from * (1 + hair)) {
      if (splits.best(hookup.hookup, best_.vessels_, 0, least, z).z < z) return;
      from = least;
    }
    double top = ceiling(hookup.hookup, best_.vessels_, *best_.z_target_, from, cap, splits);
    if (-splits.best(hookup.hookup, best_.vessels_, 0, top, 0).dq * top < steep) {
      Splits sharp(best_.line_, told_tolerance);
      top = ceiling(hookup.hookup, best_.vessels_, *best_.z_target_, from, cap, sharp);
    }
    if (top >= least) add({std::move(hookup), top});
  }

  [[nodiscard]] std::unique_ptr<Wanted> part() const override {
    auto other = std::make_unique<List>(best_, asked_);
    other->feed_m3_s = feed_m3_s;
    other->start_ = start_;
    for (const auto& [key, heap] : heaps_) other->start_[key] = std::max(start_of(key), kth(heap));
    other->refresh();
    return other;
  }
  void take(Wanted& part) override {
    for (Placed& p : static_cast<List&>(part).all_) add(std::move(p));
  }

  /// What was found so far sets the thresholds; it will be found again.
  void keep_thresholds() {
    for (const auto& [key, heap] : heaps_) start_[key] = std::max(start_of(key), kth(heap));
    keep_nothing();
  }
  void keep_nothing() {
    heaps_.clear();
    all_.clear();
    refresh();
  }
  [[nodiscard]] std::size_t count() const { return all_.size(); }
  [[nodiscard]] double threshold(const Shape& key) const {
    const auto heap = heaps_.find(key);
    return std::max(start_of(key), heap == heaps_.end() ? asked_.floor : kth(heap->second));
  }
  [[nodiscard]] double threshold() const { return threshold({0, 0}); }

  BestFound told() {
    BestFound out;
    out.complete_above = asked_.by_shape ? asked_.floor : threshold();
    std::erase_if(all_, [&](const Placed& p) { return p.value < threshold(shape(p.at)); });
    std::ranges::stable_sort(all_, std::greater<>(), &Placed::value);
    out.all = std::move(all_);
    return out;
  }

  double feed_m3_s = 0;  ///< of the search that tells what it found

 private:
  using Heap = std::priority_queue<double, std::vector<double>, std::greater<>>;  // the K best, the least on top
  [[nodiscard]] Shape shape(const OnTheLine& h) const {
    return asked_.by_shape ? Shape{h.vessels, h.free_shares} : Shape{0, 0};
  }
  [[nodiscard]] double start_of(const Shape& key) const {
    const auto start = start_.find(key);
    return start == start_.end() ? asked_.floor : start->second;
  }
  [[nodiscard]] double kth(const Heap& heap) const {
    return heap.size() < asked_.places ? asked_.floor : std::max(asked_.floor, nearly(heap.top()));
  }
  [[nodiscard]] double nearly(double value) const {
    return best_.z_target_ ? value * (1 - ceiling_missed) : value * (1 - tie) - missed;
  }
  void add(Placed p) {
    Heap& heap = heaps_[shape(p.at)];
    const double before = heap.size() < asked_.places ? -1 : heap.top();
    heap.push(p.value);
    if (heap.size() > asked_.places) heap.pop();
    all_.push_back(std::move(p));
    if (heap.size() == asked_.places && heap.top() != before) refresh();
  }
  void refresh() {
    least_.assign(static_cast<std::size_t>(asked_.most) + 1, asked_.floor);
    if (!asked_.by_shape) {
      least_[0] = threshold();
      return;
    }
    for (int n = 1; n <= asked_.most; ++n) {
      double least = std::numeric_limits<double>::infinity();
      for (int f = 0; f < n; ++f) least = std::min(least, threshold({n, f}));
      least_[static_cast<std::size_t>(n)] = least;
    }
  }

  const BestOnLine& best_;
  BestAsked asked_;
  std::vector<Placed> all_;
  std::map<Shape, Heap> heaps_;
  std::map<Shape, double> start_;
  std::vector<double> least_;  // by number of vessels; [0]: of all together
};

BestOnLine::BestOnLine(const Line& line, const Bound& bound, const Twins& twins,
                       const std::vector<std::size_t>& classes, const OnLines& vessels, double feed_m3_s,
                       std::optional<double> place_of_target, int threads)
    : line_(line),
      bound_(bound),
      classes_(classes),
      vessels_(vessels),
      search_(line, bound, twins, classes, feed_m3_s),
      feed_m3_s_(feed_m3_s),
      z_target_(place_of_target),
      tolerance_(line.falls() ? missed / 4 : missed / (4 * grows)),
      threads_(threads) {}

double BestOnLine::ceiling(const Hookup& hookup, const OnLines& vessels, double place_of_target, double from_m3_s,
                           double cap_m3_s, Splits& splits) {
  const auto over = [&](double q) {
    const double z = splits.best(hookup, vessels, 0, q, 0).z;
    return z == Splits::no_shares ? -1.0 : z - place_of_target;
  };
  if (over(from_m3_s) < 0) return from_m3_s;  // it is reached there, but for what splits miss
  double lo = from_m3_s, hi = std::min(cap_m3_s, 1.2 * from_m3_s);
  for (int i = 0; over(hi) >= 0; ++i) {
    if (hi >= cap_m3_s) return cap_m3_s;
    lo = hi;
    hi = std::min(cap_m3_s, hi * (i < 4 ? 1.5 : 10));
  }
  const auto root = find_root(over, lo, hi, {.rel_tol = 1e-11, .abs_tol = 0});
  return answer(root) ? *answer(root) : lo;
}

/// Where rates fall trains of the largest vessels give a threshold soonest; elsewhere, or where feed lines forbid them,
/// besides too.
void BestOnLine::first_threshold(const BestAsked& asked, double feed_m3_s, List& list, LineSearch::Cost& cost) const {
  for (const auto members : {LineSearch::Members::vessels, LineSearch::Members::any}) {
    if (members == LineSearch::Members::vessels && !line_.falls()) continue;
    list.keep_nothing();
    cost.add(search_.run_among(static_cast<std::size_t>(asked.most) + 2, members, feed_m3_s, asked.fewest, asked.most,
                               tolerance_, list));
    if (list.count() >= asked.places) return;
  }
}

/// Lowers the feed rate among the largest vessels until enough of their hookups reach the target there.
double BestOnLine::first_ceilings(const BestAsked& asked, List& list, LineSearch::Cost& cost) const {
  double volume = 0;
  std::vector<double> all;
  for (const std::size_t c : classes_) all.push_back(bound_.equivalent_m3(*line_.vessels()[c], feed_m3_s_));
  std::ranges::sort(all, std::greater<>());
  for (std::size_t i = 0; i < all.size() && i < static_cast<std::size_t>(asked.most); ++i) volume += all[i];
  double q = volume / bound_.time(*z_target_);
  const double least = std::max(asked.floor, 1e-6 * q);
  for (int i = 0; q > least && i < 400; ++i) {
    list.feed_m3_s = q;
    first_threshold(asked, q, list, cost);
    if (list.count() >= asked.places) break;
    list.keep_nothing();
    q *= i < 20 ? step_down : 0.8;
  }
  return q;
}

BestFound BestOnLine::find(const BestAsked& asked) const {
  List list(*this, asked);
  LineSearch::Cost cost;
  if (!z_target_) {
    first_threshold(asked, feed_m3_s_, list, cost);
    list.keep_thresholds();
    cost.add(search_.run(feed_m3_s_, asked.fewest, asked.most, tolerance_, threads_, list));
  } else {
    double q = asked.floor;
    if (!asked.by_shape) {
      q = first_ceilings(asked, list, cost);
      list.keep_thresholds();
      q = std::max(list.threshold(), asked.floor);
    }
    const double least = 1e-9 * feed_m3_s_;
    list.feed_m3_s = std::max(q, least);
    cost.add(search_.run(list.feed_m3_s, asked.fewest, asked.most, tolerance_, threads_, list));
  }
  BestFound found = list.told();
  found.cost = cost;
  return found;
}

}  // namespace vatwright
