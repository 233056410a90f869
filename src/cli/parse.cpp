#include "parse.hpp"

#include <CLI/CLI.hpp>
#include <algorithm>

#include "help.hpp"
#include "option_list.hpp"
#include "vatwright/cli/version.hpp"
#include "vatwright/error/diagnostic.hpp"

namespace vatwright {
namespace {

/// Words of the plan that are commands of later versions.
const std::vector<std::string> planned = {"debottleneck", "dossier"};

const Command* command_of(const std::string& name) {
  for (const Command& command : all_commands())
    if (command.name == name) return &command;
  return nullptr;
}

std::vector<std::string> names_of_commands() {
  std::vector<std::string> names;
  for (const Command& command : all_commands()) names.emplace_back(command.name);
  return names;
}

std::string joined(const std::vector<std::string>& words) {
  std::string text;
  for (const std::string& word : words) text += (text.empty() ? "" : ", ") + word;
  return text;
}

std::string unknown_command(const std::string& word) {
  if (std::find(planned.begin(), planned.end(), word) != planned.end())
    return "the command \"" + word + "\" is not part of this version; there are " + joined(names_of_commands());
  const std::string near = nearest(word, names_of_commands());
  return "unknown command \"" + word + "\"; " +
         (near.empty() ? "known commands: " + joined(names_of_commands()) : "nearest known command: \"" + near + "\"");
}

bool takes(const Command& command, const std::string& option) {
  return std::find(command.options.begin(), command.options.end(), option) != command.options.end();
}

std::string unknown_option(const Command& command, const std::string& word) {
  const std::string name = word.substr(0, word.find('='));
  std::string elsewhere;
  for (const Command& other : all_commands())
    if (takes(other, name)) elsewhere += (elsewhere.empty() ? "" : ", ") + std::string(other.name);
  if (!elsewhere.empty())
    return std::string(command.name) + ": no option \"" + name + "\" here; it belongs to " + elsewhere;
  std::vector<std::string> known = {"--help"};
  for (std::string_view option : command.options) known.emplace_back(option);
  const std::string near = nearest(name, known);
  return std::string(command.name) + ": unknown option \"" + name + "\"; " +
         (near.empty() ? "known options: " + joined(known) : "nearest known option: \"" + near + "\"");
}

bool is_option(const std::string& word) { return word.size() > 1 && word[0] == '-'; }

void tell_extras(const Command& command, const std::vector<std::string>& extras, std::vector<std::string>& faults) {
  for (const std::string& extra : extras)
    if (is_option(extra)) faults.push_back(unknown_option(command, extra));
  if (faults.empty() && !extras.empty())
    faults.push_back(std::string(command.name) + ": \"" + extras.front() +
                     "\" is one word too many; a text with spaces stands in quotes");
}

void tell_missing(const Command& command, const Parsed& parsed, std::vector<std::string>& faults) {
  const bool duty = command.needs == Command::Needs::inventory_and_duty;
  if (parsed.words.inventory.empty() || (duty && parsed.words.duty.empty()))
    faults.push_back(std::string(command.name) + ": expected " +
                     (duty ? "two files, INVENTORY and DUTY" : "a file, INVENTORY") + "; found " +
                     (parsed.words.inventory.empty() ? "none" : "one"));
  if (takes(command, "--hookup") && parsed.words.given.count("--hookup") == 0)
    faults.push_back(std::string(command.name) + ": expected --hookup TEXT, such as --hookup \"A then B\"");
}

void declare(CLI::App& app, const Command& command, Words& words) {
  app.set_help_flag("");
  app.allow_extras();
  app.add_option("INVENTORY", words.inventory);
  app.add_option("DUTY", words.duty);
  for (std::string_view name : command.options) {
    const Option& option = option_of(name);
    if (option.flag != nullptr)
      app.add_flag(std::string(name), words.*option.flag);
    else
      app.add_option(std::string(name), words.*option.text);
  }
}

Parsed parse_command(const Command& command, const std::vector<std::string>& rest) {
  Parsed parsed;
  CLI::App app;
  declare(app, command, parsed.words);
  try {
    std::vector<std::string> reversed(rest.rbegin(), rest.rend());  // the parser takes them from the back
    app.parse(reversed);
  } catch (const CLI::ParseError& error) {
    parsed.faults.push_back(std::string(command.name) + ": " + error.what());
    return parsed;
  }
  for (std::string_view name : command.options)
    if (app.count(std::string(name)) != 0) parsed.words.given.emplace(name);
  tell_extras(command, app.remaining(), parsed.faults);
  if (parsed.faults.empty()) tell_missing(command, parsed, parsed.faults);
  parsed.command = &command;
  return parsed;
}

Parsed only_text(std::string text) {
  Parsed parsed;
  parsed.text = std::move(text);
  return parsed;
}

Parsed only_fault(std::string fault) {
  Parsed parsed;
  parsed.faults.push_back(std::move(fault));
  return parsed;
}

bool asks_help(const std::string& word) { return word == "--help" || word == "-h"; }

}  // namespace

Parsed parse_arguments(const std::vector<std::string>& arguments) {
  if (arguments.empty()) return only_fault("expected a command: " + joined(names_of_commands()) + "; try --help");
  const std::string& first = arguments.front();
  if (asks_help(first)) return only_text(help_text());
  if (first == "--version") return only_text("vatwright " + std::string(version) + "\n");
  const Command* command = command_of(first);
  if (command == nullptr && is_option(first))
    return only_fault("expected a command before \"" + first + "\": " + joined(names_of_commands()));
  if (command == nullptr) return only_fault(unknown_command(first));
  const std::vector<std::string> rest(arguments.begin() + 1, arguments.end());
  if (std::any_of(rest.begin(), rest.end(), asks_help)) return only_text(help_text(*command));
  return parse_command(*command, rest);
}

}  // namespace vatwright
