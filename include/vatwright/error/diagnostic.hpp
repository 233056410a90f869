#pragma once
#include <string>
#include <string_view>
#include <vector>

namespace vatwright {

/// A place in a file that was read: which file (index into Diagnostics::sources, -1: none), line and column from 1.
/// Columns count code points.
struct Place {
  int source = -1;
  int line = 0;
  int column = 0;
  friend bool operator==(const Place&, const Place&) = default;
};

enum class Severity { error, warning };

/// One fault that a user made, told as `file:line:column: subject, key: found; expected`.
/// subject: what the key belongs to ("K-201", "reaction acylation", "feed"); key may be empty. found and expected are
/// lower case, without a full stop; expected may be empty where found says it all.
struct Diagnostic {
  Severity severity = Severity::error;
  Place place;
  std::string subject, key, found, expected;
};

/// A file that was read: the name as the user gave it and its whole text.
struct Source {
  std::string name;
  std::string text;
};

/// Collects every fault of a run, so that all are told at once. Throws nothing. The four texts of a fault may hold any
/// bytes: they are kept as valid UTF-8 on one line, control characters and other bytes written out (\x1b, \xff).
class Diagnostics {
 public:
  /// Registers a file; the answer is the index for Place::source.
  int add_source(std::string name, std::string text);

  void error(Place place, std::string subject, std::string key, std::string found, std::string expected = {});
  void warning(Place place, std::string subject, std::string key, std::string found, std::string expected = {});

  [[nodiscard]] bool has_errors() const;
  [[nodiscard]] const std::vector<Source>& sources() const { return sources_; }
  /// All faults in the order of files, lines and columns; exact repeats are told once.
  [[nodiscard]] std::vector<Diagnostic> sorted() const;

 private:
  std::vector<Source> sources_;
  std::vector<Diagnostic> all_;
};

/// The text shown to a person: each fault on a line of its own, then the line of the file with a mark under the place
/// (cut around it to 76 columns; only for the first 200 faults). Valid UTF-8 whatever the file holds.
/// Warnings say so ("warning: " after the place). colour: ANSI colour around the mark and the severity.
std::string to_text(const Diagnostics& diagnostics, bool colour);

/// The word of `known` nearest to `word` by edits, or empty where none is near (more than a third of the letters wrong;
/// one wrong letter is near from two letters on). Where edits lead nowhere, the one word that has it as a part
/// ("tank", "stirred-tank"). Ignoring case and the characters - _ counts as nearest of all.
std::string nearest(std::string_view word, const std::vector<std::string>& known);

}  // namespace vatwright
