#include "page_parts.hpp"

#include <algorithm>
#include <array>

namespace vatwright {

namespace {
std::string with_spaces(std::string_view text) {
  std::string words(text);
  std::replace(words.begin(), words.end(), '-', ' ');
  return words;
}
}  // namespace

std::string words_of(Verdict verdict) { return with_spaces(text_of(verdict)); }
std::string words_of(Limit::State state) { return with_spaces(text_of(state)); }

std::string short_kind(const std::string& kind) {
  if (kind == "stirred-tank") return "tank";
  if (kind == "packed-tube") return "packed";
  return kind;
}

std::string number_word(long long n) {
  static constexpr std::array words = {"none",  "one",   "two",  "three", "four",   "five",  "six",
                                       "seven", "eight", "nine", "ten",   "eleven", "twelve"};
  if (n >= 0 && n < static_cast<long long>(words.size())) return words[static_cast<std::size_t>(n)];
  return std::to_string(n);
}

std::string figure(std::optional<double> si, Shown shown, const Look& look) {
  return si ? show_number(*si, shown, look.units) : "-";
}
std::string figure_with_unit(std::optional<double> si, Shown shown, const Look& look) {
  return si ? show(*si, shown, look.units) : "-";
}

std::string words_of(const std::vector<Interval>& windows, const Look& look) {
  std::string text;
  for (const Interval& window : windows) {
    if (!text.empty()) text += " and ";
    if (window.lo && window.hi)
      text += show_number(*window.lo, Shown::feed, look.units) + " .. " + show(*window.hi, Shown::feed, look.units);
    else if (window.hi)
      text += "up to " + show(*window.hi, Shown::feed, look.units);
    else
      text += window.lo ? "from " + show(*window.lo, Shown::feed, look.units) + " on" : "any feed rate searched";
  }
  return text.empty() ? "none" : text;
}

std::string with_unit(const std::string& name, Shown shown, const Look& look) {
  return name + "\n" + unit_of(shown, look.units);
}

void add_head(Page& page, const std::string& command, const Head& head, const Look& look,
              const std::vector<Page::Item>& more) {
  page.title("Vatwright " + head.made_by.version + ", " + command);
  std::vector<Page::Item> items = {{"site", {head.site}}};
  if (!head.duty.empty()) items.push_back({"duty", {head.duty}});
  if (!head.target.empty()) items.push_back({"asked", head.target});
  if (head.feed_m3_s) items.push_back({"feed rate", {show(*head.feed_m3_s, Shown::feed, look.units)}});
  if (head.stamp) items.push_back({"stamp", {*head.stamp}});
  items.insert(items.end(), more.begin(), more.end());
  page.items(items);
}

void add_tail(Page& page, const Head& head, const std::vector<Caution>& more) {
  if (!head.assumed.empty()) {
    page.heading("Assumed");
    for (const Assumed& assumed : head.assumed)
      page.paragraph(assumed.key + " = " + assumed.value + (assumed.why.empty() ? "" : ": " + assumed.why), 2, 2);
  }
  if (!head.not_asked.empty()) {
    std::string all;
    for (const std::string& item : head.not_asked) all += (all.empty() ? "" : "; ") + item;
    page.heading("Not asked");
    page.paragraph(all, 2);
  }
  std::vector<Caution> cautions = head.cautions;
  for (const Caution& caution : more)
    if (std::find(cautions.begin(), cautions.end(), caution) == cautions.end()) cautions.push_back(caution);
  if (cautions.empty()) return;
  page.heading("Cautions");
  for (const Caution& caution : cautions) page.paragraph("- " + caution.text, 2, 2);
}

void add_vessel_cautions(Page& page, const std::vector<Rating>& vessels) {
  std::vector<std::pair<std::string, std::string>> said;  // text, then tags
  for (const Rating& vessel : vessels)
    for (const Caution& caution : vessel.cautions) {
      const auto known = std::find_if(said.begin(), said.end(), [&](const auto& s) { return s.first == caution.text; });
      if (known == said.end())
        said.emplace_back(caution.text, vessel.tag);
      else
        known->second += ", " + vessel.tag;
    }
  if (said.empty()) return;
  page.heading("Of single vessels");
  std::vector<Page::Item> items;
  for (const auto& [text, tags] : said) items.push_back({tags, {text}});
  page.items(items);
}

std::vector<Page::Item> obstacles(const std::vector<Rating>& ratings) {
  std::vector<Page::Item> items;
  for (const Rating& rating : ratings)
    if (rating.verdict != Verdict::fits && !rating.stands_in_the_way.empty())
      items.push_back({rating.tag, rating.stands_in_the_way});
  return items;
}

}  // namespace vatwright
