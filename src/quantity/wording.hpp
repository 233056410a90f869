#pragma once
#include <string>
#include <string_view>

namespace vatwright {

/// The text in quotes, as a message shows it: at most about 60 characters, on one line, valid UTF-8 whatever the bytes;
/// control characters and bytes that are no UTF-8 are shown as "?".
std::string quoted(std::string_view text);

/// At most four significant digits, no trailing zeros: "26.85", "1.23e-05". Not for NaN or infinity.
std::string brief(double value);

/// Length in bytes of the space that `text` begins with: blank, tab, or one of the spaces of word processors; 0: none.
std::size_t leading_space(std::string_view text);

std::string_view trimmed(std::string_view text);

}  // namespace vatwright
