#include "page_parts.hpp"
#include "vatwright/report/page.hpp"

namespace vatwright {
namespace {

std::string ends_words(const Rating& rating) {
  if (!rating.windows) return "-";
  return rating.windows->ends.ceiling.value_or("-");
}

Table main_table(const ScreenAnswer& answer, const Look& look) {
  Table table;
  table.columns = {{"vessel", Align::left, true},
                   {"kind"},
                   {"verdict"},
                   {"X\n%", Align::point},
                   {with_unit("hottest", Shown::temperature, look), Align::point},
                   {with_unit("floor", Shown::feed, look), Align::point},
                   {with_unit("ceiling", Shown::feed, look), Align::point},
                   {"what ends it\nabove", Align::left, true}};
  for (std::size_t i = 0; i < answer.vessels.size(); ++i) {
    const Rating& vessel = answer.vessels[i];
    const auto& windows = vessel.windows;
    table.rows.push_back(
        {vessel.tag, short_kind(vessel.kind), words_of(over_cases_of(answer, i).verdict),
         figure(vessel.conversion, Shown::percent, look), figure(vessel.hottest_K, Shown::temperature, look),
         figure(windows ? windows->floor_m3_s : std::nullopt, Shown::feed, look),
         figure(windows ? windows->ceiling_m3_s : std::nullopt, Shown::feed, look), ends_words(vessel)});
  }
  return table;
}

std::string tally(const ScreenAnswer& answer) {
  long long fit = 0, not_fit = 0, unknown = 0;
  for (std::size_t i = 0; i < answer.vessels.size(); ++i) {
    const Verdict verdict = over_cases_of(answer, i).verdict;
    ++(verdict == Verdict::fits ? fit : verdict == Verdict::does_not_fit ? not_fit : unknown);
  }
  if (answer.vessels.empty()) return "No vessel is offered.";
  std::string text = "Of " + number_word(fit + not_fit + unknown) +
                     (answer.vessels.size() == 1 ? " vessel " : " vessels ") + number_word(fit) +
                     (fit <= 1 ? " fits" : " fit");
  if (not_fit != 0) text += ", " + number_word(not_fit) + (not_fit == 1 ? " does not" : " do not");
  if (unknown != 0) text += ", of " + number_word(unknown) + " it cannot be told";
  return text + (answer.cases.empty() ? "." : ", over the base and all cases.");
}

void add_windows(Page& page, const ScreenAnswer& answer, const Look& look) {
  std::vector<Page::Item> items;
  for (const Rating& vessel : answer.vessels) {
    if (!vessel.windows) continue;
    std::vector<std::string> texts;
    if (vessel.windows->intervals.size() > 1) texts.push_back(words_of(vessel.windows->intervals, look));
    if (!vessel.windows->why.empty()) texts.push_back(vessel.windows->why);
    if (!texts.empty()) items.push_back({vessel.tag, texts});
  }
  if (items.empty()) return;
  page.heading("Windows that the table does not tell whole");
  page.items(items);
}

/// One paragraph a case: what differs from the base, and why.
void add_cases(Page& page, const ScreenAnswer& answer, const Look& look) {
  for (const auto& [name, of_case] : answer.cases) {
    page.heading("Case " + name + ", " + figure_with_unit(of_case.head.feed_m3_s, Shown::feed, look));
    std::vector<Page::Item> items;
    for (std::size_t i = 0; i < of_case.vessels.size(); ++i) {
      const Rating& vessel = of_case.vessels[i];
      std::vector<std::string> texts = {words_of(vessel.verdict)};
      if (vessel.verdict != answer.vessels[i].verdict)
        texts.insert(texts.end(), vessel.stands_in_the_way.begin(), vessel.stands_in_the_way.end());
      if (vessel.windows) texts.front() += "; window " + words_of(vessel.windows->intervals, look);
      items.push_back({vessel.tag, texts});
    }
    page.items(items);
  }
}

}  // namespace

std::string to_page(const ScreenAnswer& answer, const Look& look) {
  Page page{look};
  add_head(page, "screen", answer.head, look);
  page.blank();
  page.paragraph(tally(answer));
  if (!answer.vessels.empty()) {
    page.blank();
    page.table(main_table(answer, look));
  }
  const std::vector<Page::Item> in_the_way = obstacles(answer.vessels);
  if (!in_the_way.empty()) {
    page.heading(answer.cases.empty() ? "What stands in the way" : "What stands in the way, in the base");
    page.items(in_the_way);
  }
  add_windows(page, answer, look);
  add_cases(page, answer, look);
  add_vessel_cautions(page, answer.vessels);
  add_tail(page, answer.head);
  return page.text();
}

}  // namespace vatwright
