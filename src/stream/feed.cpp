#include "vatwright/stream/feed.hpp"

#include <algorithm>

namespace vatwright {

int Feed::index_of(const std::string& name) const {
  const auto found = std::ranges::find(species, name, &Species::name);
  return found == species.end() ? -1 : static_cast<int>(found - species.begin());
}

}  // namespace vatwright
