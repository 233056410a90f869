#pragma once
#include <string>
#include <string_view>

#include "vatwright/quantity/wording.hpp"

namespace vatwright {

/// At most four significant digits, no trailing zeros: "26.85", "1.23e-05". Not for NaN or infinity.
std::string brief(double value);

/// Length in bytes of the space that `text` begins with: blank, tab, or one of the spaces of word processors; 0: none.
std::size_t leading_space(std::string_view text);

std::string_view trimmed(std::string_view text);

}  // namespace vatwright
