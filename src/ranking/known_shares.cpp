#include "known_shares.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

#include "splits.hpp"
#include "vatwright/hookup/share_space.hpp"

namespace vatwright {
namespace {

/// In proportion to what the feed lines of every branch pass: where some pass anything, evenly over those.
void add_shares_by_cap(const Hookup& hookup, const OnLines& vessels, std::vector<double>& shares) {
  std::vector<double> caps;
  double sum = 0;
  for (const Hookup& part : hookup.parts) sum += caps.emplace_back(caps_pass(part, vessels));
  if (!std::isfinite(sum)) {
    for (double& cap : caps) cap = std::isfinite(cap) ? 0 : 1;
    sum = static_cast<double>(std::ranges::count(caps, 1.0));
    for (double& cap : caps) cap = (cap + least_share * sum) / (1 + least_share * static_cast<double>(caps.size()));
  }
  for (std::size_t i = 0; i < hookup.parts.size(); ++i) {
    if (hookup.join == Hookup::Join::beside) shares.push_back(caps[i] / sum);
    add_shares_by_cap(hookup.parts[i], vessels, shares);
  }
}

}  // namespace

OnLines on_lines(const Line& line, const Twins& twins, std::size_t vessels_of_site) {
  OnLines all(vessels_of_site, nullptr);
  for (std::size_t c = 0; c < twins.classes().size(); ++c)
    for (const int v : twins.classes()[c])
      if (const auto& on_line = line.vessels()[c]) all[static_cast<std::size_t>(v)] = &*on_line;
  return all;
}

KnownShares shares_on(const Line& line, const OnLines& vessels, const Hookup& hookup) {
  return [&line, &vessels, hookup](double feed_m3_s, Purpose purpose) -> std::optional<std::vector<double>> {
    Splits splits(line, told_tolerance);
    const Line::Out out = splits.best(hookup, vessels, 0, feed_m3_s, 0);
    if (!std::isfinite(out.z)) return std::nullopt;
    if (out.z != Splits::no_shares) return splits.shares(hookup, vessels, 0, feed_m3_s);
    std::vector<double> shares;
    if (purpose == Purpose::window) {
      add_shares_by_cap(hookup, vessels, shares);
      return shares;
    }
    std::vector<Line::OnLine> wide(vessels.size());
    OnLines wide_vessels(vessels.size(), nullptr);
    for (std::size_t v = 0; v < vessels.size(); ++v) {
      if (vessels[v] == nullptr) continue;
      wide[v] = *vessels[v];
      wide[v].cap_m3_s = std::numeric_limits<double>::infinity();
      wide_vessels[v] = &wide[v];
    }
    return splits.shares(hookup, wide_vessels, 0, feed_m3_s);
  };
}

}  // namespace vatwright
