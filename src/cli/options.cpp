#include "options.hpp"

#include <algorithm>
#include <charconv>
#include <filesystem>
#include <sstream>
#include <system_error>
#include <thread>
#include <utility>

#include "vatwright/error/diagnostic.hpp"

namespace vatwright {
namespace {

constexpr int most_threads = 256;

template <class T>
using Choices = std::vector<std::pair<std::string, T>>;

const Choices<Units> all_units = {{"trade", Units::trade}, {"field", Units::field}};
const Choices<By> all_orders = {
    {"fit", By::fit}, {"conversion", By::conversion}, {"ceiling", By::ceiling}, {"yield", By::yield}};
const Choices<Status> all_statuses = {
    {"idle", Status::idle}, {"mothballed", Status::mothballed}, {"in-service", Status::in_service}};

template <class T>
std::optional<T> choice(const std::string& option, const std::string& word, const Choices<T>& choices,
                        std::vector<std::string>& faults) {
  std::vector<std::string> known;
  std::string list;
  for (const auto& [name, value] : choices) {
    if (name == word) return value;
    known.push_back(name);
    list += (list.empty() ? "" : ", ") + name;
  }
  const std::string near = nearest(word, known);
  faults.push_back(option + ": found \"" + word + "\"; expected one of " + list +
                   (near.empty() ? "" : "; nearest: \"" + near + "\""));
  return {};
}

int whole_number(const std::string& option, const std::string& word, int least, int greatest,
                 std::vector<std::string>& faults) {
  int value = 0;
  const auto [end, error] = std::from_chars(word.data(), word.data() + word.size(), value);
  if (error == std::errc() && end == word.data() + word.size() && value >= least && value <= greatest) return value;
  faults.push_back(option + ": found \"" + word + "\"; expected a whole number from " + std::to_string(least) + " to " +
                   std::to_string(greatest));
  return least;
}

std::vector<Status> statuses(const std::string& words, std::vector<std::string>& faults) {
  std::vector<Status> offer;
  std::istringstream in(words + ",");
  for (std::string word; std::getline(in, word, ',');)
    if (const auto status = choice("--offer", word, all_statuses, faults)) offer.push_back(*status);
  return offer;
}

int all_cores() {
  const auto cores = static_cast<int>(std::thread::hardware_concurrency());  // 0: not known
  return std::clamp(cores, 1, most_threads);
}

/// Whether both names are one file that is there.
bool same_file(const std::string& a, const std::string& b) {
  std::error_code none;
  return std::filesystem::equivalent(a, b, none);
}

void check_csv(const Settings& settings, std::vector<std::string>& faults) {
  if (!settings.csv) return;
  const std::string& csv = *settings.csv;
  if (csv.empty()) faults.push_back("--csv: found an empty name; expected a file, or - for standard output");
  if (settings.json && csv == "-")
    faults.push_back("--json and --csv - both want standard output; give --csv a file, or leave one of them out");
  if (same_file(csv, settings.inventory) || (settings.duty && same_file(csv, *settings.duty)))
    faults.push_back("--csv: \"" + csv + "\" is a file that is read; expected another one to write to");
}

}  // namespace

Settings settings_of(const Words& words, std::vector<std::string>& faults) {
  const auto given = [&words](const std::string& option, const std::string& value) {
    return words.given.count(option) != 0 ? std::optional(value) : std::nullopt;
  };
  Settings settings;
  settings.inventory = words.inventory;
  if (!words.duty.empty()) settings.duty = words.duty;
  settings.csv = given("--csv", words.csv);
  settings.feed_rate = given("--feed-rate", words.feed_rate);
  settings.stamp = given("--stamp", words.stamp);
  settings.today = given("--today", words.today);
  settings.hookup = words.hookup;
  settings.units = choice("--units", words.units, all_units, faults).value_or(Units::trade);
  settings.by = choice("--by", words.by, all_orders, faults).value_or(By::fit);
  settings.offer = statuses(words.offer, faults);
  settings.threads = given("--threads", words.threads)
                         ? whole_number("--threads", words.threads, 1, most_threads, faults)
                         : all_cores();
  settings.most = whole_number("--most", words.most, 1, 8, faults);
  settings.top = whole_number("--top", words.top, 1, 1'000'000, faults);
  settings.json = words.json;
  settings.quiet = words.quiet;
  settings.require_fit = words.require_fit;
  settings.exact = words.exact;
  check_csv(settings, faults);
  return settings;
}

}  // namespace vatwright
