#pragma once
#include <memory>
#include <vector>

#include "line.hpp"
#include "vatwright/hookup/hookup_rating.hpp"
#include "vatwright/ranking/twins.hpp"

namespace vatwright {

/// Vessels of a site on a line, by their place in the site; null: not offered, or it can not be calculated.
using OnLines = std::vector<const Line::OnLine*>;
OnLines on_lines(const Line& line, const Twins& twins, std::size_t vessels_of_site);

/// The best shares of a hookup by Splits; all its shares are free and all its vessels on the line. Line and table
/// outlive it.
KnownShares shares_on(const Line& line, const OnLines& vessels, const Hookup& hookup);

/// Of the joints of splits that are told, as z.
inline constexpr double told_tolerance = 1e-10;

}  // namespace vatwright
