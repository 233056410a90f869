#include "vatwright/input/read.hpp"

#include <algorithm>

#include "build_duty.hpp"
#include "cases.hpp"
#include "file.hpp"
#include "like.hpp"
#include "site.hpp"
#include "toml.hpp"
#include "understood.hpp"
#include "vatwright/field/merge.hpp"

namespace vatwright {
namespace {

/// A text as tables, or nothing where its form is wrong (told).
std::optional<Table> tables_of(const FileText& file, Diagnostics& diagnostics) {
  const int source = diagnostics.add_source(file.name, file.text);
  const Place top{source, 1, 1};
  if (!file.fault.empty()) return diagnostics.error(top, "", "", file.fault), std::nullopt;
  return parse_toml(file.text, source, diagnostics);
}

Scope top_scope(Diagnostics& diagnostics, Collected& collected, const std::string& subject, Place at) {
  Scope scope;
  scope.diagnostics = &diagnostics;
  scope.collected = &collected;
  scope.subject = subject;
  scope.top = true;
  scope.place = at;
  return scope;
}

/// A file given in the place of the other is told as that, and as nothing else.
bool is_swapped(const Table& table, bool as_inventory, Place at, Diagnostics& diagnostics) {
  const bool has_vessels = table.find("vessel"),
             has_duty = table.find("reaction") || table.find("target") || table.find("conversion_of");
  if (as_inventory && has_duty && !has_vessels) {
    diagnostics.error(at, "", "", "this is a duty", "expected an inventory; the order is INVENTORY DUTY");
    return true;
  }
  if (!as_inventory && has_vessels && !has_duty) {
    diagnostics.error(at, "", "", "this is an inventory", "expected a duty; the order is INVENTORY DUTY");
    return true;
  }
  return false;
}

template <class D>
void check_format(const D& draft, Diagnostics& diagnostics, const std::string& subject) {
  if (draft.format && *draft.format != 1)
    diagnostics.error(draft.format.place, subject, "format", "found format " + std::to_string(*draft.format),
                      "this program reads format 1; the file is newer, or it was typed wrong");
}

/// Both files, read and judged together.
class Reader {
 public:
  Reader(Diagnostics& diagnostics, std::string fallback_site, std::string folder, std::string fallback_duty)
      : diagnostics_(diagnostics),
        fallback_site_(std::move(fallback_site)),
        folder_(std::move(folder)),
        fallback_duty_(std::move(fallback_duty)) {}

  void read_inventory(const Table& table, Place at) {
    InventoryDraft draft;
    read_table(inventory_fields(), table, top_scope(diagnostics_, of_site_, "inventory", at), draft);
    check_format(draft, diagnostics_, "inventory");
    problem_.site = build_site(draft, fallback_site_, builder());
    for (const FoundSpread& s : of_site_.spreads) problem_.site.spreads.push_back({s.key, s.relative, s.half_width});
  }

  void read_duty(const Table& table, Place at) {
    DutyDraft draft;
    of_duty_.bar_told = of_site_.bar_told;
    read_table(duty_fields(), table, top_scope(diagnostics_, of_duty_, "duty", at), draft);
    check_format(draft, diagnostics_, "duty");
    problem_.duty = build_duty(draft, problem_.site, folder_, builder());
    if (problem_.duty.name.empty()) problem_.duty.name = fallback_duty_;
    for (const FoundSpread& s : of_duty_.spreads) problem_.duty.spreads.push_back({s.key, s.relative, s.half_width});
    if (!of_site_.spreads.empty() || !of_duty_.spreads.empty()) problem_.not_asked.push_back("spread");
  }

  Problem take() { return std::move(problem_); }

 private:
  Builder builder() { return {&diagnostics_, &problem_.assumed}; }

  Diagnostics& diagnostics_;
  std::string fallback_site_, folder_, fallback_duty_;
  Collected of_site_, of_duty_;
  Problem problem_;
};

std::string stem_of(const std::string& name) {
  const auto slash = name.rfind('/');
  const std::string file = slash == std::string::npos ? name : name.substr(slash + 1);
  return file.substr(0, file.rfind('.') == 0 ? std::string::npos : file.rfind('.'));
}
std::string folder_of(const std::string& name) {
  const auto slash = name.rfind('/');
  return slash == std::string::npos ? "" : name.substr(0, slash + 1);
}

/// --feed-rate in place of what the duty says.
void put_feed_rate(Table& duty, const std::string& text, Diagnostics& diagnostics) {
  const int source = diagnostics.add_source("--feed-rate", text);
  Node* target = duty.find("target");
  if (!target || !target->table()) return;  // its absence is told when the table is read
  remove_key(*target->table(), "production");
  remove_key(*target->table(), "feed_rate");
  target->table()->members.push_back({"feed_rate", {source, 1, 1}, {text, {source, 1, 1}}});
}

bool same(const Diagnostic& a, const Diagnostic& b) {
  return a.place == b.place && a.key == b.key && a.found == b.found && a.severity == b.severity;
}

/// Reads one case as files of their own; only what the base had not told already is told, with the name of the case.
Problem read_case(const std::string& name, const Table& overrides, Table inventory, Table duty,
                  const std::string& site_name, const std::string& duty_name, Diagnostics& diagnostics) {
  Diagnostics own;
  for (const Source& s : diagnostics.sources()) own.add_source(s.name, s.text);
  apply_case(overrides, name, inventory, duty, own);
  Reader reader(own, stem_of(site_name), folder_of(duty_name), stem_of(duty_name));
  reader.read_inventory(inventory, {0, 1, 1});
  reader.read_duty(duty, {1, 1, 1});
  const auto told = diagnostics.sorted();
  for (const Diagnostic& d : own.sorted()) {
    if (std::any_of(told.begin(), told.end(), [&](const Diagnostic& t) { return same(t, d); })) continue;
    const std::string subject = d.subject.rfind("case ", 0) == 0 ? d.subject : "case " + name + ", " + d.subject;
    if (d.severity == Severity::error)
      diagnostics.error(d.place, subject, d.key, d.found, d.expected);
    else
      diagnostics.warning(d.place, subject, d.key, d.found, d.expected);
  }
  return reader.take();
}

void read_cases(const Table& inventory, Table duty, const std::string& site_name, const std::string& duty_name,
                ReadResult& result, Problems& problems) {
  const Node* node = duty.find("case");
  if (!node) return;
  if (!node->table())
    return result.diagnostics.error(node->place, "duty", "case", found_text(*node),
                                    "expected a table for each case, [case.NAME]");
  const Table cases = *node->table();
  remove_key(duty, "case");
  for (const Member& m : cases.members) {
    if ((m.key == "note" || m.key == "source") && m.value.text()) continue;
    if (!m.value.table())
      result.diagnostics.error(m.value.place, "case", m.key, found_text(m.value), "expected a table, [case.NAME]");
    else
      problems.cases.emplace_back(
          m.key, read_case(m.key, *m.value.table(), inventory, duty, site_name, duty_name, result.diagnostics));
  }
}

}  // namespace

ReadResult read_texts(const FileText& inventory, const std::optional<FileText>& duty,
                      const std::optional<std::string>& feed_rate) {
  ReadResult result;
  Diagnostics& diagnostics = result.diagnostics;
  result.inventory_sha256 = sha256_of(inventory.text);
  if (duty) result.duty_sha256 = sha256_of(duty->text);
  auto site_tables = tables_of(inventory, diagnostics);
  auto duty_tables = duty ? tables_of(*duty, diagnostics) : std::nullopt;
  if (site_tables && is_swapped(*site_tables, true, {0, 1, 1}, diagnostics)) site_tables.reset();
  if (duty_tables && is_swapped(*duty_tables, false, {1, 1, 1}, diagnostics)) duty_tables.reset();
  Reader reader(diagnostics, stem_of(inventory.name), duty ? folder_of(duty->name) : "",
                duty ? stem_of(duty->name) : "");
  if (site_tables) {
    resolve_likes(*site_tables, diagnostics);
    reader.read_inventory(*site_tables, {0, 1, 1});
  }
  if (duty_tables) {
    if (feed_rate) put_feed_rate(*duty_tables, *feed_rate, diagnostics);
    reader.read_duty(*duty_tables, {1, 1, 1});
  }
  Problems problems;
  problems.base = reader.take();
  if (site_tables && duty_tables) read_cases(*site_tables, *duty_tables, inventory.name, duty->name, result, problems);
  if (diagnostics.has_errors()) return result;
  result.site = problems.base.site;
  result.understood = tell_site(*result.site);
  if (!duty) return result;
  for (std::string& sentence : tell_duty(problems)) result.understood.push_back(std::move(sentence));
  result.problems = std::move(problems);
  return result;
}

ReadResult read_files(const std::string& inventory_path, const std::optional<std::string>& duty_path,
                      const std::optional<std::string>& feed_rate) {
  const auto text_of = [](const std::string& path) {
    Bytes bytes = read_bytes(path);
    return FileText{path, std::move(bytes.text), std::move(bytes.fault)};
  };
  return read_texts(text_of(inventory_path), duty_path ? std::optional(text_of(*duty_path)) : std::nullopt, feed_rate);
}

}  // namespace vatwright
