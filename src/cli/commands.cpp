#include "command.hpp"

namespace vatwright {

const std::vector<Command>& all_commands() {
  using Needs = Command::Needs;
  static const std::vector<Command> commands = {
      {"check",
       "read the files and show what was understood",
       Needs::inventory,
       {"--json", "--feed-rate", "--units", "--threads", "--quiet", "--stamp"},
       run_check},
      {"screen",
       "rate every vessel by itself",
       Needs::inventory_and_duty,
       {"--json", "--csv", "--feed-rate", "--offer", "--units", "--threads", "--quiet", "--require-fit", "--stamp"},
       run_screen},
      {"examine",
       "rate one hookup of vessels in depth",
       Needs::inventory_and_duty,
       {"--hookup", "--json", "--csv", "--feed-rate", "--units", "--threads", "--quiet", "--require-fit", "--stamp"},
       run_examine},
      {"rank",
       "rate all hookups of the offered vessels and order them",
       Needs::inventory_and_duty,
       {"--most", "--top", "--by", "--exact", "--today", "--json", "--csv", "--feed-rate", "--offer", "--units",
        "--threads", "--quiet", "--require-fit", "--stamp"},
       run_rank},
  };
  return commands;
}

}  // namespace vatwright
