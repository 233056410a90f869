#pragma once
#include <string_view>

namespace vatwright {

/// The ASCII letter most like one letter of valid UTF-8 (its marks taken off); '?' where there is none.
char ascii_of(std::string_view letter);

}  // namespace vatwright
