#pragma once
#include "on_one_line.hpp"
#include "rater.hpp"

namespace vatwright {

/// The best three of all vessels, no limit asked, where they would stand before `first` and break one.
std::vector<KeptOut> kept_out(const OnOneLine& on, const Rater& rater, const Entry& first);

}  // namespace vatwright
