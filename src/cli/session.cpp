#include "session.hpp"

#include <algorithm>
#include <cerrno>
#include <cstring>
#include <fstream>
#include <ostream>

#include "vatwright/cli/version.hpp"

namespace vatwright {
namespace {

bool write_file(const std::string& name, const std::string& text, std::ostream& err) {
  errno = 0;
  std::ofstream file(name, std::ios::binary);
  file << text << std::flush;
  if (file) return true;
  err << "vatwright: could not write \"" << name << "\"" << (errno != 0 ? std::string(": ") + std::strerror(errno) : "")
      << "\n";
  return false;
}

bool write_out(const Context& context, const std::string& text) {
  context.out << text << std::flush;
  if (context.out) return true;
  context.err << "vatwright: the answer could not be written to standard output\n";
  return false;
}

}  // namespace

std::optional<ReadResult> read_for(const Context& context) {
  const Settings& settings = context.settings;
  ReadResult read = read_files(settings.inventory, settings.duty, settings.feed_rate);
  const bool refused = read.diagnostics.has_errors() || (settings.duty ? !read.problems : !read.site);
  const bool colour = context.terminals.err && context.terminals.colour;
  if (refused || !settings.quiet) context.err << to_text(read.diagnostics, colour);
  if (refused) return {};
  return read;
}

MadeBy made_by(const ReadResult& read) { return {std::string(version), read.inventory_sha256, read.duty_sha256}; }

Look look_of(const Context& context) {
  return {context.settings.units, context.terminals.out && context.terminals.colour, !context.terminals.out};
}

std::vector<int> offered(const Site& site, const Settings& settings) {
  std::vector<int> indices;
  for (std::size_t i = 0; i < site.vessels.size(); ++i)
    if (std::count(settings.offer.begin(), settings.offer.end(), site.vessels[i].status) != 0)
      indices.push_back(static_cast<int>(i));
  return indices;
}

std::optional<Hookup> read_hookup(const std::string& option, const std::string& text, const Site& site,
                                  std::ostream& err) {
  const auto parsed = parse_hookup(text, site);
  if (const Hookup* hookup = std::get_if<Hookup>(&parsed)) return *hookup;
  const HookupFault& fault = std::get<HookupFault>(parsed);
  err << option << ":" << fault.column << ": " << fault.found << (fault.expected.empty() ? "" : "; ") << fault.expected
      << "\n  " << text << "\n  " << std::string(static_cast<std::size_t>(std::max(fault.column, 1) - 1), ' ') << "^\n";
  return {};
}

bool write_answer(const Context& context, const Forms& forms) {
  const auto& csv = context.settings.csv;
  if (csv == "-") return write_out(context, forms.csv());
  const bool file_written = !csv || write_file(*csv, forms.csv(), context.err);
  return write_out(context, context.settings.json ? forms.json() : forms.page()) && file_written;
}

Exit exit_of(const Settings& settings, const Outcomes& outcomes) {
  if (!outcomes.written) return Exit::unwritten;
  if (outcomes.unsolved) return Exit::unsolved;
  if (settings.require_fit && !outcomes.fits) return Exit::nothing_fits;
  return Exit::answered;
}

void tell_unsolved(const Context& context, const std::string& name, const Rating& rating) {
  if (!rating.unsolved) return;
  context.err << name << ": could not be solved";
  std::string why;
  for (const std::string& reason : rating.stands_in_the_way) why += (why.empty() ? ": " : "; ") + reason;
  if (why.empty() && rating.windows && !rating.windows->why.empty()) why = ": " + rating.windows->why;
  context.err << why << "\n";
}

}  // namespace vatwright
