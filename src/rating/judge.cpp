#include <algorithm>

#include "vatwright/rating/rating.hpp"

namespace vatwright {

std::string_view text_of(Verdict verdict) {
  switch (verdict) {
    case Verdict::fits:
      return "fits";
    case Verdict::does_not_fit:
      return "does-not-fit";
    case Verdict::cannot_tell:
      break;
  }
  return "cannot-tell";
}

namespace {
constexpr std::string_view pressure_drop = "pressure drop";

LimitInput input_of(const VesselPlace& place, const VesselOutcome& outcome, const Utility* medium) {
  const Duty& duty = place.problem.duty;
  return {place.vessel,    duty.chemistry, place.operation, duty.limits,      place.problem.site.utilities,
          place.feed_m3_s, outcome,        medium,          place.arrives_Pa, place.stands};
}

/// The limit "pressure drop" broken, in its place in the order.
void break_pressure_drop(std::vector<Limit>& limits, const std::string& why) {
  Limit limit{.name = pressure_drop, .state = Limit::State::broken};
  limit.why = std::string(pressure_drop) + ": " + why;
  limit.search_margin = -1;
  const auto at = std::find_if(limits.begin(), limits.end(),
                               [](const Limit& l) { return place_of(l.name) > place_of(pressure_drop); });
  limits.insert(at, limit);
}

std::string with_tag(std::string_view tag, const std::string& text) {
  return tag.empty() ? text : std::string(tag) + ": " + text;
}

/// Value and bound in words, with as many figures as it takes to see them differ.
std::string missed(const TargetItem& item) {
  const std::string wanted = item.at_least ? ", wanted " : ", wanted at most ";
  if (!item.value) return item.text + " can not be had" + wanted + show(item.bound, item.shown);
  const std::string value = show(*item.value, item.shown), bound = show(item.bound, item.shown);
  if (value != bound) return item.text + " " + value + wanted + bound;
  return item.text + " just short of it" + wanted + bound;
}

struct Facts {
  std::vector<std::string> broken, untold;
  bool unsolved = false;
};

void gather(Facts& facts, std::string_view tag, const std::vector<Limit>& limits) {
  for (const Limit& limit : limits) {
    if (limit.state == Limit::State::broken) facts.broken.push_back(with_tag(tag, limit.why));
    if (limit.state == Limit::State::cannot_tell) facts.untold.push_back(with_tag(tag, limit.why));
  }
}

void gather(Facts& facts, const NamedJudged& named) {
  const Judged& judged = *named.judged;
  gather(facts, named.tag, judged.limits);
  const bool told_by_heat = std::any_of(judged.limits.begin(), judged.limits.end(), [&](const Limit& l) {
    return l.state == Limit::State::broken && !judged.lacking.empty() &&
           l.why.find(judged.lacking) != std::string::npos;
  });
  if (!judged.lacking.empty() && !told_by_heat)
    facts.broken.push_back(with_tag(named.tag, "utility: " + judged.lacking));
  if (judged.no_answer && judged.no_answer->kind != NoAnswer::Kind::does_not_pass) {
    facts.untold.push_back(with_tag(named.tag, judged.no_answer->why));
    facts.unsolved = facts.unsolved || judged.no_answer->kind == NoAnswer::Kind::unsolved;
  }
}

std::string limit_of_hookup(std::string_view tag, std::string_view name) {
  return tag.empty() ? std::string(name) : std::string(tag) + ": " + std::string(name);
}
}  // namespace

Judged judge(const VesselPlace& place, const Outcome<VesselOutcome>& outcome) {
  static const VesselOutcome nothing;
  Judged judged;
  judged.lacking = lacking_utility(place.vessel, place.operation);
  if (const auto* none = std::get_if<NoAnswer>(&outcome)) judged.no_answer = *none;
  if (judged.no_answer) {
    judged.figures = false;
    judged.limits = check_limits_of_files(input_of(place, nothing, nullptr));
    if (judged.no_answer->kind == NoAnswer::Kind::does_not_pass)
      break_pressure_drop(judged.limits, judged.no_answer->why);
    return judged;
  }
  const VesselOutcome& o = std::get<VesselOutcome>(outcome);
  judged.figures = !o.cycle;
  judged.medium = choose_medium(place.vessel, place.operation, place.problem.site.utilities, o);
  const LimitInput input = input_of(place, o, judged.medium);
  judged.limits = check_limits(input);
  judged.draw = draw_of(input);
  return judged;
}

Finding find_verdict(const std::vector<NamedJudged>& judged, const std::vector<Limit>& limits,
                     const std::vector<TargetItem>& items) {
  Facts facts;
  for (const NamedJudged& named : judged) gather(facts, named);
  gather(facts, {}, limits);
  for (const TargetItem& item : items) {
    if (!item.met) facts.broken.push_back(missed(item));
  }
  Finding finding{.stands_in_the_way = facts.broken, .unsolved = facts.unsolved};
  finding.verdict = !facts.broken.empty()  ? Verdict::does_not_fit
                    : facts.untold.empty() ? Verdict::fits
                                           : Verdict::cannot_tell;
  finding.stands_in_the_way.insert(finding.stands_in_the_way.end(), facts.untold.begin(), facts.untold.end());
  return finding;
}

Trial trial_of(const std::vector<NamedJudged>& judged, const std::vector<Limit>& limits,
               const std::vector<TargetItem>& items) {
  Trial trial;
  for (const TargetItem& item : items) trial.margins.emplace_back("target", item.margin);
  for (const auto& [tag, each] : judged) {
    for (const Limit& limit : each->limits)
      trial.margins.emplace_back(limit_of_hookup(tag, limit.name), limit.search_margin);
    if (!each->lacking.empty()) trial.margins.emplace_back(limit_of_hookup(tag, "heat removal"), -1.0);
    if (!each->no_answer || trial.fails) continue;
    trial.fails = true;
    trial.unsolved = each->no_answer->kind == NoAnswer::Kind::unsolved;
    if (each->no_answer->kind == NoAnswer::Kind::does_not_pass) {
      trial.fails_by = limit_of_hookup(tag, pressure_drop);
    } else {
      trial.fails_why = with_tag(tag, each->no_answer->why);
    }
  }
  for (const Limit& limit : limits) trial.margins.emplace_back(std::string(limit.name), limit.search_margin);
  return trial;
}

}  // namespace vatwright
