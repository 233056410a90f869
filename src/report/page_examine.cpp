#include <algorithm>
#include <cmath>

#include "page_parts.hpp"
#include "plot.hpp"
#include "vatwright/report/page.hpp"

namespace vatwright {
namespace {

std::string heat_words(std::optional<double> cooling_W, const Look& look) {
  if (!cooling_W) return "not asked, or not known";
  if (*cooling_W < 0) return show(-*cooling_W, Shown::heat, look.units) + " of heating";
  return show(*cooling_W, Shown::heat, look.units) + " of cooling";
}

std::string yields_words(const Rating& rating, const Look& look) {
  std::string text;
  for (const auto& [species, yield] : rating.yields)
    text += (text.empty() ? "" : ", ") + species + " " + figure_with_unit(yield, Shown::percent, look);
  return text;
}

std::string window_end(const char* name, std::optional<double> rate, const std::optional<std::string>& end,
                       const Look& look) {
  if (!rate) return std::string("no ") + name + " in the range searched";
  return std::string(name) + " " + show(*rate, Shown::feed, look.units) + (end ? ", ended by " + *end : "");
}

std::vector<std::string> window_words(const Windows& windows, const Look& look) {
  std::vector<std::string> texts = {words_of(windows.intervals, look)};
  if (!windows.intervals.empty()) {
    texts.push_back(window_end("ceiling", windows.ceiling_m3_s, windows.ends.ceiling, look));
    texts.push_back(window_end("floor", windows.floor_m3_s, windows.ends.floor, look));
  }
  if (!windows.why.empty()) texts.push_back(windows.why);
  return texts;
}

void add_whole(Page& page, const ExamineAnswer& answer, const Look& look) {
  const Rating& whole = answer.rating.whole;
  const OverCases over = over_cases_of(answer);
  std::vector<Page::Item> items;
  items.push_back({"hookup", {answer.rating.text}});
  items.push_back(
      {"verdict", {words_of(over.verdict) + (over.worst_case ? ", because of the case " + *over.worst_case : "")}});
  items.push_back(
      {"conversion", {answer.head.conversion_of + " " + figure_with_unit(whole.conversion, Shown::percent, look)}});
  if (!whole.yields.empty()) items.push_back({"yields", {yields_words(whole, look)}});
  if (whole.outlet)
    items.push_back({"outlet",
                     {show(whole.outlet->temperature_K, Shown::temperature, look.units) + ", " +
                      show(whole.outlet->pressure_Pa, Shown::pressure, look.units)}});
  if (whole.hottest_K) items.push_back({"hottest", {show(*whole.hottest_K, Shown::temperature, look.units)}});
  if (whole.start_peak_K)
    items.push_back({"hottest at start-up", {show(*whole.start_peak_K, Shown::temperature, look.units)}});
  items.push_back({"heat", {heat_words(whole.cooling_W, look)}});
  if (whole.preheat_W && *whole.preheat_W != 0)
    items.push_back({"preheating", {show(*whole.preheat_W, Shown::heat, look.units)}});
  if (whole.windows) items.push_back({"window", window_words(*whole.windows, look)});
  if (!answer.cases.empty()) items.push_back({"over all cases", {words_of(over.windows_all_cases, look)}});
  page.items(items);
  if (!whole.stands_in_the_way.empty()) {
    page.heading("What stands in the way");
    for (const std::string& text : whole.stands_in_the_way) page.paragraph(text, 2, 2);
  }
}

void add_vessels(Page& page, const HookupRating& rating, const Look& look) {
  Table table;
  table.columns = {{"vessel", Align::left, true},
                   {"kind"},
                   {"share\n%", Align::point},
                   {"X\n%", Align::point},
                   {with_unit("outlet", Shown::temperature, look), Align::point},
                   {with_unit("hottest", Shown::temperature, look), Align::point},
                   {with_unit("outlet", Shown::pressure, look), Align::point},
                   {with_unit("cooling", Shown::heat, look), Align::point},
                   {"medium", Align::left, true}};
  for (const Rating& vessel : rating.vessels) {
    const auto outlet = [&](double Stream::*what) {
      return vessel.outlet ? std::optional((*vessel.outlet).*what) : std::nullopt;
    };
    table.rows.push_back({vessel.tag, short_kind(vessel.kind), figure(vessel.feed_fraction, Shown::percent, look),
                          figure(vessel.conversion, Shown::percent, look),
                          figure(outlet(&Stream::temperature_K), Shown::temperature, look),
                          figure(vessel.hottest_K, Shown::temperature, look),
                          figure(outlet(&Stream::pressure_Pa), Shown::pressure, look),
                          figure(vessel.cooling_W, Shown::heat, look), vessel.medium.value_or("-")});
  }
  page.heading("Vessels, in the order of the hookup; X is what has been converted up to their outlet");
  page.table(table);
}

struct LimitShown {
  Shown value, margin;
};
LimitShown shown_of(const Limit& limit) {
  if (limit.of_difference) return {Shown::difference, Shown::difference};
  if (limit.unit == "K") return {Shown::temperature, Shown::difference};
  if (limit.unit == "Pa")
    return {limit.name == "pressure drop" ? Shown::pressure_drop : Shown::pressure, Shown::percent};
  if (limit.unit == "m3/s") return {Shown::feed, Shown::percent};
  if (limit.unit == "W") return {Shown::heat, Shown::percent};
  if (limit.unit == "W/m2") return {Shown::heat_flux, Shown::percent};
  return {limit.name == "fill" ? Shown::percent : Shown::number, Shown::percent};
}

std::string margin_text(const Limit& limit, const Look& look) {
  if (!limit.margin) return "-";
  const std::string text = show(*limit.margin, shown_of(limit).margin, look.units);
  return *limit.margin > 0 ? "+" + text : text;
}

void add_limit_rows(Table& table, const Rating& rating, const Look& look) {
  for (const Limit& limit : rating.limits) {
    const Shown shown = shown_of(limit).value;
    table.rows.push_back({rating.tag.empty() ? "whole" : rating.tag, std::string(limit.name),
                          figure(limit.value, shown, look), figure(limit.bound, shown, look),
                          limit.value || limit.bound ? unit_of(shown, look.units) : "", margin_text(limit, look),
                          words_of(limit.state)});
  }
}

void add_limits(Page& page, const HookupRating& rating, const Look& look) {
  Table table;
  table.columns = {{"vessel", Align::left, true},
                   {"limit", Align::left, true},
                   {"value", Align::right},
                   {"bound", Align::right},
                   {"unit"},
                   {"margin", Align::right},
                   {"state"}};
  for (const Rating& vessel : rating.vessels) add_limit_rows(table, vessel, look);
  add_limit_rows(table, rating.whole, look);
  if (table.rows.empty()) return;
  page.heading("Limits");
  page.table(table);
}

/// Which of several states, and how it gets there, in words.
void add_starts(Page& page, const Rating& vessel, const Look& look) {
  const auto& states = vessel.steady_states;
  if (!states || vessel.started.empty() || (states->size() < 2 && vessel.conversion)) return;
  std::string text = vessel.tag + ", " + vessel.started + " before its feed is opened, ";
  const auto reached = std::ranges::find(*states, std::optional(true), &SteadyState::reached);
  if (reached == states->end()) {
    text += "comes to none of them: it ends in a cycle";
  } else {
    text += "comes to " + show(reached->conversion, Shown::percent, look.units) + " at " +
            show(reached->temperature_K, Shown::temperature, look.units);
    if (vessel.peaks) text += ", after a peak of " + show(*vessel.start_peak_K, Shown::temperature, look.units);
  }
  page.paragraph(text + ".", 2, 2);
}

std::string yes_or_no(std::optional<bool> known) { return !known ? "-" : *known ? "yes" : "no"; }

void add_states(Page& page, const HookupRating& rating, const Look& look) {
  Table table;
  table.columns = {{"vessel", Align::left, true},
                   {"X\n%", Align::point},
                   {with_unit("temperature", Shown::temperature, look), Align::point},
                   {"stable"},
                   {"reached by the start"}};
  bool complete = true;
  for (const Rating& vessel : rating.vessels) {
    if (!vessel.steady_states) continue;
    complete = complete && vessel.states_complete.value_or(true);
    for (const SteadyState& state : *vessel.steady_states)
      table.rows.push_back({vessel.tag, figure(state.conversion, Shown::percent, look),
                            figure(state.temperature_K, Shown::temperature, look), yes_or_no(state.stable),
                            yes_or_no(state.reached)});
  }
  if (table.rows.empty()) return;
  page.heading(complete ? "Steady states, all there are" : "Steady states that were found; there may be more");
  page.table(table);
  for (const Rating& vessel : rating.vessels) add_starts(page, vessel, look);
}

/// Indices of a few places spread evenly along the length, both ends among them.
std::vector<std::size_t> places_along(const std::vector<double>& length_m) {
  constexpr int steps = 7;
  std::vector<std::size_t> places;
  for (int i = 0; i <= steps; ++i) {
    const double wanted = length_m.front() + (length_m.back() - length_m.front()) * i / steps;
    const auto nearest = std::min_element(length_m.begin(), length_m.end(), [wanted](double a, double b) {
      return std::abs(a - wanted) < std::abs(b - wanted);
    });
    const auto place = static_cast<std::size_t>(nearest - length_m.begin());
    if (places.empty() || places.back() != place) places.push_back(place);
  }
  return places;
}

constexpr double worth_a_plot_K = 1;

/// A plot with its ends labelled.
void add_plot(Page& page, Plot plot, Shown x, Shown y, const Look& look) {
  if (plot.x.empty()) return;
  const auto [low, high] = range_of(plot.series);
  const auto label = [&](double value, Shown shown) { return figure_with_unit(value, shown, look); };
  plot.ends_x = {label(plot.x.front(), x), label(plot.x.back(), x)};
  plot.ends_y = {label(low, y), label(high, y)};
  page.lines(lines_of(plot));
}

void add_profile(Page& page, const Rating& vessel, const Look& look) {
  const Profile& profile = *vessel.profile;
  const bool held = profile.flux_W_m2.size() == profile.length_m.size();  // what the wall must take is told instead
  Table table;
  table.columns = {{with_unit("from inlet", Shown::length, look), Align::point},
                   {"X\n%", Align::point},
                   {with_unit("temperature", Shown::temperature, look), Align::point},
                   {with_unit("pressure", Shown::pressure, look), Align::point},
                   held ? Column{with_unit("to remove", Shown::heat_flux, look), Align::point}
                        : Column{with_unit("medium", Shown::temperature, look), Align::point}};
  for (std::size_t at : places_along(profile.length_m))
    table.rows.push_back({figure(profile.length_m[at], Shown::length, look),
                          figure(profile.conversion[at], Shown::percent, look),
                          figure(profile.temperature_K[at], Shown::temperature, look),
                          figure(profile.pressure_Pa[at], Shown::pressure, look),
                          held ? figure(profile.flux_W_m2[at], Shown::heat_flux, look)
                               : figure(profile.medium_K[at], Shown::temperature, look)});
  page.heading("Along " + vessel.tag);
  page.table(table);
  const auto [coldest, hottest] = std::ranges::minmax(profile.temperature_K);
  if (hottest - coldest < worth_a_plot_K) return;
  Plot plot{profile.length_m, {}, "the length", {}, {}};
  std::vector<double> medium;
  for (const auto& T : profile.medium_K)
    if (T) medium.push_back(*T);
  if (medium.size() == profile.length_m.size()) plot.series.push_back({'.', "medium", medium});
  plot.series.push_back({'o', "temperature inside", profile.temperature_K});
  page.blank();
  add_plot(page, std::move(plot), Shown::length, Shown::temperature, look);
}

void add_heat_curve(Page& page, const Rating& vessel, const Look& look) {
  const HeatCurve& curve = *vessel.heat_curve;
  page.heading("Heat made and removed in " + vessel.tag + "; a steady state is where they meet");
  add_plot(page,
           {curve.temperature_K,
            {{'-', "heat removed", curve.removed_W}, {'o', "heat made", curve.made_W}},
            "the temperature",
            {},
            {}},
           Shown::temperature, Shown::heat, look);
}

void add_cases(Page& page, const ExamineAnswer& answer, const Look& look) {
  for (const auto& [name, of_case] : answer.cases) {
    const Rating& whole = of_case.rating.whole;
    page.heading("Case " + name);
    std::vector<Page::Item> items = {{"hookup", {of_case.rating.text}},
                                     {"verdict", {words_of(whole.verdict)}},
                                     {"feed rate", {figure_with_unit(of_case.head.feed_m3_s, Shown::feed, look)}},
                                     {"conversion", {figure_with_unit(whole.conversion, Shown::percent, look)}}};
    if (whole.windows) items.push_back({"window", window_words(*whole.windows, look)});
    if (!whole.stands_in_the_way.empty()) items.push_back({"in the way", whole.stands_in_the_way});
    page.items(items);
    for (const Rating& vessel : of_case.rating.vessels) add_starts(page, vessel, look);
  }
}

}  // namespace

std::string to_page(const ExamineAnswer& answer, const Look& look) {
  Page page{look};
  add_head(page, "examine", answer.head, look);
  page.blank();
  add_whole(page, answer, look);
  add_vessels(page, answer.rating, look);
  add_limits(page, answer.rating, look);
  add_states(page, answer.rating, look);
  for (const Rating& vessel : answer.rating.vessels)
    if (vessel.profile && !vessel.profile->length_m.empty()) add_profile(page, vessel, look);
  for (const Rating& vessel : answer.rating.vessels)
    if (vessel.heat_curve) add_heat_curve(page, vessel, look);
  add_cases(page, answer, look);
  add_vessel_cautions(page, answer.rating.vessels);
  add_tail(page, answer.head, answer.rating.whole.cautions);
  return page.text();
}

}  // namespace vatwright
