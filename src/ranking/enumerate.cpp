#include "vatwright/ranking/enumerate.hpp"

#include <algorithm>
#include <numeric>
#include <set>
#include <string>

namespace vatwright {
namespace {

using Join = Hookup::Join;
using Vessels = std::vector<int>;

Hookup leaf(int vessel) {
  Hookup h;
  h.vessel = vessel;
  return h;
}

// `first`, joined before `rest`: the members of a rest of the same kind follow it in the same group.
Hookup joined(Join join, const Hookup& first, const Hookup& rest) {
  Hookup h;
  h.join = join;
  h.parts.push_back(first);
  if (rest.join == join)
    h.parts.insert(h.parts.end(), rest.parts.begin(), rest.parts.end());
  else
    h.parts.push_back(rest);
  if (join == Join::beside) h.shares.assign(h.parts.size(), std::nullopt);
  return h;
}

// Calls use(chosen, left) for every split of `all` into two non-empty sets; with_first: the first is always chosen.
template <class Use>
void for_each_split(const Vessels& all, bool with_first, const Use& use) {
  const std::size_t every = std::size_t(1) << all.size();
  for (std::size_t mask = 1; mask + 1 < every; ++mask) {
    if (with_first && (mask & 1u) == 0) continue;
    Vessels chosen, left;
    for (std::size_t i = 0; i < all.size(); ++i) ((mask >> i) & 1u ? chosen : left).push_back(all[i]);
    use(chosen, left);
  }
}

std::vector<Hookup> all_of(const Vessels& vessels);

std::vector<Hookup> headed(const Vessels& vessels, Join join) {
  std::vector<Hookup> out;
  for_each_split(vessels, join == Join::beside, [&](const Vessels& chosen, const Vessels& left) {
    const auto rests = all_of(left);
    for (const Hookup& first : all_of(chosen)) {
      if (first.join == join) continue;  // a first member is never a group of the same kind: each hookup once
      for (const Hookup& rest : rests) out.push_back(joined(join, first, rest));
    }
  });
  return out;
}

std::vector<Hookup> all_of(const Vessels& vessels) {
  if (vessels.size() == 1) return {leaf(vessels.front())};
  auto out = headed(vessels, Join::then);
  auto besides = headed(vessels, Join::beside);
  std::move(besides.begin(), besides.end(), std::back_inserter(out));
  return out;
}

int smallest(const Hookup& h) {
  if (h.join == Join::vessel) return h.vessel;
  int least = smallest(h.parts.front());
  for (const Hookup& part : h.parts) least = std::min(least, smallest(part));
  return least;
}

// The text of a hookup by class, members of a beside sorted: equal exactly where two differ by exchange of equals.
std::string class_key(const Hookup& h, const std::vector<int>& class_of) {
  if (h.join == Join::vessel) return std::to_string(class_of[static_cast<std::size_t>(h.vessel)]);
  std::vector<std::string> keys;
  for (const Hookup& part : h.parts) keys.push_back(class_key(part, class_of));
  if (h.join == Join::beside) std::sort(keys.begin(), keys.end());
  std::string key = "[";
  for (const auto& k : keys) key += k + (h.join == Join::then ? ">" : "|");
  return key + "]";
}

// Places of one class rise in the order of the text.
void number_in_order(Hookup& h, const std::vector<int>& class_of, std::vector<int>& next) {
  if (h.join == Join::vessel) {
    h.vessel = next[static_cast<std::size_t>(class_of[static_cast<std::size_t>(h.vessel)])]++;
    return;
  }
  for (Hookup& part : h.parts) number_in_order(part, class_of, next);
}

}  // namespace

std::vector<Hookup> hookups_of(std::span<const int> vessels) { return all_of({vessels.begin(), vessels.end()}); }

std::vector<Hookup> hookups_of_classes(const std::vector<int>& counts) {
  std::vector<int> class_of, first;
  for (std::size_t c = 0; c < counts.size(); ++c) {
    first.push_back(static_cast<int>(class_of.size()));
    class_of.insert(class_of.end(), static_cast<std::size_t>(counts[c]), static_cast<int>(c));
  }
  std::vector<int> places(class_of.size());
  std::iota(places.begin(), places.end(), 0);
  const bool all_differ = class_of.size() == counts.size();
  std::vector<Hookup> out;
  std::set<std::string> seen;  // of one pattern of equals, made once for all choices of vessels
  for (Hookup& h : all_of(places)) {
    if (!all_differ && !seen.insert(class_key(h, class_of)).second) continue;
    auto next = first;
    number_in_order(h, class_of, next);
    out.push_back(std::move(h));
  }
  return out;
}

std::vector<std::vector<int>> choices(int n, int k) {
  std::vector<std::vector<int>> out;
  std::vector<int> now(static_cast<std::size_t>(k));
  std::iota(now.begin(), now.end(), 0);
  while (k <= n) {
    out.push_back(now);
    int i = k - 1;
    while (i >= 0 && now[static_cast<std::size_t>(i)] == n - k + i) --i;
    if (i < 0) break;
    ++now[static_cast<std::size_t>(i)];
    for (int j = i + 1; j < k; ++j) now[static_cast<std::size_t>(j)] = now[static_cast<std::size_t>(j - 1)] + 1;
  }
  return out;
}

Hookup sorted_members(Hookup hookup) {
  for (Hookup& part : hookup.parts) part = sorted_members(std::move(part));
  if (hookup.join == Join::beside) {
    std::sort(hookup.parts.begin(), hookup.parts.end(),
              [](const Hookup& a, const Hookup& b) { return smallest(a) < smallest(b); });
  }
  return hookup;
}

Hookup relabelled(const Hookup& hookup, std::span<const int> to) {
  Hookup out = hookup;
  if (out.join == Join::vessel) out.vessel = to[static_cast<std::size_t>(out.vessel)];
  for (Hookup& part : out.parts) part = relabelled(part, to);
  return out;
}

}  // namespace vatwright
