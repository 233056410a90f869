#pragma once
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "vatwright/rating/rating.hpp"

namespace vatwright {

/// Base and cases together (ruling 4): the worst verdict (does-not-fit, cannot-tell, fits), the case it comes from
/// (absent = base, also where the base is as bad), and the intersection of all windows.
struct OverCases {
  Verdict verdict = Verdict::cannot_tell;
  std::optional<std::string> worst_case = {};
  std::vector<Interval> windows_all_cases = {};
};
OverCases over_cases(const Rating& base, const std::vector<std::pair<std::string, const Rating*>>& cases);

}  // namespace vatwright
