#pragma once
#include <vector>

#include "vatwright/hookup/network.hpp"

namespace vatwright {

/// A hookup at one feed rate and one set of shares, with every limit and target looked at.
struct JudgedHookup {
  double feed_m3_s = 0;
  std::vector<double> shares;
  bool shares_certain = false;  ///< no others do better but for limits: there are none to choose, or they are known
  NetworkOutcome passes;
  std::vector<Judged> vessels;      ///< in the order of the text
  std::vector<Limit> whole;         ///< limits of the whole: what all vessels draw together
  std::vector<TargetItem> targets;  ///< empty where there is no outlet
};

JudgedHookup judge_hookup(const Problem& problem, Network& network, double feed_m3_s, std::vector<double> shares,
                          Detail detail);

/// With tags, for find_verdict and trial_of; looks into `judged`.
std::vector<NamedJudged> named(const Problem& problem, const Network& network, const JudgedHookup& judged);
Finding find_verdict(const Problem& problem, const Network& network, const JudgedHookup& judged);
Trial trial_of(const Problem& problem, const Network& network, const JudgedHookup& judged);

/// The place of a vessel, for the pieces of rating.
VesselPlace place_of(const Problem& problem, const Network& network, const JudgedHookup& judged, std::size_t place);

/// Whether a limit is broken (targets aside), and whether one of those does not depend on flow or shares at all.
bool breaks_limit(const JudgedHookup& judged);
bool breaks_limit_of_files(const JudgedHookup& judged);
/// The least margin of all limits, + = inside; absent where some vessel has no answer.
std::optional<double> least_margin(const JudgedHookup& judged);

}  // namespace vatwright
