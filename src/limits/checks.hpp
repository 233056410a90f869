#pragma once
// One check per limit, each in a file of its name. nullopt: not asked.
#include <optional>

#include "vatwright/limits/limit.hpp"

namespace vatwright {

namespace limit_name {
inline constexpr std::string_view fill = "fill";
inline constexpr std::string_view pressure_rating = "pressure rating";
inline constexpr std::string_view temperature_rating = "temperature rating";
inline constexpr std::string_view product_temperature = "product temperature";
inline constexpr std::string_view wetted_material = "wetted material";
inline constexpr std::string_view bubble_point = "bubble point";
inline constexpr std::string_view heat_removal = "heat removal";
inline constexpr std::string_view heating = "heating";
inline constexpr std::string_view pressure_drop = "pressure drop";
inline constexpr std::string_view feed_line = "feed line";
inline constexpr std::string_view utility_total = "utility total";
inline constexpr std::string_view steady_state_stable = "steady state stable";
inline constexpr std::string_view start_up_peak = "start-up peak";
inline constexpr std::string_view runaway_sensitivity = "runaway sensitivity";
inline constexpr std::string_view temperature_if_cooling_fails = "temperature if cooling fails";
inline constexpr std::string_view glass_temperature_step = "glass temperature step";
}  // namespace limit_name

/// Working fill of a tank with liquid against its least and most.
std::optional<Limit> check_fill(const LimitInput& input);
/// Highest and lowest pressure inside against the design range.
std::optional<Limit> check_pressure_rating(const LimitInput& input);
/// Hottest and coldest place inside against the design range.
std::optional<Limit> check_temperature_rating(const LimitInput& input);
/// Hottest and coldest place inside against what the product may see.
std::optional<Limit> check_product_temperature(const LimitInput& input);
/// Every wetted material of the vessel must be on the product's list, case ignored.
std::optional<Limit> check_wetted_material(const LimitInput& input);
/// No place inside may be hotter than its bubble point.
std::optional<Limit> check_bubble_point(const LimitInput& input);
/// Heat that must go out of a held vessel against what the medium takes.
std::optional<Limit> check_heat_removal(const LimitInput& input);
/// Heat that must go into a held vessel against what the medium gives.
std::optional<Limit> check_heating(const LimitInput& input);
/// Pressure spent in a tube against what may be; a let-down against what arrives.
std::optional<Limit> check_pressure_drop(const LimitInput& input);
/// Feed through the vessel against what nozzle, pump and outlet pass.
std::optional<Limit> check_feed_line(const LimitInput& input);
/// Draw on the medium against its total (tubes: its flow too).
std::optional<Limit> check_utility_total(const LimitInput& input);
/// The start of a tank must end in a steady state.
std::optional<Limit> check_steady_state_stable(const LimitInput& input);
/// The hottest while a tank comes on line against what product and vessel may see; where the temperature moves.
std::optional<Limit> check_start_up_peak(const LimitInput& input);
/// The share of its U at which the hot spot of a tube on its jacket is most sensitive to it, against the whole.
std::optional<Limit> check_runaway_sensitivity(const LimitInput& input);
/// What the contents come to if cooling fails at the worst moment, against onset of decomposition and design range.
std::optional<Limit> check_temperature_if_cooling_fails(const LimitInput& input);
/// The step of temperature across a glass lining, from the medium and from what arrives.
std::optional<Limit> check_glass_temperature_step(const LimitInput& input);

}  // namespace vatwright
