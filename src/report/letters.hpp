#pragma once
#include <cstdint>
#include <string>
#include <string_view>

namespace vatwright {

inline constexpr char32_t not_a_letter = 0xFFFFFFFF;

/// The code point that starts at `at`, which is moved behind it; not_a_letter for a byte that starts none (one byte is
/// passed).
char32_t next_letter(std::string_view text, std::size_t& at);
/// Columns that a code point takes: 0, 1 or 2.
int width_of(char32_t letter);
/// The ASCII letter most like it; '?' where there is none.
char ascii_of(char32_t letter);

}  // namespace vatwright
