#include "vatwright/field/scope.hpp"

#include "vatwright/quantity/show.hpp"

namespace vatwright {
namespace {

std::string dotted(const std::string& left, std::string_view right) {
  return left.empty() ? std::string(right) : left + "." + std::string(right);
}

}  // namespace

Scope Scope::inside(std::string_view key, Place at) const {
  Scope s = *this;
  s.top = false;
  s.place = at;
  s.trail = dotted(trail, key);
  if (top)
    s.subject = key, s.path.clear();
  else
    s.path = dotted(path, key);
  return s;
}

Scope Scope::named(std::string new_subject, std::string_view trail_step, Place at) const {
  Scope s = *this;
  s.top = false;
  s.place = at;
  s.trail = dotted(trail, trail_step);
  s.subject = std::move(new_subject);
  s.path.clear();
  return s;
}

std::string Scope::name(std::string_view key) const { return key.empty() ? path : dotted(path, key); }

void Scope::error(Place at, std::string_view key, std::string found, std::string expected) const {
  diagnostics->error(at, subject, name(key), std::move(found), std::move(expected));
}

void Scope::warning(Place at, std::string_view key, std::string found, std::string expected) const {
  diagnostics->warning(at, subject, name(key), std::move(found), std::move(expected));
}

std::string found_text(const Node& node) {
  struct {
    std::string operator()(const std::string& s) const { return quoted(s); }
    std::string operator()(std::int64_t i) const { return std::to_string(i); }
    std::string operator()(double x) const {
      return x != x ? "nan" : x - x != 0 ? (x > 0 ? "inf" : "-inf") : shortest(x);
    }
    std::string operator()(bool b) const { return b ? "true" : "false"; }
    std::string operator()(const Array&) const { return "a list"; }
    std::string operator()(const Table&) const { return "a table"; }
    std::string operator()(const Node::Other& o) const { return o.what; }
  } what;
  return "found " + std::visit(what, node.value);
}

std::string joined(const std::vector<std::string>& words, std::string_view last) {
  std::string text;
  for (std::size_t i = 0; i < words.size(); ++i) {
    if (i > 0) text += i + 1 == words.size() ? std::string(" ").append(last) + " " : ", ";
    text += words[i];
  }
  return text;
}

std::string meant(std::string_view word, const std::vector<std::string>& known) { return nearest(word, known); }

std::string hint(std::string_view word, const std::vector<std::string>& known) {
  const std::string near = meant(word, known);
  if (!near.empty()) return "nearest: " + quoted(near);
  if (known.empty()) return "none is known";
  constexpr std::size_t most = 12;
  if (known.size() <= most) return "known: " + joined(known, "and");
  return "known: " + joined({known.begin(), known.begin() + most}, ",") + " and others";
}

}  // namespace vatwright
