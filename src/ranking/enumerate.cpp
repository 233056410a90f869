#include "vatwright/ranking/enumerate.hpp"

#include <algorithm>
#include <compare>
#include <map>
#include <numeric>

namespace vatwright {
namespace {

using Join = Hookup::Join;

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

using Counts = std::vector<int>;  // of each class

/// Hookups of classes of equal vessels, leaves numbered by class. A series is its first member, no series itself, and
/// any rest; a beside is its largest branch, no beside itself, and a rest whose branches are no larger: each comes up
/// once.
class Lists {
 public:
  const std::vector<Hookup>& of(const Counts& counts) {
    Made& made = made_of(counts);
    return made.hookups;
  }

 private:
  struct Head {  // of a beside, its largest branch; of others, themselves
    Counts counts;
    std::size_t place = 0;  // in the list of its counts
    friend auto operator<=>(const Head&, const Head&) = default;
  };
  struct Made {
    std::vector<Hookup> hookups;
    std::vector<Head> heads;
  };

  Made& made_of(const Counts& counts) {
    const auto known = made_.find(counts);
    if (known != made_.end()) return known->second;
    Made made;
    const int total = std::accumulate(counts.begin(), counts.end(), 0);
    if (total == 1) {
      made.hookups.push_back(leaf(static_cast<int>(std::find(counts.begin(), counts.end(), 1) - counts.begin())));
      made.heads.push_back({counts, 0});
    } else {
      for (const Join join : {Join::then, Join::beside}) add(made, counts, join);
    }
    return made_.emplace(counts, std::move(made)).first->second;
  }

  void add(Made& made, const Counts& counts, Join join) {
    for_each_part(counts, [&](const Counts& part, const Counts& left) {
      const Made &firsts = made_of(part), &rests = made_of(left);
      for (std::size_t i = 0; i < firsts.hookups.size(); ++i) {
        if (firsts.hookups[i].join == join) continue;
        for (std::size_t k = 0; k < rests.hookups.size(); ++k) {
          if (join == Join::beside && rests.heads[k] > firsts.heads[i]) continue;
          if (join == Join::then)
            made.heads.push_back({counts, made.hookups.size()});
          else
            made.heads.push_back(firsts.heads[i]);
          made.hookups.push_back(joined(join, firsts.hookups[i], rests.hookups[k]));
        }
      }
    });
  }

  // Every part that is neither nothing nor all.
  template <class Use>
  static void for_each_part(const Counts& counts, const Use& use) {
    Counts part(counts.size(), 0), left = counts;
    while (true) {
      std::size_t c = 0;
      while (c < counts.size() && part[c] == counts[c]) {
        left[c] = counts[c];
        part[c++] = 0;
      }
      if (c == counts.size()) return;
      ++part[c];
      --left[c];
      if (part != counts) use(part, left);
    }
  }

  std::map<Counts, Made> made_;
};

int smallest(const Hookup& h) {
  if (h.join == Join::vessel) return h.vessel;
  int least = smallest(h.parts.front());
  for (const Hookup& part : h.parts) least = std::min(least, smallest(part));
  return least;
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

std::vector<Hookup> hookups_of(std::span<const int> vessels) {
  std::vector<Hookup> out;
  for (const Hookup& h : hookups_of_classes(Counts(vessels.size(), 1)))
    out.push_back(sorted_members(relabelled(h, vessels)));
  return out;
}

std::vector<Hookup> hookups_of_classes(const std::vector<int>& counts) {
  std::vector<int> first, class_of(counts.size());
  std::iota(class_of.begin(), class_of.end(), 0);
  int places = 0;
  for (const int n : counts) {
    first.push_back(places);
    places += n;
  }
  std::vector<Hookup> out = Lists().of(counts);
  for (Hookup& h : out) {
    auto next = first;
    number_in_order(h, class_of, next);
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
