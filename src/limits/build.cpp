#include "build.hpp"

#include <cmath>
#include <utility>

namespace vatwright {

Limit limit_of(std::string_view name, double value, double bound, Side side, std::string_view unit) {
  const double scale = bound == 0 ? 1 : std::abs(bound);
  const double room = side == Side::most ? bound - value : value - bound;
  Limit limit{.name = name, .value = value, .bound = bound, .unit = unit};
  limit.margin = unit == "K" ? room : room / scale;
  limit.search_margin = room / scale;
  limit.state = room / scale >= -holds_within ? Limit::State::holds : Limit::State::broken;
  return limit;
}

Limit tighter(Limit a, Limit b) { return *a.search_margin <= *b.search_margin ? std::move(a) : std::move(b); }

Limit held(std::string_view name) { return {.name = name}; }

Limit broken(std::string_view name, std::string why) {
  Limit limit{.name = name, .state = Limit::State::broken, .why = std::string(name) + ": " + std::move(why)};
  limit.search_margin = -1;
  return limit;
}

Limit cannot_tell(std::string_view name, std::string why) {
  return {.name = name, .state = Limit::State::cannot_tell, .why = std::string(name) + ": " + std::move(why)};
}

}  // namespace vatwright
