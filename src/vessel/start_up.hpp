#pragma once
#include <optional>
#include <span>

#include "start_state.hpp"

namespace vatwright {

/// A steady state that a start-up may come to.
struct RestingPlace {
  std::vector<double> C;  ///< mol per m3 of fluid
  double temperature_K = 0;
  double growth = 0;  ///< of small departures, per space time; below zero: stable
  [[nodiscard]] bool stable() const { return growth < 0; }
};

/// Whether the places named are all there are.
enum class Places { all, some };

/// How a start-up ends.
struct StartEnd {
  std::optional<std::size_t>
      at;  ///< at this one of the named places; absent: it rests elsewhere (Places::some), or cycles
  bool cycle = false;
  std::vector<double> xi;  ///< resting elsewhere: extents that fit the contents best; empty where none are known
  double temperature_K = 0;
  double peak_K = 0;                 ///< the hottest on the way, the start included
  std::optional<double> uncooled_K;  ///< the hottest that the contents could become if cooling failed on the way;
                                     ///< absent where that is no question
};
/// The start-up integrated, feed open and medium on, until it is within 1e-4 (of all that is fed, and of 300 K) of a
/// stable place; or small swings shrink around one place, which they settle in if it is stable and circle if not; or it
/// swings equally far in three quarters of the time; or it rests. NoAnswer::unsolved: none of these within
/// 1e7 space times.
Outcome<StartEnd> follow_start(const Setup& setup, const StartState& start, double feed_m3_s,
                               std::span<const RestingPlace> places, Places known);

}  // namespace vatwright
