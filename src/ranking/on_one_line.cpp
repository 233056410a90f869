#include "on_one_line.hpp"

#include <algorithm>

#include "best_on_line.hpp"

namespace vatwright {
namespace {

constexpr double of_maps = 1e-8;  // what vessel maps and told splits may miss, in z

}  // namespace

OnOneLine::OnOneLine(Line line, Twins twins, const Problem& problem)
    : line_(std::move(line)),
      bound_(line_),
      twins_(std::move(twins)),
      vessels_(on_lines(line_, twins_, problem.site.vessels.size())),
      z_target_(place_of_target(problem.duty, line_)) {
  for (std::size_t c = 0; c < twins_.classes().size(); ++c)
    if (line_.vessels()[c]) classes_.push_back(c);
  const Objective objective = objective_of(problem.duty);
  if (objective.of == Objective::Of::yield) yield_per_z_ = yield_at_end(objective, problem.duty, line_).value_or(0);
}

std::unique_ptr<OnOneLine> OnOneLine::find(const Problem& problem, const std::vector<int>& offered,
                                           const RankOptions& options, std::string& why) {
  if (offered.empty()) return nullptr;
  const Twins classes(problem, offered);
  std::vector<int> firsts;
  for (const auto& c : classes.classes()) firsts.push_back(c.front());
  auto line = Line::find(problem, firsts, why);
  if (!line) return nullptr;
  const bool falls = line->falls();
  std::unique_ptr<OnOneLine> made(new OnOneLine(*std::move(line), Twins(problem, offered, falls), problem));
  why = "what is ordered by is not a matter of the conversion alone";
  if (options.by == By::yield && !(made->yield_per_z_ > 0)) return nullptr;
  if (by_ceiling(options.by) && !(made->z_target_ && *made->z_target_ > 0)) return nullptr;
  why.clear();
  return made;
}

bool OnOneLine::on_the_line(const Hookup& hookup) const {
  return std::ranges::all_of(vessels_of(hookup),
                             [&](int v) { return vessels_[static_cast<std::size_t>(v)] != nullptr; });
}

KnownShares OnOneLine::shares_of(const Hookup& hookup) const {
  return on_the_line(hookup) ? shares_on(line_, vessels_, hookup) : KnownShares{};
}

std::optional<double> OnOneLine::ceiling_of(const Hookup& hookup) const {
  if (!z_target_ || never_reached() || !on_the_line(hookup)) return std::nullopt;
  Splits splits(line_, told_tolerance);
  double volume = 0;
  for (const int v : vessels_of(hookup)) volume += vessels_[static_cast<std::size_t>(v)]->volume_m3;
  // z falls as the feed rises: from the most that could be reached, down to where it is
  double q = std::min(1.01 * volume / bound_.time(*z_target_), caps_pass(hookup, vessels_));
  for (int i = 0; i < 60; ++i, q /= 2)
    if (splits.best(hookup, vessels_, 0, q, 0).z >= *z_target_)
      return BestOnLine::ceiling(hookup, vessels_, *z_target_, q, caps_pass(hookup, vessels_), splits);
  return std::nullopt;
}

double OnOneLine::figure_at(By by, double value) const {
  if (by_ceiling(by)) return value;
  return by == By::yield ? value * yield_per_z_ : line_.conversion(value);
}

double OnOneLine::place_of(By by, double figure) const {
  if (by_ceiling(by)) return figure;
  return by == By::yield ? figure / yield_per_z_ : line_.place(figure);
}

double OnOneLine::within(By by, const std::vector<Entry>& entries, double gap) const {
  const double dz = gap + of_maps;
  if (!by_ceiling(by)) return figure_at(by, dz);
  if (never_reached()) return 0;
  double most = 0;
  for (const Entry& e : entries) {
    if (!e.ceiling || !e.ceiling->feed_m3_s || !on_the_line(e.hookup)) continue;
    Splits splits(line_, told_tolerance);
    const double slope = splits.best(e.hookup, vessels_, 0, *e.ceiling->feed_m3_s, 0).dq;
    if (slope < 0) most = std::max(most, dz / -slope);
  }
  return most;
}

}  // namespace vatwright
