#include "split_costs.hpp"

#include <algorithm>
#include <numeric>

#include "vatwright/hookup/network.hpp"

namespace vatwright {
namespace {

constexpr double five_points = 0.05;

class SplitCosts {
 public:
  SplitCosts(const Problem& problem, const Hookup& hookup, const Objective& serves, const std::vector<double>& best)
      : problem_(problem), serves_(serves), network_(problem, hookup), best_(best) {
    at_best_ = value(best);
    add(hookup);
  }
  [[nodiscard]] std::vector<SplitCost> told() { return std::move(told_); }

 private:
  std::optional<double> value(const std::vector<double>& shares) {
    const auto outlet = network_.outlet(problem_.duty.target.feed_m3_s, shares);
    const auto* stream = answer(outlet);
    return stream ? value_of(serves_, problem_.duty, *stream) : std::nullopt;
  }

  /// Walks in the order of the text; the answer is the fluid volume inside.
  double add(const Hookup& h) {
    if (h.join == Hookup::Join::vessel) return network_.volumes()[next_vessel_++];
    const bool free =
        h.join == Hookup::Join::beside && std::ranges::none_of(h.shares, [](const auto& s) { return !!s; });
    std::vector<std::size_t> places;
    std::vector<double> volumes;
    SplitCost split;
    for (const Hookup& part : h.parts) {
      if (h.join == Hookup::Join::beside) places.push_back(next_share_++);
      split.branches.push_back(to_text(part, problem_.site, {}));
      volumes.push_back(add(part));
    }
    const double whole = std::accumulate(volumes.begin(), volumes.end(), 0.0);
    if (free && at_best_) {
      for (const std::size_t p : places) split.best.push_back(best_[p]);
      for (const double v : volumes) split.by_volume.push_back(v / whole);
      split.by_volume_costs = cost_of(places, split.by_volume);
      split.off_costs = cost_off(places, split.best);
      told_.push_back(std::move(split));
    }
    return whole;
  }

  std::optional<double> cost_of(const std::vector<std::size_t>& places, const std::vector<double>& shares) {
    std::vector<double> all = best_;
    for (std::size_t i = 0; i < places.size(); ++i) all[places[i]] = shares[i];
    const auto there = value(all);
    return there ? std::optional(std::max(0.0, *at_best_ - *there)) : std::nullopt;
  }

  std::optional<double> cost_off(const std::vector<std::size_t>& places, const std::vector<double>& best) {
    std::optional<double> most;
    for (std::size_t i = 0; i < best.size(); ++i)
      for (const double off : {five_points, -five_points}) {
        std::vector<double> shares = best;
        for (std::size_t k = 0; k < shares.size(); ++k)
          shares[k] += k == i ? off : -off / static_cast<double>(shares.size() - 1);
        if (std::ranges::any_of(shares, [](double s) { return !(s > 0); })) continue;
        if (const auto cost = cost_of(places, shares)) most = std::max(most.value_or(0), *cost);
      }
    return most;
  }

  const Problem& problem_;
  Objective serves_;
  Network network_;
  const std::vector<double>& best_;
  std::optional<double> at_best_;
  std::vector<SplitCost> told_;
  std::size_t next_vessel_ = 0, next_share_ = 0;
};

}  // namespace

std::vector<SplitCost> split_costs(const Problem& problem, const Hookup& hookup, const Objective& serves,
                                   const std::vector<double>& best) {
  return free_shares_of(hookup) == 0 ? std::vector<SplitCost>{} : SplitCosts(problem, hookup, serves, best).told();
}

}  // namespace vatwright
