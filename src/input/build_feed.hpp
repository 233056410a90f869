#pragma once
#include <optional>
#include <string>
#include <vector>

#include "duty_draft.hpp"
#include "equation.hpp"
#include "measure_of_amount.hpp"

namespace vatwright {

/// The mixed feed, and the rate at which its streams were said to flow.
struct BuiltFeed {
  Feed feed;
  std::optional<double> sum_of_rates_m3_s;  ///< of [[feed]]
  bool said_pressure = false;
};

/// What is known of every species, in the order first met in feeds, then equations. Told: a [species.X] that is nowhere
/// met.
std::vector<Species> build_species(const DutyDraft& draft, const std::vector<std::optional<Equation>>& equations,
                                   AmountReader& amounts, const Builder& builder);

/// Mixes the streams: liquids by volume, gases by moles, temperature by enthalpy, pressure the lowest.
BuiltFeed build_feed(const DutyDraft& draft, std::vector<Species> species, const AmountReader& amounts,
                     const Builder& builder);

/// A flow in m3/s of the mixed feed: by volume, by mass (density; gas: molar masses), by moles (gas only).
std::optional<double> read_feed_rate(const Raw& raw, const Feed& feed, const Builder& builder,
                                     const std::string& subject);

}  // namespace vatwright
