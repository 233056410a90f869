#include "kept_out.hpp"

#include "best_on_line.hpp"

namespace vatwright {

std::vector<KeptOut> kept_out(const OnOneLine& on, const Rater& rater, const Entry& first) {
  constexpr std::size_t most_told = 3;
  const RankOptions& options = rater.options();
  const bool ceilings = by_ceiling(options.by);
  if (ceilings && on.never_reached()) return {};
  const Line wide = on.line().without_caps();
  const Bound bound(wide);
  const OnLines vessels = on_lines(wide, on.twins(), on.vessels().size());
  const BestOnLine best(wide, bound, on.twins(), on.classes(), vessels, rater.problem().duty.target.feed_m3_s,
                        ceilings ? on.z_target() : std::nullopt, options.threads);
  std::vector<KeptOut> out;
  for (Placed& p : best.find({.fewest = 1, .most = options.most, .places = most_told}).all) {
    const double value = on.figure_at(options.by, p.value);
    if (out.size() == most_told || value <= figure_of(first, options.by) * (1 + as_good_as)) break;
    const Entry entry = rater.rate(std::move(p.at.hookup));
    if (entry.breaks_limit) out.push_back({entry.text, value, entry.stands_in_the_way});
  }
  return out;
}

}  // namespace vatwright
