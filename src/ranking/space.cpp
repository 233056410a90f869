#include "space.hpp"

#include <algorithm>
#include <functional>

#include "templates.hpp"
#include "vatwright/ranking/enumerate.hpp"

namespace vatwright {
namespace {

using Counts = std::vector<int>;

// Every way to take k vessels, as counts of each class, in lexical order from the first class on.
void for_each_multiset(const std::vector<std::vector<int>>& classes, int k, Counts& counts, std::size_t from,
                       const std::function<void(const Counts&)>& use) {
  if (k == 0) return use(counts);
  if (from == classes.size()) return;
  const int most = std::min(k, static_cast<int>(classes[from].size()));
  for (int n = most; n >= 0; --n) {
    counts[from] = n;
    for_each_multiset(classes, k - n, counts, from + 1, use);
  }
  counts[from] = 0;
}

}  // namespace

Space list_space(const Twins& twins, const std::vector<int>& offered, int most, long long most_rated) {
  Space space;
  Templates templates;
  const auto& classes = twins.classes();
  const int largest = std::min(most, static_cast<int>(offered.size()));
  for (int k = 1; k <= largest; ++k) {
    // Equal vessels only make the list shorter than this; the cheap bound decides, so that nothing is listed in vain.
    long long choices_left = 0;
    Counts counts(classes.size(), 0);
    const auto each = count_hookups(k);
    bool fits = each.has_value() && *each <= most_rated;
    if (fits) {
      for_each_multiset(classes, k, counts, 0, [&](const Counts&) { ++choices_left; });
      fits = choices_left <= (most_rated - static_cast<long long>(space.hookups.size())) / *each;
    }
    if (!fits) {
      space.whole = false;
      return space;
    }
    for_each_multiset(classes, k, counts, 0, [&](const Counts& taken) {
      Counts pattern;
      std::vector<int> vessel_at;
      for (std::size_t c = 0; c < taken.size(); ++c) {
        if (taken[c] == 0) continue;
        pattern.push_back(taken[c]);
        vessel_at.insert(vessel_at.end(), classes[c].begin(), classes[c].begin() + taken[c]);
      }
      for (const Hookup& t : templates.of(pattern)) {
        Hookup h = sorted_members(relabelled(t, vessel_at));
        if (twins.is_shown(h)) space.hookups.push_back(std::move(h));
      }
    });
    space.sizes = k;
  }
  return space;
}

}  // namespace vatwright
