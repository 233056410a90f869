#pragma once
#include <optional>
#include <set>
#include <string>
#include <vector>

#include "vatwright/quantity/show.hpp"
#include "vatwright/ranking/rank.hpp"
#include "vatwright/vessel/vessel.hpp"

namespace vatwright {

/// What the command line says, as texts: filled by the parser, checked by `settings_of`.
struct Words {
  std::string inventory, duty;
  std::string csv, feed_rate, units = "trade", threads, stamp, offer = "idle";
  std::string hookup, most = "3", top = "10", by = "fit", today;
  bool json = false, quiet = false, require_fit = false, exact = false;
  std::set<std::string> given;  ///< options that were given, "--csv"
};

/// The same, checked.
struct Settings {
  std::string inventory;
  std::optional<std::string> duty;
  std::optional<std::string> csv, feed_rate, stamp;
  Units units = Units::trade;
  int threads = 1;
  std::vector<Status> offer = {Status::idle};
  std::string hookup;
  int most = 3, top = 10;
  By by = By::fit;
  std::optional<std::string> today;
  bool json = false, quiet = false, require_fit = false, exact = false;
};

/// Checks all values; what is wrong is told in `faults`, one line each.
Settings settings_of(const Words& words, std::vector<std::string>& faults);

}  // namespace vatwright
