#pragma once
#include <optional>
#include <string>
#include <vector>

#include "order.hpp"

namespace vatwright {

/// What a way through the space hands over: the hookups that may stand in the places asked, and what it may claim.
struct RankedSet {
  std::vector<Entry> entries;  ///< with ceilings where the order needs them; one for all that differ only in name
  std::optional<Entry> today;
  bool today_listed = false;             ///< it is one of the space: what differs from it only in name is told
  std::optional<long long> today_place;  ///< among merged hookups, from 1
  long long rated = 0;                   ///< by the full models
  std::string complete = "partly", why_partly;
  std::optional<double> within;
  bool unsolved = false;  ///< something could not be solved
};

}  // namespace vatwright
