#include "vatwright/hookup/tune.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

#include "simplex_climb.hpp"
#include "vatwright/error/expects.hpp"
#include "vatwright/numeric/root.hpp"

namespace vatwright {
namespace {

constexpr double lowest = -std::numeric_limits<double>::max();
constexpr double near_end = 0.01;
constexpr int even_places = 13;

std::vector<double> places_of(const std::vector<double>& start, const std::vector<std::vector<double>>& seeds) {
  std::vector<double> at = {near_end, 1 - near_end, std::clamp(start.front(), 0.0, 1.0)};
  for (int i = 0; i < even_places; ++i) at.push_back(static_cast<double>(i) / (even_places - 1));
  for (const auto& seed : seeds) at.push_back(seed.front());
  std::sort(at.begin(), at.end());
  at.erase(std::unique(at.begin(), at.end()), at.end());
  return at;
}

std::vector<std::vector<double>> starts_of(const std::vector<double>& start) {
  std::vector<std::vector<double>> all = {start};
  for (std::size_t i = 0; i < start.size(); ++i) {
    for (const double end : {near_end, 1 - near_end}) {
      all.push_back(start);
      all.back()[i] = end;
    }
  }
  return all;
}

// The best of sampled values, and of the two highest peaks among them refined within [from, to].
template <class Of>
std::pair<double, double> best_on_line(const Of& of, const std::vector<double>& at, const std::vector<double>& value) {
  std::vector<std::size_t> peaks;
  for (std::size_t i = 0; i < at.size(); ++i) {
    const bool over_left = i == 0 || value[i] >= value[i - 1];
    const bool over_right = i + 1 == at.size() || value[i] >= value[i + 1];
    if (over_left && over_right && value[i] > lowest) peaks.push_back(i);
  }
  std::stable_sort(peaks.begin(), peaks.end(), [&](std::size_t a, std::size_t b) { return value[a] > value[b]; });
  std::pair<double, double> best = {at.front(), lowest};
  for (std::size_t k = 0; k < peaks.size() && k < 2; ++k) {
    const std::size_t i = peaks[k];
    if (value[i] > best.second) best = {at[i], value[i]};
    if (at.size() < 2) continue;
    const Peak peak = find_peak(of, at[i == 0 ? 0 : i - 1], at[i + 1 == at.size() ? i : i + 1]);
    if (peak.value > best.second) best = {peak.at, peak.value};
  }
  return best;
}

std::optional<Tuned> tune_line(ObjectiveOf f, const std::vector<double>& start) {
  const auto of = [&](double x) { return f(std::span<const double>(&x, 1)).value_or(lowest); };
  const auto at = places_of(start, {});
  std::vector<double> value;
  for (const double x : at) value.push_back(of(x));
  const auto [x, best] = best_on_line(of, at, value);
  if (best == lowest) return std::nullopt;
  return Tuned{{x}, {0, best, true}};
}

/// The feasible stretches of a line, their ends found by root finding on the margin.
class FeasibleLine {
 public:
  FeasibleLine(ScoreOf f, std::vector<double> at) : f_(f), at_(std::move(at)) {
    for (const double x : at_) scores_.push_back(score(x));
  }

  std::optional<Tuned> best() {
    const bool seen =
        std::any_of(scores_.begin(), scores_.end(), [](const Score& s) { return s.rated && s.margin >= 0; });
    if (!seen) look_for_one();
    for (std::size_t i = 0; i < at_.size(); ++i) {
      if (inside(i))
        i = stretch(i);
      else
        take(at_[i], scores_[i]);
    }
    return best_;
  }

 private:
  Score score(double x) { return f_(std::span<const double>(&x, 1)); }
  bool inside(std::size_t i) const { return scores_[i].rated && scores_[i].margin >= 0; }
  double margin_at(double x) {
    const Score s = score(x);
    return s.rated ? s.margin : lowest;
  }
  void take(double x, const Score& s) {
    if (s.rated && (!best_ || better(s, best_->score))) best_ = Tuned{{x}, s};
  }

  // No place holds: the greatest margin may, and it splits the line.
  void look_for_one() {
    std::vector<double> margins;
    for (const Score& s : scores_) margins.push_back(s.rated ? s.margin : lowest);
    const auto of = [&](double x) { return margin_at(x); };
    const auto [x, margin] = best_on_line(of, at_, margins);
    if (margin == lowest) return;
    const auto place = std::lower_bound(at_.begin(), at_.end(), x);
    if (place != at_.end() && *place == x) return;
    scores_.insert(scores_.begin() + (place - at_.begin()), score(x));
    at_.insert(place, x);
  }

  // The end of what holds between `in` (holds) and `out` (does not), on the side that holds.
  double end_between(double in, double out) {
    for (int i = 0; i < 60 && std::abs(out - in) > 1e-13; ++i) {
      const double middle = 0.5 * (in + out);
      (margin_at(middle) >= 0 ? in : out) = middle;
    }
    return in;
  }

  // From place i on all hold up to the answer; the objective is searched between the ends.
  std::size_t stretch(std::size_t i) {
    std::size_t last = i;
    while (last + 1 < at_.size() && inside(last + 1)) ++last;
    std::vector<double> at(at_.begin() + static_cast<std::ptrdiff_t>(i),
                           at_.begin() + static_cast<std::ptrdiff_t>(last) + 1);
    if (i > 0) at.insert(at.begin(), end_between(at_[i], at_[i - 1]));
    if (last + 1 < at_.size()) at.push_back(end_between(at_[last], at_[last + 1]));
    at.erase(std::unique(at.begin(), at.end()), at.end());
    const auto of = [&](double x) {
      const Score s = score(x);
      return s.rated && s.margin >= 0 ? s.objective : lowest;
    };
    std::vector<double> value;
    for (const double x : at) value.push_back(of(x));
    const double x = best_on_line(of, at, value).first;
    take(x, score(x));
    return last;
  }

  ScoreOf f_;
  std::vector<double> at_;
  std::vector<Score> scores_;
  std::optional<Tuned> best_;
};

}  // namespace

bool better(const Score& a, const Score& b) {
  if (a.rated != b.rated) return a.rated;
  const double out_a = std::min(0.0, a.margin), out_b = std::min(0.0, b.margin);
  if (out_a != out_b) return out_a > out_b;
  return a.objective > b.objective;
}

std::optional<Tuned> tune_free(ObjectiveOf f, const std::vector<double>& start) {
  VATWRIGHT_EXPECTS(!start.empty());
  if (start.size() == 1) return tune_line(f, start);
  const auto of = [&](const std::vector<double>& x) { return f(x).value_or(lowest); };
  const auto less = [](double a, double b) { return a < b; };
  std::pair<std::vector<double>, double> best = {start, lowest};
  for (const auto& from : starts_of(start)) {
    const auto found = climb_simplex<double>(of, less, from, 0.15, 3e-3, 200);
    if (found.second > best.second) best = found;
  }
  if (best.second == lowest) return std::nullopt;
  for (const double step : {2e-2, 1e-3}) {
    const auto found = climb_simplex<double>(of, less, best.first, step, 3e-6, 400);
    if (found.second >= best.second) best = found;
  }
  return Tuned{best.first, {0, best.second, true}};
}

std::optional<Tuned> tune_within(ScoreOf f, const std::vector<double>& start,
                                 const std::vector<std::vector<double>>& seeds) {
  VATWRIGHT_EXPECTS(!start.empty());
  if (start.size() == 1) return FeasibleLine(f, places_of(start, seeds)).best();
  const auto of = [&](const std::vector<double>& x) { return f(x); };
  const auto less = [](const Score& a, const Score& b) { return better(b, a); };
  std::optional<Tuned> best;
  auto starts = starts_of(start);
  starts.insert(starts.end(), seeds.begin(), seeds.end());
  for (const auto& from : starts) {
    const auto [x, score] = climb_simplex<Score>(of, less, from, 0.15, 3e-3, 200);
    if (score.rated && (!best || better(score, best->score))) best = Tuned{x, score};
  }
  for (const double step : {5e-2, 5e-3, 5e-4}) {
    if (!best) break;
    const auto [x, score] = climb_simplex<Score>(of, less, best->x, step, 3e-7, 400);
    if (!better(best->score, score)) best = Tuned{x, score};
  }
  return best;
}

}  // namespace vatwright
