#include "vatwright/limits/limit.hpp"

#include <algorithm>

#include "checks.hpp"

namespace vatwright {

std::string_view text_of(Limit::State state) {
  switch (state) {
    case Limit::State::holds:
      return "holds";
    case Limit::State::broken:
      return "broken";
    case Limit::State::cannot_tell:
      break;
  }
  return "cannot-tell";
}

const std::vector<ListedLimit>& all_limits() {
  static const std::vector<ListedLimit> list = {
      {limit_name::fill, check_fill, Reads::files},
      {limit_name::pressure_rating, check_pressure_rating},
      {limit_name::temperature_rating, check_temperature_rating},
      {limit_name::product_temperature, check_product_temperature},
      {limit_name::wetted_material, check_wetted_material, Reads::files},
      {limit_name::bubble_point, check_bubble_point},
      {limit_name::heat_removal, check_heat_removal},
      {limit_name::heating, check_heating},
      {limit_name::pressure_drop, check_pressure_drop},
      {limit_name::feed_line, check_feed_line, Reads::files},
      {limit_name::utility_total, check_utility_total},
      {limit_name::steady_state_stable, check_steady_state_stable, Reads::start},
      {limit_name::start_up_peak, check_start_up_peak, Reads::start},
      {limit_name::runaway_sensitivity, check_runaway_sensitivity},
      {limit_name::temperature_if_cooling_fails, check_temperature_if_cooling_fails, Reads::start},
      {limit_name::glass_temperature_step, check_glass_temperature_step},
  };
  return list;
}

namespace {
std::vector<Limit> check(const LimitInput& input, Reads most) {
  std::vector<Limit> limits;
  for (const ListedLimit& listed : all_limits()) {
    if (listed.reads > most) continue;
    if (auto limit = listed.check(input)) limits.push_back(std::move(*limit));
  }
  return limits;
}
}  // namespace

std::vector<Limit> check_limits(const LimitInput& input) {
  return check(input, input.outcome.cycle ? Reads::start : Reads::outcome);
}
std::vector<Limit> check_limits_of_files(const LimitInput& input) { return check(input, Reads::files); }

std::size_t place_of(std::string_view name) {
  const auto& list = all_limits();
  const auto at = std::find_if(list.begin(), list.end(), [&](const ListedLimit& l) { return l.name == name; });
  return static_cast<std::size_t>(at - list.begin());
}

}  // namespace vatwright
