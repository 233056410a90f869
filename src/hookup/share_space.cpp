#include "vatwright/hookup/share_space.hpp"

#include <algorithm>
#include <limits>
#include <numeric>

#include "vatwright/error/expects.hpp"

namespace vatwright {

double most_flow(const Hookup& hookup, FunctionRef<double(int leaf)> passes) {
  if (hookup.join == Hookup::Join::vessel) return passes(hookup.vessel);
  double least = std::numeric_limits<double>::infinity(), sum = 0;
  for (std::size_t i = 0; i < hookup.parts.size(); ++i) {
    const double one = most_flow(hookup.parts[i], passes);
    sum += one;
    least = std::min(least, hookup.join == Hookup::Join::then ? one : one / hookup.shares[i].value_or(least_share));
  }
  return hookup.join == Hookup::Join::then ? least : std::min(sum, least);
}

ShareSpace::ShareSpace(const Hookup& hookup, const std::vector<double>& volumes) {
  std::size_t leaf = 0;
  add(hookup, volumes, leaf);
}

// Walks in the order of the text; the answer is the volume inside.
double ShareSpace::add(const Hookup& hookup, const std::vector<double>& volumes, std::size_t& leaf) {
  if (hookup.join == Hookup::Join::vessel) return volumes[leaf++];
  std::vector<std::size_t> places;
  std::vector<double> inside;
  for (std::size_t i = 0; i < hookup.parts.size(); ++i) {
    if (hookup.join == Hookup::Join::beside) {
      places.push_back(fixed_.size());
      fixed_.push_back(hookup.shares[i].value_or(0));
    }
    inside.push_back(add(hookup.parts[i], volumes, leaf));
  }
  if (hookup.join == Hookup::Join::beside) add_joint(hookup, places, inside);
  return std::accumulate(inside.begin(), inside.end(), 0.0);
}

void ShareSpace::add_joint(const Hookup& hookup, const std::vector<std::size_t>& places,
                           const std::vector<double>& inside) {
  Joint joint;
  std::vector<double> volumes;
  for (std::size_t i = 0; i < places.size(); ++i) {
    joint.left -= hookup.shares[i].value_or(0);
    if (hookup.shares[i]) continue;
    joint.free.push_back(places[i]);
    volumes.push_back(inside[i]);
  }
  if (joint.free.empty()) {  // all fixed, to within the decimals they were typed with: they add to 1 exactly
    double sum = 0;
    for (const std::size_t p : places) sum += fixed_[p];
    for (const std::size_t p : places) fixed_[p] /= sum;
    return;
  }
  double left = std::accumulate(volumes.begin(), volumes.end(), 0.0);
  for (std::size_t k = 0; k + 1 < volumes.size(); ++k) {
    in_proportion_.push_back(left > 0 ? volumes[k] / left : 0.5);
    left -= volumes[k];
  }
  joints_.push_back(std::move(joint));
}

std::vector<double> ShareSpace::shares(std::span<const double> x) const {
  VATWRIGHT_EXPECTS(x.size() == dimensions());
  std::vector<double> out = fixed_;
  std::size_t next = 0;
  for (const Joint& joint : joints_) {
    const std::size_t m = joint.free.size();
    const double spread = 1 - static_cast<double>(m) * least_share;
    double rest = 1;
    for (std::size_t k = 0; k < m; ++k) {
      const double s = k + 1 < m ? rest * x[next++] : rest;
      rest -= s;
      out[joint.free[k]] = joint.left * (m > 1 ? least_share + spread * s : 1);
    }
  }
  return out;
}

std::vector<double> ShareSpace::coordinates(const std::vector<double>& shares) const {
  std::vector<double> x;
  for (const Joint& joint : joints_) {
    const std::size_t m = joint.free.size();
    const double spread = 1 - static_cast<double>(m) * least_share;
    double rest = 1;
    for (std::size_t k = 0; k + 1 < m; ++k) {
      const double s = std::clamp((shares[joint.free[k]] / joint.left - least_share) / spread, 0.0, rest);
      x.push_back(rest > 0 ? s / rest : 0);
      rest -= s;
    }
  }
  return x;
}

bool ShareSpace::at_edge(const std::vector<double>& shares, double distance) const {
  for (const Joint& joint : joints_) {
    if (joint.free.size() < 2) continue;
    for (const std::size_t p : joint.free) {
      if (shares[p] < distance || joint.left - shares[p] < distance) return true;
    }
  }
  return false;
}

}  // namespace vatwright
