#pragma once
// Limits with and without a number, made in one way.
#include <string>
#include <string_view>

#include "vatwright/limits/limit.hpp"

namespace vatwright {

/// Which side of its bound a value must stay on.
enum class Side { most, least };

/// A limit with a number: margin, search margin and state follow from value and bound; `why` is left empty.
/// unit "K": the margin is a plain difference, the search margin is still scaled.
Limit limit_of(std::string_view name, double value, double bound, Side side, std::string_view unit);
/// The one with less room, by the search margin.
Limit tighter(Limit a, Limit b);
/// A limit without a number.
Limit held(std::string_view name);
Limit broken(std::string_view name, std::string why);
Limit cannot_tell(std::string_view name, std::string why);
/// `why` after the limit's name, where it is broken: "fill: 0.9 asked, at most 0.85". The words are made only then:
/// windows judge thousands of trials.
template <class Why>
Limit explained(Limit limit, Why&& why) {
  if (limit.state != Limit::State::holds) limit.why = std::string(limit.name).append(": ").append(why());
  return limit;
}

}  // namespace vatwright
