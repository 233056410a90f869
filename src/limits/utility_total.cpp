#include <algorithm>

#include "build.hpp"
#include "checks.hpp"
#include "vatwright/quantity/show.hpp"

namespace vatwright {

namespace {
Limit draw_against(const Draw& draw, double most_m3_s) {
  const std::string& name = draw.medium->name;
  if (!draw.known)
    return cannot_tell(limit_name::utility_total, "the heat, and so the draw on " + name + ", is not known");
  if (!draw.draw_m3_s) return broken(limit_name::utility_total, "no flow of " + name + " carries the heat");
  return explained(limit_of(limit_name::utility_total, *draw.draw_m3_s, most_m3_s, Side::most, "m3/s"), [&] {
    return show(*draw.draw_m3_s, Shown::feed) + " of " + name + " needed, " + show(most_m3_s, Shown::feed) +
           " can be had";
  });
}

/// Broken before untold before the least room.
bool worse(const Limit& a, const Limit& b) {
  const auto rank = [](const Limit& l) {
    return l.state == Limit::State::broken ? 0 : l.state == Limit::State::cannot_tell ? 1 : 2;
  };
  if (rank(a) != rank(b)) return rank(a) < rank(b);
  return a.search_margin && b.search_margin && *a.search_margin < *b.search_margin;
}

/// The draws on one medium as one; a draw that is not to be had, or not known, makes the sum so.
std::vector<Draw> summed(const std::vector<Draw>& draws) {
  std::vector<Draw> sums;
  for (const Draw& draw : draws) {
    const auto at = std::find_if(sums.begin(), sums.end(), [&](const Draw& s) { return s.medium == draw.medium; });
    if (at == sums.end()) {
      sums.push_back(draw);
      continue;
    }
    at->known = at->known && draw.known;
    if (at->draw_m3_s && draw.draw_m3_s) {
      *at->draw_m3_s += *draw.draw_m3_s;
    } else {
      at->draw_m3_s.reset();
    }
  }
  return sums;
}
}  // namespace

std::optional<Limit> check_utility_total(const LimitInput& input) {
  const auto draw = draw_of(input);
  if (!draw) return std::nullopt;
  std::optional<double> most;
  if (input.stands == Stands::alone) most = draw->medium->total_m3_s;
  // a held tube's flux counts the medium at its supply temperature, so its flow is looked at here
  const bool tube = !std::holds_alternative<StirredTank>(input.vessel.kind);
  if (tube && draw->medium->flow_m3_s)
    most = std::min(most.value_or(*draw->medium->flow_m3_s), *draw->medium->flow_m3_s);
  if (!most) return std::nullopt;
  return draw_against(*draw, *most);
}

std::optional<Limit> check_utility_totals(const std::vector<Draw>& draws) {
  std::optional<Limit> worst;
  for (const Draw& sum : summed(draws)) {
    if (!sum.medium->total_m3_s) continue;
    const Limit limit = draw_against(sum, *sum.medium->total_m3_s);
    if (!worst || worse(limit, *worst)) worst = limit;
  }
  return worst;
}

}  // namespace vatwright
