#include "reference_case.hpp"

#include <unistd.h>

#include <cmath>
#include <cstdlib>
#include <filesystem>
#include <fstream>
#include <nlohmann/json.hpp>
#include <sstream>

#include "vatwright/cli/run.hpp"

namespace vatwright::reference {
namespace {

using nlohmann::json;

std::string next_word(std::istream& in) {
  std::string word;
  in >> std::ws;
  if (in.peek() != '"') {
    in >> word;
    return word;
  }
  in.get();
  std::getline(in, word, '"');
  return word;
}

std::vector<std::string> words_of(const std::string& text) {
  std::istringstream in(text);
  std::vector<std::string> words;
  while (in >> std::ws, in.peek() != std::char_traits<char>::eof()) words.push_back(next_word(in));
  return words;
}

void read_head(Case& c, const std::string& line) {
  std::istringstream in(line);
  std::string key, rest;
  in >> key >> std::ws;
  std::getline(in, rest);
  if (key == "source")
    c.source = rest;
  else if (key == "command")
    c.command = words_of(rest);
  else if (key != "note" && !key.empty())
    c.faults.push_back("unknown word \"" + key + "\" above === inventory");
}

void read_expectation(Case& c, const std::string& line, int number) {
  std::istringstream in(line);
  Expectation e;
  e.line = number;
  e.pointer = next_word(in);
  if (e.pointer.empty() || e.pointer[0] == '#') return;
  in >> std::ws;
  const bool quoted = in.peek() == '"';
  e.value = next_word(in);
  if (e.pointer == "exit") {
    c.exit = std::atoi(e.value.c_str());
    return;
  }
  if (quoted) e.value = '"' + e.value + '"';
  std::string kind;
  if (in >> e.tolerance) {
    in >> kind;
    if (kind != "relative" && kind != "absolute")
      c.faults.push_back("line " + std::to_string(number) + ": tolerance of what kind?");
    e.relative = kind == "relative";
  }
  if (!json::accept(e.value)) c.faults.push_back("line " + std::to_string(number) + ": no value \"" + e.value + "\"");
  c.expected.push_back(e);
}

/// A directory of one run, gone with it.
struct Folder {
  std::filesystem::path path;
  Folder() {
    std::string name = (std::filesystem::temp_directory_path() / "vatwright-XXXXXX").string();
    if (mkdtemp(name.data()) != nullptr) path = name;
  }
  ~Folder() {
    std::error_code ignored;
    if (!path.empty()) std::filesystem::remove_all(path, ignored);
  }
  Folder(const Folder&) = delete;
  Folder& operator=(const Folder&) = delete;
  std::string write(const std::string& name, const std::string& text) const {
    const auto file = (path / name).string();
    std::ofstream(file) << text;
    return file;
  }
};

/// The member of an object, or the element of an array: by its place, or by its tag or name.
const json* step(const json& at, const std::string& word) {
  if (at.is_object()) return at.contains(word) ? &at.at(word) : nullptr;
  if (!at.is_array()) return nullptr;
  for (const auto& element : at)
    for (const char* key : {"tag", "name"})
      if (element.is_object() && element.value(key, json()) == word) return &element;
  const bool place = !word.empty() && word.find_first_not_of("0123456789") == std::string::npos;
  return place && std::stoul(word) < at.size() ? &at.at(std::stoul(word)) : nullptr;
}

/// What stands at the pointer; nullopt where there is nothing.
std::optional<json> find(const json& answer, const std::string& pointer) {
  const json* at = &answer;
  std::istringstream words(pointer);
  for (std::string word; std::getline(words, word, '/');) {
    if (word == "size" && at->is_array()) return json(at->size());
    at = step(*at, word);
    if (at == nullptr) return std::nullopt;
  }
  return *at;
}

bool agrees(const Expectation& e, const json& got) {
  const json want = json::parse(e.value);
  if (!want.is_number() || !got.is_number()) return got == want;
  const double w = want.get<double>(), g = got.get<double>();
  return std::abs(g - w) <= e.tolerance * (e.relative ? std::abs(w) : 1.0);
}

std::string told(const Expectation& e, const std::string& got) {
  std::ostringstream out;
  out << "line " << e.line << ": " << e.pointer << ": got " << got << ", expected " << e.value;
  if (e.tolerance > 0) out << " within " << e.tolerance << (e.relative ? " relative" : " absolute");
  return out.str();
}

}  // namespace

Case read_case(const std::string& file, const std::string& text) {
  Case c;
  c.file = file;
  std::istringstream in(text);
  std::string line, section;
  for (int number = 1; std::getline(in, line); ++number) {
    if (line.starts_with("=== "))
      section = line.substr(4);
    else if (section.empty())
      read_head(c, line);
    else if (section == "inventory")
      c.inventory += line + '\n';
    else if (section == "duty")
      c.duty += line + '\n';
    else if (section == "expect")
      read_expectation(c, line, number);
    else
      c.faults.push_back("unknown section \"" + section + "\"");
  }
  if (c.source.empty()) c.faults.push_back("no source");
  if (c.command.empty()) c.faults.push_back("no command");
  if (c.expected.empty()) c.faults.push_back("no expectation");
  return c;
}

std::vector<std::string> differences(const Case& c) {
  const Folder folder;
  std::vector<std::string> arguments{c.command[0], folder.write("site.toml", c.inventory),
                                     folder.write("duty.toml", c.duty)};
  arguments.insert(arguments.end(), c.command.begin() + 1, c.command.end());
  arguments.push_back("--json");
  std::ostringstream out, err;
  const int exit = static_cast<int>(run(arguments, out, err));
  std::vector<std::string> found;
  if (exit != c.exit)
    found.push_back("exit " + std::to_string(exit) + ", expected " + std::to_string(c.exit) + "; " + err.str());
  const json answer = json::parse(out.str(), nullptr, false);
  if (answer.is_discarded()) {
    found.push_back("the answer is no JSON: " + out.str().substr(0, 200));
    return found;
  }
  for (const auto& e : c.expected) {
    const auto got = find(answer, e.pointer);
    if (!got)
      found.push_back(told(e, "nothing there"));
    else if (!agrees(e, *got))
      found.push_back(told(e, got->dump()));
  }
  return found;
}

}  // namespace vatwright::reference
