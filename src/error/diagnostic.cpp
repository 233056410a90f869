#include "vatwright/error/diagnostic.hpp"

#include <algorithm>
#include <limits>
#include <tuple>
#include <utility>

#include "vatwright/error/glyph.hpp"

namespace vatwright {
namespace {

auto everything(const Diagnostic& d) {
  return std::tie(d.severity, d.place.source, d.place.line, d.place.column, d.subject, d.key, d.found, d.expected);
}

/// What belongs to no file comes after all files.
auto place_of(const Diagnostic& d) {
  const int source = d.place.source < 0 ? std::numeric_limits<int>::max() : d.place.source;
  return std::tuple(source, d.place.line, d.place.column);
}

}  // namespace

int Diagnostics::add_source(std::string name, std::string text) {
  sources_.push_back({std::move(name), std::move(text)});
  return static_cast<int>(sources_.size()) - 1;
}

void Diagnostics::error(Place place, std::string subject, std::string key, std::string found, std::string expected) {
  all_.push_back({Severity::error, place, harmless(subject), harmless(key), harmless(found), harmless(expected)});
}

void Diagnostics::warning(Place place, std::string subject, std::string key, std::string found, std::string expected) {
  all_.push_back({Severity::warning, place, harmless(subject), harmless(key), harmless(found), harmless(expected)});
}

bool Diagnostics::has_errors() const {
  return std::any_of(all_.begin(), all_.end(), [](const Diagnostic& d) { return d.severity == Severity::error; });
}

std::vector<Diagnostic> Diagnostics::sorted() const {
  // Repeats are found in an order that brings them together; what was told first at one place stays first.
  std::vector<std::size_t> order(all_.size());
  for (std::size_t i = 0; i < order.size(); ++i) order[i] = i;
  std::stable_sort(order.begin(), order.end(),
                   [&](auto a, auto b) { return everything(all_[a]) < everything(all_[b]); });
  const auto same = [&](auto a, auto b) { return everything(all_[a]) == everything(all_[b]); };
  order.erase(std::unique(order.begin(), order.end(), same), order.end());
  std::sort(order.begin(), order.end(),
            [&](auto a, auto b) { return std::pair(place_of(all_[a]), a) < std::pair(place_of(all_[b]), b); });
  std::vector<Diagnostic> told;
  told.reserve(order.size());
  for (const std::size_t i : order) told.push_back(all_[i]);
  return told;
}

}  // namespace vatwright
