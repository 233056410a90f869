#include "vatwright/ranking/twins.hpp"

#include <algorithm>
#include <map>
#include <set>

#include "same_vessel.hpp"
#include "vatwright/ranking/enumerate.hpp"

namespace vatwright {
namespace {

using Join = Hookup::Join;

bool looks_inside(const Duty& duty) {
  const Feed& feed = duty.chemistry.feed;
  if (feed.phase != Phase::liquid || duty.thermal != Thermal::hold) return true;
  if (heat_knowledge(duty.chemistry).state != HeatKnowledge::State::not_asked) return true;
  const auto boiling = duty.limits.boiling;
  if (boiling == ProductLimits::Boiling::forbid) return true;
  return boiling == ProductLimits::Boiling::unsaid &&
         std::any_of(feed.species.begin(), feed.species.end(), [](const Species& s) { return s.antoine.has_value(); });
}

bool per_fluid(const Kinetics& k) {
  for (int j = 0; j < k.reactions(); ++j) {
    const auto* law = std::get_if<RateLaw>(&k.reaction(j).forward);
    if (law && law->per != Per::fluid && law->per != Per::unsaid) return false;
  }
  return true;
}

// Members of a beside by smallest vessel, each with its shares: the labelled hookup, whatever the order it was written
// in.
Hookup ordered(Hookup h) {
  for (Hookup& part : h.parts) part = ordered(std::move(part));
  if (h.join != Join::beside) return h;
  std::vector<std::size_t> order(h.parts.size());
  for (std::size_t i = 0; i < order.size(); ++i) order[i] = i;
  const auto least = [](const Hookup& part) {
    const auto v = vessels_of(part);
    return *std::min_element(v.begin(), v.end());
  };
  std::stable_sort(order.begin(), order.end(),
                   [&](std::size_t a, std::size_t b) { return least(h.parts[a]) < least(h.parts[b]); });
  Hookup out = h;
  for (std::size_t i = 0; i < order.size(); ++i) {
    out.parts[i] = h.parts[order[i]];
    out.shares[i] = h.shares[order[i]];
  }
  return out;
}

Hookup without_shares(Hookup h) {
  for (auto& share : h.shares) share.reset();
  for (Hookup& part : h.parts) part = without_shares(std::move(part));
  return h;
}

}  // namespace

Twins::Twins(const Problem& problem, const std::vector<int>& offered, bool tubes_split_evenly)
    : problem_(problem), class_of_(problem.site.vessels.size(), -1), tubes_split_evenly_(tubes_split_evenly) {
  nothing_looks_inside_ = !looks_inside(problem.duty) && per_fluid(problem.duty.chemistry.kinetics);
  const auto& vessels = problem.site.vessels;
  for (const int v : offered) {
    const Vessel& vessel = vessels[static_cast<std::size_t>(v)];
    const auto like = std::find_if(classes_.begin(), classes_.end(), [&](const std::vector<int>& c) {
      return same_but_name(problem.duty, vessels[static_cast<std::size_t>(c.front())], vessel);
    });
    class_of_[static_cast<std::size_t>(v)] = static_cast<int>(like - classes_.begin());
    if (like == classes_.end())
      classes_.push_back({v});
    else
      like->push_back(v);
  }
}

bool Twins::plain_held_tube(int vessel) const {
  const Vessel& v = problem_.site.vessels[static_cast<std::size_t>(vessel)];
  const Operation operation = operation_of(problem_.duty, v);
  const bool pressure_counts = problem_.duty.chemistry.feed.viscosity_Pa_s && v.pressure_Pa;
  return std::holds_alternative<Tube>(v.kind) && !operation.pressure_Pa && !pressure_counts;
}

bool Twins::exchange_in_series(int a, int b) const {
  if (!nothing_looks_inside_ || !plain_held_tube(a) || !plain_held_tube(b)) return false;
  const auto& vessels = problem_.site.vessels;
  return operation_of(problem_.duty, vessels[static_cast<std::size_t>(a)]).hold_K ==
         operation_of(problem_.duty, vessels[static_cast<std::size_t>(b)]).hold_K;
}

bool Twins::same_beside(int a, int b) const {
  const auto& vessels = problem_.site.vessels;
  return tubes_split_evenly_ && exchange_in_series(a, b) && !vessels[static_cast<std::size_t>(a)].feed_line_m3_s &&
         !vessels[static_cast<std::size_t>(b)].feed_line_m3_s;
}

std::vector<int> Twins::tubes_alone(const Hookup& hookup, std::span<const int> vessel_at) const {
  std::vector<int> all = vessels_of(hookup);
  if (!vessel_at.empty())
    for (int& v : all) v = vessel_at[static_cast<std::size_t>(v)];
  for (const int v : all)
    if (!same_beside(all.front(), v)) return {};
  return all;
}

bool Twins::is_shown(const Hookup& hookup, std::span<const int> vessel_at) const {
  const auto vessel = [&](const Hookup& leaf) {
    return vessel_at.empty() ? leaf.vessel : vessel_at[static_cast<std::size_t>(leaf.vessel)];
  };
  std::vector<int> alone;  // the first tube of every branch of tubes so far
  for (std::size_t i = 0; i < hookup.parts.size(); ++i) {
    if (!is_shown(hookup.parts[i], vessel_at)) return false;
    if (hookup.join == Join::beside && tubes_split_evenly_) {
      const auto tubes = tubes_alone(hookup.parts[i], vessel_at);
      if (tubes.empty()) continue;
      for (const int other : alone)
        if (same_beside(other, tubes.front())) return false;
      alone.push_back(tubes.front());
    }
    if (hookup.join != Join::then || i == 0) continue;
    const Hookup &a = hookup.parts[i - 1], &b = hookup.parts[i];
    if (a.join != Join::vessel || b.join != Join::vessel || !exchange_in_series(vessel(a), vessel(b))) continue;
    if (class_of(vessel(a)) > class_of(vessel(b))) return false;
  }
  return true;
}

// Branches of tubes beside each other become one branch, a series of them all.
Hookup Twins::tubes_in_series(Hookup hookup) const {
  for (Hookup& part : hookup.parts) part = tubes_in_series(std::move(part));
  Hookup out = hookup;
  out.parts.clear();
  out.shares.clear();
  std::vector<std::pair<int, std::size_t>> branches;  // of tubes alone: their first, and where they stand in `out`
  for (Hookup& part : hookup.parts) {
    if (hookup.join == Join::beside) {
      const auto tubes = tubes_alone(part, {});
      const auto like = std::find_if(branches.begin(), branches.end(), [&](const auto& branch) {
        return !tubes.empty() && same_beside(branch.first, tubes.front());
      });
      if (like != branches.end()) {
        Hookup& run = out.parts[like->second];
        if (run.join == Join::vessel) run = Hookup{Join::then, -1, {run}, {}};
        for (const int v : tubes) run.parts.push_back({Join::vessel, v, {}, {}});
        continue;
      }
      if (!tubes.empty()) branches.emplace_back(tubes.front(), out.parts.size());
      out.parts.push_back(std::move(part));
    } else if (part.join == Join::then && hookup.join == Join::then) {
      out.parts.insert(out.parts.end(), part.parts.begin(), part.parts.end());
    } else {
      out.parts.push_back(std::move(part));
    }
  }
  if (hookup.join == Join::beside) out.shares.assign(out.parts.size(), std::nullopt);
  return out.parts.size() == 1 ? out.parts.front() : out;
}

Hookup Twins::runs_sorted(Hookup hookup) const {
  for (Hookup& part : hookup.parts) part = runs_sorted(std::move(part));
  if (hookup.join != Join::then) return hookup;
  for (auto from = hookup.parts.begin(); from != hookup.parts.end();) {
    auto to = from + 1;
    while (to != hookup.parts.end() && from->join == Join::vessel && to->join == Join::vessel &&
           exchange_in_series(from->vessel, to->vessel)) {
      ++to;
    }
    std::stable_sort(from, to, [&](const Hookup& a, const Hookup& b) {
      return to - from > 1 && std::pair(class_of(a.vessel), a.vessel) < std::pair(class_of(b.vessel), b.vessel);
    });
    from = to;
  }
  return hookup;
}

std::vector<std::string> Twins::same_as(const Hookup& hookup, const std::vector<double>& shares) const {
  const Site& site = problem_.site;
  const Hookup shown = shares.empty() ? hookup : with_shares(hookup, shares);
  const auto name = [&](const Hookup& h) { return to_text(without_shares(ordered(h)), site, {}); };
  std::map<std::string, std::string> found = {{name(shown), to_text(shown, site, {})}};
  std::vector<Hookup> open = {shown};
  const auto add = [&](Hookup h) {
    h = ordered(std::move(h));
    if (found.emplace(name(h), to_text(h, site, {})).second) open.push_back(std::move(h));
  };
  if (tubes_split_evenly_)
    for (Hookup& h : expansions(shown)) add(normal_form(std::move(h)));
  // Every exchange of two equals, and of two neighbours in a run, reaches all in the end.
  while (!open.empty()) {
    const Hookup now = std::move(open.back());
    open.pop_back();
    for (const int v : vessels_of(now)) {
      for (const int twin : classes_[static_cast<std::size_t>(class_of(v))]) {
        if (twin == v) continue;
        std::vector<int> to(site.vessels.size());
        for (std::size_t i = 0; i < to.size(); ++i) to[i] = static_cast<int>(i);
        std::swap(to[static_cast<std::size_t>(v)], to[static_cast<std::size_t>(twin)]);
        add(relabelled(now, to));
      }
    }
    for_each_neighbour_swap(now, add);
  }
  std::vector<std::string> texts;
  for (auto& [key, text] : found) {
    if (key != name(shown)) texts.push_back(std::move(text));
  }
  std::sort(texts.begin(), texts.end());
  return texts;
}

double Twins::tube_volume(const Hookup& tubes) const {
  double sum = 0;
  for (const int v : vessels_of(tubes)) sum += inner_volume(problem_.site.vessels[static_cast<std::size_t>(v)].kind);
  return sum;
}

// Every run of tubes that are the same beside each other, joined in every other way at equal space times.
std::vector<Hookup> Twins::expansions(const Hookup& hookup) const {
  if (hookup.join == Join::vessel) return {hookup};
  std::vector<Hookup> heads = {{hookup.join, -1, {}, hookup.shares}};
  for (std::size_t i = 0; i < hookup.parts.size();) {
    std::size_t to = i + 1;
    std::vector<Hookup> ways;
    const Hookup& first = hookup.parts[i];
    if (hookup.join == Join::then && first.join == Join::vessel) {
      while (to < hookup.parts.size() && hookup.parts[to].join == Join::vessel &&
             same_beside(first.vessel, hookup.parts[to].vessel))
        ++to;
    }
    if (to - i > 1) {
      std::vector<int> run;
      for (std::size_t k = i; k < to; ++k) run.push_back(hookup.parts[k].vessel);
      for (const Hookup& way : hookups_of(run)) ways.push_back(at_equal_times(way));
    } else {
      ways = expansions(first);
    }
    std::vector<Hookup> longer;
    for (const Hookup& head : heads)
      for (const Hookup& way : ways) {
        longer.push_back(head);
        longer.back().parts.push_back(way);
      }
    heads = std::move(longer);
    i = to;
  }
  for (Hookup& h : heads)
    if (h.join == Join::then && h.parts.size() == 1) h = Hookup(h.parts.front());
  return heads;
}

Hookup Twins::at_equal_times(Hookup tubes) const {
  for (Hookup& part : tubes.parts) part = at_equal_times(std::move(part));
  for (std::size_t i = 0; i < tubes.shares.size(); ++i)
    tubes.shares[i] = tube_volume(tubes.parts[i]) / tube_volume(tubes);
  return tubes;
}

void Twins::for_each_neighbour_swap(const Hookup& whole, const std::function<void(Hookup)>& use) const {
  const auto all = vessels_of(whole);
  for (std::size_t i = 0; i + 1 < all.size(); ++i) {
    if (!exchange_in_series(all[i], all[i + 1])) continue;
    std::vector<int> to(problem_.site.vessels.size());
    for (std::size_t k = 0; k < to.size(); ++k) to[k] = static_cast<int>(k);
    std::swap(to[static_cast<std::size_t>(all[i])], to[static_cast<std::size_t>(all[i + 1])]);
    if (neighbours(whole, all[i], all[i + 1])) use(relabelled(whole, to));
  }
}

bool Twins::neighbours(const Hookup& h, int a, int b) {
  for (std::size_t i = 0; i < h.parts.size(); ++i) {
    if (neighbours(h.parts[i], a, b)) return true;
    if (h.join != Join::then || i == 0) continue;
    const Hookup &x = h.parts[i - 1], &y = h.parts[i];
    if (x.join == Join::vessel && y.join == Join::vessel && x.vessel == a && y.vessel == b) return true;
  }
  return false;
}

std::string Twins::key(const Hookup& hookup) const {
  const Hookup h = runs_sorted(tubes_split_evenly_ ? tubes_in_series(hookup) : hookup);
  if (h.join == Join::vessel) return std::to_string(class_of(h.vessel));
  std::vector<std::string> keys;
  for (const Hookup& part : h.parts) keys.push_back(key(part));
  if (h.join == Join::beside) std::sort(keys.begin(), keys.end());
  std::string text = "[";
  for (const auto& k : keys) text += k + (h.join == Join::then ? ">" : "|");
  return text + "]";
}

}  // namespace vatwright
