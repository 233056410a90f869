#include "vatwright/cli/run.hpp"

#include <exception>
#include <ostream>

#include "parse.hpp"

namespace vatwright {
namespace {

Exit refuse(const std::vector<std::string>& faults, std::ostream& err) {
  for (const std::string& fault : faults) err << "vatwright: " << fault << "\n";
  return Exit::refused;
}

Exit say(const std::string& text, std::ostream& out) {
  out << text << std::flush;
  return out ? Exit::answered : Exit::unwritten;
}

Exit dispatch(const std::vector<std::string>& arguments, std::ostream& out, std::ostream& err,
              const Terminals& terminals) {
  const Parsed parsed = parse_arguments(arguments);
  if (!parsed.faults.empty()) return refuse(parsed.faults, err);
  if (parsed.command == nullptr) return say(parsed.text, out);
  std::vector<std::string> faults;
  const Settings settings = settings_of(parsed.words, faults);
  if (!faults.empty()) return refuse(faults, err);
  return parsed.command->run({settings, out, err, terminals});
}

}  // namespace

Exit run(const std::vector<std::string>& arguments, std::ostream& out, std::ostream& err, const Terminals& terminals) {
  try {
    return dispatch(arguments, out, err, terminals);
  } catch (const std::exception& error) {  // memory, or a fault of ours: told, never a crash
    err << "vatwright: stopped: " << error.what() << "\n";
    return Exit::unsolved;
  }
}

}  // namespace vatwright
