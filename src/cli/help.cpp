#include "help.hpp"

#include "option_list.hpp"
#include "vatwright/report/layout.hpp"

namespace vatwright {

std::string help_text() {
  Page page{Look{}};
  page.title("vatwright: rates standing vessels for a new duty");
  page.heading("Commands");
  std::vector<Page::Item> commands;
  for (const Command& command : all_commands())
    commands.push_back({std::string(command.name), {std::string(command.summary)}});
  page.items(commands);
  page.heading("Use");
  page.paragraph("vatwright COMMAND INVENTORY [DUTY] [options]", 2);
  page.paragraph("vatwright COMMAND --help", 2);
  page.paragraph("vatwright --version", 2);
  page.heading("Exit status");
  page.items({{"0", {"answered"}},
              {"1", {"--require-fit, and nothing fits or it cannot be told"}},
              {"2", {"a wrong command line or file"}},
              {"3", {"something could not be solved; what, where and why is said, the rest is answered"}},
              {"4", {"the answer could not be written"}}});
  return page.text();
}

std::string help_text(const Command& command) {
  const bool duty = command.needs == Command::Needs::inventory_and_duty;
  Page page{Look{}};
  page.title("vatwright " + std::string(command.name) + ": " + std::string(command.summary));
  page.heading("Use");
  page.paragraph(
      "vatwright " + std::string(command.name) + (duty ? " INVENTORY DUTY" : " INVENTORY [DUTY]") + " [options]", 2);
  page.heading("Options");
  std::vector<Page::Item> items;
  for (std::string_view name : command.options) {
    const Option& option = option_of(name);
    std::string label(name);
    if (!option.value.empty()) label.append(" ").append(option.value);
    items.push_back({label, {std::string(option.help)}});
  }
  items.push_back({"--help", {"this text"}});
  page.items(items);
  return page.text();
}

}  // namespace vatwright
