#include <algorithm>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

#include "vatwright/error/diagnostic.hpp"

namespace vatwright {
namespace {

constexpr std::size_t longest = 120;  // bytes; the table of edits grows with the square

std::string folded(std::string_view word) {
  std::string plain;
  for (const char c : word)
    if (c != '-' && c != '_') plain += c >= 'A' && c <= 'Z' ? static_cast<char>(c - 'A' + 'a') : c;
  return plain;
}

/// Fewest letters put in, left out, replaced or swapped with their neighbour (optimal string alignment, after
/// F. J. Damerau, Comm. ACM 7 (3), 1964, 171-176).
std::size_t edits(const std::string& a, const std::string& b) {
  std::vector<std::size_t> two_up, up(b.size() + 1), row(b.size() + 1);
  for (std::size_t j = 0; j <= b.size(); ++j) row[j] = j;
  for (std::size_t i = 1; i <= a.size(); ++i) {
    two_up = std::exchange(up, row);
    row[0] = i;
    for (std::size_t j = 1; j <= b.size(); ++j) {
      row[j] = std::min({up[j] + 1, row[j - 1] + 1, up[j - 1] + (a[i - 1] == b[j - 1] ? 0 : 1)});
      if (i > 1 && j > 1 && a[i - 1] == b[j - 2] && a[i - 2] == b[j - 1]) row[j] = std::min(row[j], two_up[j - 2] + 1);
    }
  }
  return row[b.size()];
}

/// "tank" is a part of "stirred-tank", "rate" of "feed_rate".
bool is_part(const std::string& word, std::string_view known) {
  std::string part;
  for (const char c : std::string(known) + '-') {
    if (c != '-' && c != '_') {
      part += c;
      continue;
    }
    if (folded(part) == word) return true;
    part.clear();
  }
  return false;
}

/// The one known word that has `word` as a part; empty where there is none or more than one.
std::string whole_of(const std::string& word, const std::vector<std::string>& known) {
  if (word.size() < 3) return {};
  const auto has_part = [&](const std::string& k) { return is_part(word, k); };
  const auto first = std::find_if(known.begin(), known.end(), has_part);
  if (first == known.end() || std::find_if(first + 1, known.end(), has_part) != known.end()) return {};
  return *first;
}

}  // namespace

std::string nearest(std::string_view word, const std::vector<std::string>& known) {
  const std::string asked = folded(word);
  if (asked.empty()) return {};
  for (const std::string& k : known)
    if (folded(k) == asked) return k;
  if (asked.size() > longest) return {};

  std::string best;
  std::size_t fewest = longest;
  for (const std::string& k : known) {
    const std::string candidate = folded(k);
    const std::size_t length = std::max(asked.size(), candidate.size());
    const std::size_t allowed = length == 1 ? 0 : std::max<std::size_t>(1, length / 3);
    const std::size_t apart = length - std::min(asked.size(), candidate.size());
    if (candidate.empty() || candidate.size() > longest || apart > allowed || apart >= fewest) continue;
    const std::size_t count = edits(asked, candidate);
    if (count <= allowed && count < fewest) fewest = count, best = k;
  }
  return best.empty() ? whole_of(asked, known) : best;
}

}  // namespace vatwright
