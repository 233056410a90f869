#include "vatwright/rating/cases.hpp"

#include <algorithm>
#include <limits>

namespace vatwright {

namespace {
int badness(Verdict verdict) {
  switch (verdict) {
    case Verdict::does_not_fit:
      return 2;
    case Verdict::cannot_tell:
      return 1;
    case Verdict::fits:
      break;
  }
  return 0;
}

constexpr double endless = std::numeric_limits<double>::infinity();

std::optional<Interval> meet(const Interval& a, const Interval& b) {
  const double lo = std::max(a.lo.value_or(0), b.lo.value_or(0));
  const double hi = std::min(a.hi.value_or(endless), b.hi.value_or(endless));
  if (lo > hi) return std::nullopt;
  Interval both;
  if (a.lo || b.lo) both.lo = lo;
  if (a.hi || b.hi) both.hi = hi;
  return both;
}

std::vector<Interval> meet(const std::vector<Interval>& all, const std::vector<Interval>& others) {
  std::vector<Interval> both;
  for (const Interval& a : all) {
    for (const Interval& b : others) {
      if (auto part = meet(a, b)) both.push_back(*part);
    }
  }
  return both;
}
}  // namespace

OverCases over_cases(const Rating& base, const std::vector<std::pair<std::string, const Rating*>>& cases) {
  OverCases over{.verdict = base.verdict};
  if (base.windows) over.windows_all_cases = base.windows->intervals;
  for (const auto& [name, rating] : cases) {
    if (badness(rating->verdict) > badness(over.verdict)) {
      over.verdict = rating->verdict;
      over.worst_case = name;
    }
    const std::vector<Interval> none;
    over.windows_all_cases = meet(over.windows_all_cases, rating->windows ? rating->windows->intervals : none);
  }
  return over;
}

}  // namespace vatwright
