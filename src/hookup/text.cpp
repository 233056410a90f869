#include <algorithm>
#include <cmath>

#include "lexer.hpp"
#include "vatwright/hookup/expression.hpp"

namespace vatwright {
namespace {

using Join = Hookup::Join;

constexpr long whole_in_ticks = 1'000'000;  // a tick is the fourth decimal of a per cent

bool needs_quotes(const std::string& tag) {
  if (tag.empty() || tag == "then" || tag == "beside" || tag.front() == '%') return true;
  if (tag.find_first_of(" \t\n\r\f\v[]\"") != std::string::npos) return true;
  return leading_percent(tag).has_value();
}

std::string quoted_where_needed(const std::string& tag) {
  if (!needs_quotes(tag)) return tag;
  std::string text = "\"";
  for (const char c : tag) {
    if (c == '"' || c == '\\') text += '\\';
    text += c;
  }
  return text + '"';
}

std::string percent_of(long ticks) {
  std::string text = std::to_string(ticks / 10'000);
  if (const long part = ticks % 10'000; part != 0) {
    std::string decimals = std::to_string(part);
    decimals.insert(0, 4 - decimals.size(), '0');
    decimals.erase(decimals.find_last_not_of('0') + 1);
    text += "." + decimals;
  }
  return text + "%";
}

// Fixed shares in ticks, none below one, the last the remainder to 100 where all are fixed.
std::vector<std::optional<long>> ticks_of(const Hookup& h) {
  std::vector<std::optional<long>> ticks;
  for (const auto& share : h.shares) {
    ticks.push_back(share ? std::optional(std::max(1L, std::lround(*share * whole_in_ticks))) : std::nullopt);
  }
  if (ticks.empty() || std::count(ticks.begin(), ticks.end(), std::nullopt) > 0) return ticks;
  long left = whole_in_ticks;
  for (std::size_t i = 0; i + 1 < ticks.size(); ++i) left -= *ticks[i];
  if (left < 1) {  // the last is below a tick: the largest gives it
    **std::max_element(ticks.begin(), ticks.end() - 1) -= 1 - left;
    left = 1;
  }
  ticks.back() = left;
  return ticks;
}

std::string written(const Hookup& h, const Site& site, bool bracket) {
  if (h.join == Join::vessel) return quoted_where_needed(site.vessels[static_cast<std::size_t>(h.vessel)].tag);
  const auto ticks = ticks_of(h);
  std::string text;
  for (std::size_t i = 0; i < h.parts.size(); ++i) {
    if (i > 0) text += h.join == Join::then ? " then " : " beside ";
    if (h.join == Join::beside && ticks[i]) text += percent_of(*ticks[i]) + " ";
    text += written(h.parts[i], site, true);
  }
  return bracket ? "[" + text + "]" : text;
}

}  // namespace

std::string to_text(const Hookup& hookup, const Site& site, const std::vector<double>& shares) {
  const Hookup h = shares.empty() ? hookup : with_shares(hookup, shares);
  // The whole stands bare where it is a series of its own; a beside is always a group.
  return written(h, site, h.join == Join::beside);
}

}  // namespace vatwright
