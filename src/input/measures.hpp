#pragma once
#include "vatwright/field/value.hpp"

namespace vatwright::measure {

// What figures of the duty may be, where several keys share it.
inline constexpr Measure fraction{dim::none, between(0, 1)};
inline constexpr Measure fill{dim::none, Range{0, 1, false, true}};
inline constexpr Measure number{};
inline constexpr Measure temperature{dim::temperature, above(0), Sense::temperature};
inline constexpr Measure pressure{dim::pressure, above(0), Sense::plain, true};
inline constexpr Measure time{dim::time, at_least(0)};
inline constexpr Measure volume{dim::volume, above(0)};

}  // namespace vatwright::measure
