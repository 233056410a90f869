#pragma once
#include <algorithm>
#include <cmath>
#include <cstddef>
#include <numeric>
#include <utility>
#include <vector>

namespace vatwright {

/// Nelder and Mead's simplex in the unit box, for any order of values: `less_good(a, b)` says that a is worse than b.
/// Points outside are folded onto the border. Ends when the simplex is smaller than `size` or after `most_calls`.
template <class Value, class Of, class LessGood>
std::pair<std::vector<double>, Value> climb_simplex(const Of& of, const LessGood& less_good,
                                                    const std::vector<double>& start, double step, double size,
                                                    int most_calls) {
  using Point = std::vector<double>;
  const std::size_t n = start.size();
  const auto boxed = [](Point p) {
    for (double& c : p) c = std::clamp(c, 0.0, 1.0);
    return p;
  };
  struct Vertex {
    Point x;
    Value value;
  };
  int calls = 0;
  const auto vertex_at = [&](Point p) {
    ++calls;
    p = boxed(std::move(p));
    Value value = of(p);
    return Vertex{std::move(p), std::move(value)};
  };
  std::vector<Vertex> simplex{vertex_at(start)};
  for (std::size_t i = 0; i < n; ++i) {
    Point p = start;
    p[i] += p[i] + step <= 1 ? step : -step;
    simplex.push_back(vertex_at(std::move(p)));
  }
  const auto best_first = [&](const Vertex& a, const Vertex& b) { return less_good(b.value, a.value); };
  while (calls < most_calls) {
    std::stable_sort(simplex.begin(), simplex.end(), best_first);
    double extent = 0;
    for (std::size_t i = 0; i < n; ++i) {
      for (const Vertex& v : simplex) extent = std::max(extent, std::abs(v.x[i] - simplex.front().x[i]));
    }
    if (extent < size) break;
    Point middle(n, 0.0);
    for (std::size_t k = 0; k < n; ++k) {
      for (std::size_t i = 0; i < n; ++i) middle[i] += simplex[k].x[i] / static_cast<double>(n);
    }
    Vertex& worst = simplex.back();
    const auto along = [&](double t) {
      Point p(n);
      for (std::size_t i = 0; i < n; ++i) p[i] = middle[i] + t * (worst.x[i] - middle[i]);
      return vertex_at(std::move(p));
    };
    Vertex reflected = along(-1);
    if (less_good(simplex.front().value, reflected.value)) {
      Vertex further = along(-2);
      worst = less_good(reflected.value, further.value) ? std::move(further) : std::move(reflected);
      continue;
    }
    if (less_good(simplex[n - 1].value, reflected.value)) {
      worst = std::move(reflected);
      continue;
    }
    Vertex nearer = along(less_good(worst.value, reflected.value) ? -0.5 : 0.5);
    if (less_good(worst.value, nearer.value)) {
      worst = std::move(nearer);
      continue;
    }
    for (std::size_t k = 1; k <= n; ++k) {  // shrink towards the best
      Point p(n);
      for (std::size_t i = 0; i < n; ++i) p[i] = 0.5 * (simplex[0].x[i] + simplex[k].x[i]);
      simplex[k] = vertex_at(std::move(p));
    }
  }
  std::stable_sort(simplex.begin(), simplex.end(), best_first);
  return {simplex.front().x, simplex.front().value};
}

}  // namespace vatwright
