#include <algorithm>
#include <cctype>
#include <cmath>

#include "page_parts.hpp"
#include "vatwright/report/page.hpp"

namespace vatwright {
namespace {

Shown shown_of(By by) { return by == By::fit || by == By::ceiling ? Shown::feed : Shown::percent; }

std::string order_words(const RankAnswer& answer) {
  switch (answer.by) {
    case By::fit:
      return "what fits first, then fewer vessels, then the higher ceiling";
    case By::conversion:
      return "the higher conversion of " + answer.head.conversion_of;
    case By::ceiling:
      return "the higher ceiling";
    case By::yield:
      break;
  }
  return "the higher yield";
}

std::string space_words(const Ranking& ranking) {
  const std::string all = std::to_string(ranking.hookups);
  std::string text = std::to_string(ranking.offered) + " vessels offered, at most " + std::to_string(ranking.most) +
                     " in a hookup: " + all + " hookups";
  if (ranking.complete == "proved") return text + "; proved: none that was passed over is better";
  if (ranking.complete == "visited")
    return text + ", every one visited (those that differ only in name once: " + std::to_string(ranking.rated) +
           " rated); shares are the best found" +
           (ranking.why_not_proved.empty() ? "" : ", not proved: " + ranking.why_not_proved);
  return text + ", of which " + std::to_string(ranking.rated) + " were rated" +
         (ranking.why_partly.empty() ? "" : ": " + ranking.why_partly);
}

Verdict verdict_of(const RankAnswer& answer, std::size_t i) {
  return i < answer.over_top.size() ? answer.over_top[i].verdict : answer.ranking.top[i].rating.whole.verdict;
}

std::vector<std::string> row_of(const RankAnswer& answer, const std::string& place, const Ranked& ranked,
                                Verdict verdict, const Look& look) {
  const Rating& whole = ranked.rating.whole;
  std::vector<std::string> row = {
      place, ranked.rating.text, words_of(verdict), figure(whole.conversion, Shown::percent, look),
      figure(whole.windows ? whole.windows->ceiling_m3_s : std::nullopt, Shown::feed, look)};
  if (answer.by == By::yield) row.push_back(figure(ranked.value, Shown::percent, look));
  return row;
}

Table main_table(const RankAnswer& answer, const Look& look) {
  Table table;
  table.columns = {{"", Align::right},
                   {"hookup", Align::left, true},
                   {"verdict"},
                   {"X\n%", Align::point},
                   {with_unit("ceiling", Shown::feed, look), Align::point}};
  if (answer.by == By::yield) table.columns.push_back({"yield\n%", Align::point});
  const Ranking& ranking = answer.ranking;
  for (std::size_t i = 0; i < ranking.top.size(); ++i)
    table.rows.push_back(row_of(answer, std::to_string(i + 1), ranking.top[i], verdict_of(answer, i), look));
  return table;
}

void add_same_as(Page& page, const Ranking& ranking) {
  constexpr std::size_t most_told = 3;
  std::vector<Page::Item> items;
  for (std::size_t i = 0; i < ranking.top.size(); ++i) {
    const auto& same = ranking.top[i].same_as;
    if (same.empty()) continue;
    std::vector<std::string> texts(same.begin(), same.begin() + static_cast<long>(std::min(same.size(), most_told)));
    if (same.size() > most_told) texts.push_back("and " + std::to_string(same.size() - most_told) + " more");
    items.push_back({std::to_string(i + 1), texts});
  }
  if (items.empty()) return;
  page.heading("The same in all but name");
  page.items(items);
}

/// Runs of places that differ by less than 0.1 % from the first of them.
void add_near_ties(Page& page, const Ranking& ranking) {
  constexpr double as_good_as = 1e-3;
  std::vector<std::string> runs;
  for (std::size_t i = 0; i < ranking.top.size();) {
    const auto& best = ranking.top[i].value;
    std::size_t end = i + 1;
    while (best && end < ranking.top.size() && ranking.top[end].value &&
           std::abs(*ranking.top[end].value - *best) <= as_good_as * std::abs(*best))
      ++end;
    if (end - i > 1) runs.push_back(std::to_string(i + 1) + (end - i == 2 ? " and " : " to ") + std::to_string(end));
    i = end;
  }
  if (runs.empty()) return;
  std::string text = "Practically equal (within 0.1 %): places ";
  for (std::size_t i = 0; i < runs.size(); ++i) text += (i == 0 ? "" : "; ") + runs[i];
  page.paragraph(text + ".");
}

std::string shares_words(const std::vector<double>& shares, const Look& look) {
  std::string text;
  for (const double share : shares) text += (text.empty() ? "" : " / ") + show(100 * share, Shown::number, look.units);
  return text;
}

void add_splits(Page& page, const RankAnswer& answer, const Look& look) {
  Table table;
  table.columns = {{"", Align::right}, {"split of", Align::left, true}, {"best, %"},
                   {"by volume"},      {"costs\nX %", Align::point},    {"5 off\nX %", Align::point}};
  if (answer.by == By::yield) {
    table.columns[4].head = "costs\nyield %";
    table.columns[5].head = "5 off\nyield %";
  }
  for (std::size_t i = 0; i < answer.ranking.top.size(); ++i)
    for (const SplitCost& split : answer.ranking.top[i].splits) {
      std::string branches;
      for (const auto& branch : split.branches) branches += (branches.empty() ? "" : " | ") + branch;
      table.rows.push_back({std::to_string(i + 1), branches, shares_words(split.best, look),
                            shares_words(split.by_volume, look), figure(split.by_volume_costs, Shown::percent, look),
                            figure(split.off_costs, Shown::percent, look)});
    }
  if (table.rows.empty()) return;
  page.heading("Splits: the best, in proportion to volume, and 5 points off the best");
  page.table(table);
}

void add_kept_out(Page& page, const RankAnswer& answer, const Look& look) {
  if (answer.ranking.kept_out.empty()) return;
  std::vector<Page::Item> items;
  for (const KeptOut& out : answer.ranking.kept_out) {
    std::vector<std::string> lines = {figure_with_unit(out.value, shown_of(answer.by), look) + " if it were allowed"};
    lines.insert(lines.end(), out.stands_in_the_way.begin(), out.stands_in_the_way.end());
    items.push_back({out.hookup, lines});
  }
  page.heading("Would be first, but for a limit");
  page.items(items);
}

/// Relative gain of a ceiling, absolute gain of a conversion or yield, from one step of the stair to the next.
std::optional<double> gain(const Stair& from, const Stair& to, By by) {
  if (!from.value || !to.value) return {};
  if (shown_of(by) == Shown::percent) return *to.value - *from.value;
  return *from.value > 0 ? std::optional(*to.value / *from.value - 1) : std::nullopt;
}

std::optional<double> asked(const RankAnswer& answer) {
  if (answer.by == By::conversion) return answer.head.conversion_asked;
  return answer.by == By::yield ? answer.head.yield_asked : answer.head.feed_m3_s;
}

std::string enough(int vessels) {
  const std::string word = number_word(vessels);
  return (vessels == 1
              ? "One vessel is enough"
              : std::string(1, static_cast<char>(std::toupper(word[0]))) + word.substr(1) + " vessels are enough");
}

/// Where to stop: the first number of vessels that does what is asked, or beyond which one more brings less than 1 %.
std::string stop_words(const RankAnswer& answer) {
  constexpr double little = 0.01;
  const auto& stair = answer.ranking.stair;
  const auto wanted = asked(answer);
  for (std::size_t i = 0; i < stair.size(); ++i) {
    if (!stair[i].value) continue;
    if (wanted && *stair[i].value >= *wanted) return enough(stair[i].vessel_count) + " for what is asked.";
    if (i + 1 == stair.size()) break;
    const auto more = gain(stair[i], stair[i + 1], answer.by);
    if (more && *more < little)
      return "More than " + number_word(stair[i].vessel_count) +
             " bring little (less than 1 %), but do not do what is asked.";
  }
  return "No number of vessels shown here does what is asked.";
}

void add_stair(Page& page, const RankAnswer& answer, const Look& look) {
  const auto& stair = answer.ranking.stair;
  if (stair.empty()) return;
  const Shown shown = shown_of(answer.by);
  Table table;
  table.columns = {
      {"vessels", Align::point},
      {"the best with so many", Align::left, true},
      {with_unit(shown == Shown::feed ? "ceiling" : std::string(text_of(answer.by)), shown, look), Align::point},
      {"gain", Align::point}};
  for (std::size_t i = 0; i < stair.size(); ++i) {
    const auto more = i == 0 ? std::nullopt : gain(stair[i - 1], stair[i], answer.by);
    table.rows.push_back({std::to_string(stair[i].vessel_count), stair[i].best.value_or("-"),
                          figure(stair[i].value, shown, look), more ? show(*more, Shown::percent, look.units) : "-"});
  }
  page.heading("With how few");
  page.table(table);
  page.blank();
  page.paragraph(stop_words(answer));
}

void add_today(Page& page, const RankAnswer& answer, const Look& look) {
  if (!answer.ranking.today) return;
  const Ranked& today = *answer.ranking.today;
  const auto place = answer.ranking.today_place;
  const Verdict verdict = answer.over_today ? answer.over_today->verdict : today.rating.whole.verdict;
  const Rating& whole = today.rating.whole;
  page.heading("Today");
  page.items(
      {{"hookup", {today.rating.text}},
       {"place", {place ? std::to_string(*place) : "beyond those that were rated"}},
       {"verdict", {words_of(verdict)}},
       {"conversion", {figure_with_unit(whole.conversion, Shown::percent, look)}},
       {"ceiling", {figure_with_unit(whole.windows ? whole.windows->ceiling_m3_s : std::nullopt, Shown::feed, look)}}});
}

void add_cases(Page& page, const RankAnswer& answer, const Look& look) {
  for (const auto& [name, of_case] : answer.cases) {
    page.heading("Case " + name + ": its own best");
    page.table(main_table(alone(of_case), look));
  }
}

}  // namespace

std::string to_page(const RankAnswer& answer, const Look& look) {
  Page page{look};
  add_head(page, "rank", answer.head, look,
           {{"order", {order_words(answer)}}, {"space", {space_words(answer.ranking)}}});
  page.blank();
  if (answer.ranking.top.empty())
    page.paragraph("No hookup: no vessel is offered.");
  else
    page.table(main_table(answer, look));
  if (!answer.cases.empty())
    page.paragraph("The order is that of the base; a verdict is the worst over the base and all cases.");
  add_near_ties(page, answer.ranking);
  add_today(page, answer, look);
  add_splits(page, answer, look);
  add_kept_out(page, answer, look);
  add_same_as(page, answer.ranking);
  add_stair(page, answer, look);
  add_cases(page, answer, look);
  add_tail(page, answer.head);
  return page.text();
}

}  // namespace vatwright
