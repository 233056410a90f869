#include "option_list.hpp"

#include <algorithm>

namespace vatwright {

const std::vector<Option>& all_options() {
  static const std::vector<Option> options = {
      {"--hookup", "TEXT", "the vessels and how they are joined, such as \"A then [40% B beside 60% C]\"",
       &Words::hookup},
      {"--most", "N", "the most vessels in one hookup, 3 if left out", &Words::most},
      {"--top", "N", "how many hookups to show, 10 if left out", &Words::top},
      {"--by", "ORDER", "fit (if left out), conversion, ceiling or yield", &Words::by},
      {"--exact", "", "order by the value alone, near-ties too", nullptr, &Words::exact},
      {"--today", "TEXT", "a hookup to show beside the best, with its place", &Words::today},
      {"--json", "", "the answer as one JSON object, SI units", nullptr, &Words::json},
      {"--csv", "FILE", "write the rows of the answer to FILE; - is standard output", &Words::csv},
      {"--feed-rate", "RATE", "in place of the duty's, such as \"3 m3/h\"", &Words::feed_rate},
      {"--offer", "LIST", "which vessels are offered: idle (if left out), mothballed, in-service, joined by commas",
       &Words::offer},
      {"--units", "UNITS", "trade (if left out) or field; JSON and CSV stay SI", &Words::units},
      {"--threads", "N", "how many threads work, one a core if left out; the answer is the same", &Words::threads},
      {"--quiet", "", "no warnings and no progress on standard error", nullptr, &Words::quiet},
      {"--require-fit", "", "exit status 1 where nothing fits, or where it cannot be told", nullptr,
       &Words::require_fit},
      {"--stamp", "TEXT", "a text of yours for the head of the answer", &Words::stamp},
  };
  return options;
}

const Option& option_of(std::string_view name) {
  const auto& options = all_options();
  return *std::find_if(options.begin(), options.end(), [name](const Option& option) { return option.name == name; });
}

}  // namespace vatwright
