#include "order.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <numeric>
#include <tuple>

namespace vatwright {
namespace {

constexpr double none = -std::numeric_limits<double>::infinity();

// What is equal by algebra differs by rounding: the ninth digit is the last that counts, then the text decides.
double nine_digits(double figure) {
  if (figure == 0 || !std::isfinite(figure)) return figure;
  const double unit = std::pow(10.0, std::floor(std::log10(std::abs(figure))) - 8);
  return std::round(figure / unit) * unit;
}

struct Key {
  int before = 0;
  double figure = none;
  int group = 0;
};

// Sorted by what stands before and the figure: a group runs down from its best.
void number_groups(std::vector<Key>& keys, const std::vector<std::size_t>& sorted) {
  const Key* best = nullptr;
  int group = 0;
  for (const std::size_t i : sorted) {
    Key& key = keys[i];
    const bool same = best && best->before == key.before &&
                      (key.figure == best->figure || key.figure >= best->figure - as_good_as * std::abs(best->figure));
    if (!same) {
      best = &key;
      ++group;
    }
    key.group = group;
  }
}

}  // namespace

double figure_of(const Entry& entry, By by) {
  if (!by_ceiling(by)) return entry.reach.value_or(none);
  if (!entry.ceiling) return none;
  return entry.ceiling->open ? -none : entry.ceiling->feed_m3_s.value_or(none);
}

std::optional<double> value_of(const Entry& entry, By by) {
  const double figure = figure_of(entry, by);
  return std::isfinite(figure) ? std::optional(figure) : std::nullopt;
}

int rank_before_figure(const Entry& entry, const RankOptions& options) {
  const int broken = entry.breaks_limit ? 1 : 0;
  if (options.by != By::fit) return broken;
  constexpr int most_vessels = 1000;
  const int verdict = entry.verdict == Verdict::fits ? 0 : entry.verdict == Verdict::cannot_tell ? 1 : 2;
  return (3 * broken + verdict) * most_vessels + (options.exact ? 0 : entry.vessel_count);
}

std::vector<std::size_t> in_order(const std::vector<Entry>& entries, const RankOptions& options) {
  std::vector<Key> keys(entries.size());
  for (std::size_t i = 0; i < keys.size(); ++i) {
    keys[i] = {rank_before_figure(entries[i], options), nine_digits(figure_of(entries[i], options.by)), 0};
  }
  std::vector<std::size_t> order(entries.size());
  std::iota(order.begin(), order.end(), std::size_t(0));
  const auto by_figure = [&](std::size_t a, std::size_t b) {
    if (keys[a].before != keys[b].before) return keys[a].before < keys[b].before;
    if (keys[a].figure != keys[b].figure) return keys[a].figure > keys[b].figure;
    return entries[a].text < entries[b].text;
  };
  std::sort(order.begin(), order.end(), by_figure);
  if (options.exact) return order;
  number_groups(keys, order);
  std::stable_sort(order.begin(), order.end(), [&](std::size_t a, std::size_t b) {
    const Entry &x = entries[a], &y = entries[b];
    return std::tuple(keys[a].group, x.vessel_count, x.free_shares) <
           std::tuple(keys[b].group, y.vessel_count, y.free_shares);
  });
  return order;
}

}  // namespace vatwright
