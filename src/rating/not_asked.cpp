#include <algorithm>

#include "vatwright/rating/rating.hpp"

namespace vatwright {

namespace {
/// "pressure drop of P-11, P-12": vessels that leave a limit out; empty where none does.
template <class Silent>
std::string of_vessels(const std::string& what, const Site& site, const Silent& silent) {
  std::string tags;
  for (const Vessel& vessel : site.vessels) {
    if (silent(vessel)) tags += (tags.empty() ? "" : ", ") + vessel.tag;
  }
  return tags.empty() ? tags : what + " of " + tags;
}

bool boiling_is_asked(const Duty& duty) {
  const Feed& feed = duty.chemistry.feed;
  if (feed.phase != Phase::liquid) return false;
  switch (duty.limits.boiling) {
    case ProductLimits::Boiling::forbid:
    case ProductLimits::Boiling::at:
      return true;
    case ProductLimits::Boiling::ignore:
      return false;
    case ProductLimits::Boiling::unsaid:
      break;
  }
  return !feed.unnamed_solvent && feed.amounts == Amounts::moles &&
         std::all_of(feed.species.begin(), feed.species.end(),
                     [](const Species& s) { return !s.is_volatile || s.antoine; });
}

void add(std::vector<std::string>& list, const std::string& text) {
  if (!text.empty() && std::find(list.begin(), list.end(), text) == list.end()) list.push_back(text);
}

void add_of_product(std::vector<std::string>& list, const Duty& duty) {
  const ProductLimits& limits = duty.limits;
  if (heat_knowledge(duty.chemistry).state == HeatKnowledge::State::not_asked) add(list, "heat");
  if (!limits.coldest_K && !limits.hottest_K) add(list, "product temperature");
  if (limits.wetted.empty()) add(list, "wetted materials of the product");
  if (duty.chemistry.feed.phase == Phase::liquid && !boiling_is_asked(duty)) add(list, "boiling");
  if (!limits.decomposition_K) add(list, "decomposition");
}

void add_of_vessels(std::vector<std::string>& list, const Site& site) {
  const auto tube = [](const Vessel& v) { return !std::holds_alternative<StirredTank>(v.kind); };
  add(list, of_vessels("pressure rating", site, [](const Vessel& v) { return !v.pressure_Pa; }));
  add(list, of_vessels("temperature rating", site, [](const Vessel& v) { return !v.temperature_K; }));
  add(list, of_vessels("pressure drop", site, [&](const Vessel& v) { return tube(v) && !v.pressure_drop_Pa; }));
  add(list, of_vessels("feed line", site, [](const Vessel& v) { return !v.feed_line_m3_s; }));
}
}  // namespace

std::vector<std::string> not_asked(const Problem& problem) {
  std::vector<std::string> list;
  add_of_product(list, problem.duty);
  add_of_vessels(list, problem.site);
  for (const auto& text : problem.not_asked) add(list, text);
  return list;
}

}  // namespace vatwright
