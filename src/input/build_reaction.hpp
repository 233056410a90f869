#pragma once
#include <optional>
#include <string>
#include <vector>

#include "duty_draft.hpp"
#include "equation.hpp"
#include "measure_of_amount.hpp"

namespace vatwright {

/// What a reaction is judged beside.
struct ReactionContext {
  const Feed& feed;
  const AmountReader& amounts;
  const Builder& builder;
  std::string conversion_of;
  std::string folder;            ///< of the duty, for tables of rates
  bool heat_moves = false;       ///< every species has a heat capacity and the feed states none
  std::optional<double> held_K;  ///< the one temperature at which all is held, where it is one
};

/// Equations of all reactions, absent where they can not be read (told).
std::vector<std::optional<Equation>> read_equations(const DutyDraft& draft, const Builder& builder);

/// One reaction; nullopt where something was told that leaves none.
std::optional<Reaction> build_reaction(const ReactionDraft& draft, const Equation& equation, std::size_t number,
                                       const ReactionContext& context);

/// How messages and keys name a reaction: its name, else its equation, else its number.
std::string name_of_reaction(const ReactionDraft& draft, std::size_t number);

/// A measured table of rates from the keys or from a CSV file beside the duty.
std::optional<RateTable> build_rate_table(const RateDraft& draft, const std::string& subject,
                                          const ReactionContext& context);

}  // namespace vatwright
