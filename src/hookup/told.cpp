#include "vatwright/hookup/told.hpp"

#include <algorithm>

namespace vatwright {
namespace {

constexpr double edge = 0.02;  // 2 % points of the flow

using Figure = std::optional<double> Rating::*;

void take_largest(Rating& whole, const std::vector<Rating>& vessels, Figure figure) {
  for (const Rating& v : vessels) {
    if (v.*figure && (!(whole.*figure) || *(v.*figure) > *(whole.*figure))) whole.*figure = v.*figure;
  }
}

// A sum to which every vessel must tell its part.
void add_all(Rating& whole, const std::vector<Rating>& vessels, Figure figure) {
  double sum = 0;
  for (const Rating& v : vessels) {
    if (!(v.*figure)) return;
    sum += *(v.*figure);
  }
  whole.*figure = sum;
}

// A sum over those that have such a figure at all.
void add_some(Rating& whole, const std::vector<Rating>& vessels, Figure figure) {
  for (const Rating& v : vessels) {
    if (v.*figure) whole.*figure = (whole.*figure).value_or(0) + *(v.*figure);
  }
}

Rating tell_part(const Problem& problem, Network& network, const JudgedHookup& judged, std::size_t i) {
  Rating rating;
  const VesselPlace place = place_of(problem, network, judged, i);
  const VesselOutcome* outcome = answer(judged.passes.vessels[i].outcome);
  tell_vessel(rating, place, judged.vessels[i], outcome);
  const Finding finding = find_verdict({{{}, &judged.vessels[i]}}, {}, {});
  rating.verdict = finding.verdict;
  rating.stands_in_the_way = finding.stands_in_the_way;
  rating.unsolved = finding.unsolved;
  rating.feed_fraction = judged.passes.vessels[i].feed_m3_s / judged.feed_m3_s;
  if (outcome && judged.vessels[i].figures) rating.cautions = cautions_of(place, *outcome, judged.vessels[i].limits);
  return rating;
}

void tell_outlet(Rating& whole, const Duty& duty, const Stream& outlet) {
  whole.conversion = duty.chemistry.kinetics.conversion(outlet.xi_mol_m3);
  whole.yields = yields_of(duty, outlet);
  whole.outlet = outlet;
  whole.outlet_mol_s = outlet_flows(duty, outlet);
}

// Where every vessel answers: there is a mixed outlet to tell of.
bool has_outlet(const JudgedHookup& judged) {
  return answer(judged.passes.outlet) != nullptr &&
         std::all_of(judged.vessels.begin(), judged.vessels.end(), [](const Judged& j) { return j.figures; });
}

void add_cautions(Rating& whole, Chooser& chooser, const JudgedHookup& judged) {
  if (chooser.space().at_edge(judged.shares, edge)) {
    whole.cautions.push_back(
        {"share-at-edge",
         "the best share of a branch lies within 2 % of none or all: the hookup without that branch does "
         "as well, and a flow that small is hard to hold"});
  }
  const auto conversion_at = [&](double feed_m3_s) -> std::optional<double> {
    const auto outlet = chooser.network().outlet(feed_m3_s, judged.shares);
    const auto* stream = answer(outlet);
    if (!stream) return std::nullopt;
    return chooser.problem().duty.chemistry.kinetics.conversion(stream->xi_mol_m3);
  };
  if (auto fold = caution_near_fold(conversion_at, judged.feed_m3_s)) whole.cautions.push_back(*fold);
}

Rating tell_whole(Chooser& chooser, const JudgedHookup& judged, const std::vector<Rating>& vessels) {
  const Problem& problem = chooser.problem();
  Rating whole;
  whole.yields = yields_of(problem.duty, whole_feed(problem.duty));
  for (auto& [name, value] : whole.yields) value.reset();
  whole.limits = judged.whole;
  whole.targets = judged.targets;
  const Finding finding = find_verdict(problem, chooser.network(), judged);
  whole.verdict = finding.verdict;
  whole.stands_in_the_way = finding.stands_in_the_way;
  whole.unsolved = finding.unsolved;
  if (!has_outlet(judged)) return whole;
  tell_outlet(whole, problem.duty, *answer(judged.passes.outlet));
  take_largest(whole, vessels, &Rating::hottest_K);
  take_largest(whole, vessels, &Rating::start_peak_K);
  take_largest(whole, vessels, &Rating::residual);
  add_all(whole, vessels, &Rating::cooling_W);
  add_some(whole, vessels, &Rating::preheat_W);
  add_cautions(whole, chooser, judged);
  return whole;
}

}  // namespace

HookupRating tell_hookup(Chooser& chooser, const JudgedHookup& judged) {
  HookupRating rating;
  for (std::size_t i = 0; i < judged.vessels.size(); ++i) {
    rating.vessels.push_back(tell_part(chooser.problem(), chooser.network(), judged, i));
  }
  rating.whole = tell_whole(chooser, judged, rating.vessels);
  const Hookup& hookup = chooser.network().hookup();
  rating.text = to_text(hookup, chooser.problem().site, judged.shares);
  rating.shares = judged.shares;
  rating.vessel_count = static_cast<int>(rating.vessels.size());
  rating.free_shares = free_shares_of(hookup);
  return rating;
}

}  // namespace vatwright
