#include <map>
#include <string>

#include "excerpt.hpp"
#include "vatwright/error/diagnostic.hpp"
#include "vatwright/error/glyph.hpp"

namespace vatwright {
namespace {

constexpr int most_excerpts = 200;  // a file of thousands of faults is told in full, but its lines are not all repeated

std::string place_text(const Place& place, const std::vector<Source>& sources) {
  if (place.source < 0 || static_cast<std::size_t>(place.source) >= sources.size()) return {};
  std::string text = harmless(sources[static_cast<std::size_t>(place.source)].name);
  if (place.line > 0) text.append(1, ':').append(std::to_string(place.line));
  if (place.line > 0 && place.column > 0) text.append(1, ':').append(std::to_string(place.column));
  return text + ": ";
}

std::string painted(const std::string& text, Severity severity, bool colour) {
  if (!colour) return text;
  return (severity == Severity::error ? "\x1b[1;31m" : "\x1b[1;33m") + text + "\x1b[0m";
}

std::string headline(const Diagnostic& d, const std::vector<Source>& sources, bool colour) {
  std::string text = place_text(d.place, sources);
  if (d.severity == Severity::warning) text += painted("warning:", d.severity, colour) + " ";
  text += d.subject;
  if (!d.subject.empty() && !d.key.empty()) text += ", ";
  text += d.key;
  if (!d.subject.empty() || !d.key.empty()) text += ": ";
  text += d.found;
  if (!d.found.empty() && !d.expected.empty()) text += "; ";
  return text + d.expected + "\n";
}

}  // namespace

std::string to_text(const Diagnostics& diagnostics, bool colour) {
  const auto& sources = diagnostics.sources();
  std::map<int, Lines> lines;
  std::string text;
  int excerpts = 0;
  for (const Diagnostic& d : diagnostics.sorted()) {
    text += headline(d, sources, colour);
    const bool placed = d.place.source >= 0 && static_cast<std::size_t>(d.place.source) < sources.size();
    if (!placed || d.place.line < 1 || ++excerpts > most_excerpts) continue;
    const auto found = lines.try_emplace(d.place.source, sources[static_cast<std::size_t>(d.place.source)].text).first;
    const std::string_view line = found->second.line(d.place.line);
    if (line.empty()) continue;
    const Excerpt shown = excerpt(line, d.place.column);
    text += "    " + shown.line + "\n";
    if (d.place.column > 0) {
      const std::string blank = shown.mark.substr(0, shown.mark.size() - 1);
      text += "    " + blank + painted("^", d.severity, colour) + "\n";
    }
  }
  return text;
}

}  // namespace vatwright
