#pragma once
#include <string>
#include <string_view>

namespace vatwright {

/// The text in quotes, as a message shows it: at most about 60 characters, on one line, valid UTF-8 whatever the bytes;
/// control characters and bytes that are no UTF-8 are shown as "?".
std::string quoted(std::string_view text);

}  // namespace vatwright
