#pragma once
#include <span>
#include <vector>

#include "vatwright/numeric/march.hpp"

namespace vatwright {

using In = std::span<const double>;
using Out = std::span<double>;

inline std::vector<double> at(const Track& track, double t) {
  std::vector<double> y(static_cast<std::size_t>(track.size()));
  track.read(t, y);
  return y;
}

}  // namespace vatwright
