#pragma once
#include <optional>
#include <string>
#include <vector>

#include "build_reaction.hpp"

namespace vatwright {

/// A rate law of one direction. `consumed`: the side it starts from, as written, for orders that are left out.
std::optional<RateLaw> build_rate_law(const RateDraft& draft, const std::vector<Term>& consumed,
                                      const Equation& equation, const std::string& subject, const std::string& table,
                                      const ReactionContext& context);

}  // namespace vatwright
