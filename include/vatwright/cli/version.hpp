#pragma once
#include <string_view>

namespace vatwright {

/// The version of the program, as the build states it too (a test compares).
inline constexpr std::string_view version = "0.1.0";

}  // namespace vatwright
