#include "way.hpp"

#include <cmath>

#include "vatwright/numeric/root.hpp"

namespace vatwright {

Place place_at(double y, double length) {
  if (y <= 0) {
    const double e = std::exp(y);
    return {length * e / (1 + e), length / (1 + e)};
  }
  const double e = std::exp(-y);
  return {length / (1 + e), length * e / (1 + e)};
}

const std::vector<double>& graded_places() {
  static const std::vector<double> places = [] {
    std::vector<double> half;
    for (int i = 1; i <= 15; ++i) half.push_back(0.4 * i);   // to 6
    for (double y = 7; y < 14.5; y += 1) half.push_back(y);  // to 14
    for (double y = 17; y < y_most - 2; y += 3.2) half.push_back(y);
    half.push_back(y_most);
    std::vector<double> all;
    for (auto y = half.rbegin(); y != half.rend(); ++y) all.push_back(-*y);
    all.push_back(0);
    all.insert(all.end(), half.begin(), half.end());
    return all;
  }();
  return places;
}

const std::vector<Place>& graded_shares() {
  static const std::vector<Place> shares = [] {
    std::vector<Place> all;
    for (const double y : graded_places()) all.push_back(place_at(y, 1));
    return all;
  }();
  return shares;
}

std::optional<Way> Way::find(RatePath& path, double sign) {
  if (!path.reversible() && sign < 0) return std::nullopt;
  const double at_inlet = sign * path.rate(path.inlet(), 0);
  if (at_inlet < 0) return std::nullopt;
  Way way(path, sign);
  if (!(way.length_ > 0)) return std::nullopt;
  if (at_inlet == 0) {  // does it start just beside the inlet (a product that speeds it up), or not at all?
    const Place beside = place_at(-20, way.length_);
    if (!(way.rate(beside.d, beside.s) > 0)) return std::nullopt;
  }
  if (path.reversible()) way.end_at_first_zero();
  if (!(way.length_ > 0)) return std::nullopt;
  return way;
}

void Way::end_at_first_zero() {
  const double whole = length_;
  const auto rate_at = [&](double y) {
    const Place p = place_at(y, whole);
    return rate(p.d, p.s);
  };
  double before = -y_most;
  for (double y : graded_places()) {
    if (rate_at(y) <= 0) {
      if (y == before) {
        length_ = 0;  // at equilibrium to rounding
        return;
      }
      const auto zero = find_root(rate_at, before, y, {.rel_tol = 1e-16, .abs_tol = 1e-15});
      const double* found = answer(zero);
      const Place p = place_at(found != nullptr ? *found : before, whole);
      end_.end = p.d <= p.s ? path_->at(path_->inlet(), sign_ * p.d) : path_->at(end_.end, -sign_ * p.s);
      length_ = p.d;
      end_.distance = length_;
      end_.kind = EndKind::equilibrium;
      return;
    }
    before = y;
  }
}

}  // namespace vatwright
