#pragma once
#include <string>
#include <string_view>
#include <vector>

#include "vatwright/error/diagnostic.hpp"
#include "vatwright/field/given.hpp"
#include "vatwright/field/node.hpp"
#include "vatwright/quantity/wording.hpp"

namespace vatwright {

/// What is gathered beside the values while files are read.
struct Collected {
  std::vector<FoundSpread> spreads;
  bool bar_told = false;  ///< that plain "bar" is absolute is said once
};

/// Where the reader is: what a message names (subject "K-201", path "jacket"), the full path for spreads
/// ("vessel.K-201.jacket"), and where faults and spreads are
/// collected. Both outlive it.
struct Scope {
  Diagnostics* diagnostics = nullptr;
  Collected* collected = nullptr;
  std::string subject, path, trail;
  bool top = false;  ///< the top of a file: its tables are subjects of their own
  Place place;       ///< of the table

  /// The scope of a table under `key`: "feed" from the top, "jacket" within "K-201".
  [[nodiscard]] Scope inside(std::string_view key, Place at) const;
  /// The scope of a table with a name of its own: subject "reaction acylation", trail "reaction.acylation".
  [[nodiscard]] Scope named(std::string new_subject, std::string_view trail_step, Place at) const;
  /// A key as messages name it: "jacket.U".
  [[nodiscard]] std::string name(std::string_view key) const;

  void error(Place at, std::string_view key, std::string found, std::string expected = {}) const;
  void warning(Place at, std::string_view key, std::string found, std::string expected = {}) const;
};

/// What a value is, for messages: `found "abc"`, `found 6.3`, `found a list`, `found a table`.
std::string found_text(const Node& node);
/// "A", "A and B", "A, B and C" (the joining word given).
std::string joined(const std::vector<std::string>& words, std::string_view last);
/// The word of `known` that is meant: one that contains it or is contained in it, else the nearest by edits; or empty.
std::string meant(std::string_view word, const std::vector<std::string>& known);
/// `; nearest: "tower-water"`, or the list of all where none is near: `; known: a, b`.
std::string hint(std::string_view word, const std::vector<std::string>& known);

}  // namespace vatwright
