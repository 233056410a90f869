#pragma once
// Every hookup written out and every split of it looked for by itself: what the search of rank must agree with.
#include <optional>
#include <vector>

#include "small_plant.hpp"
#include "vatwright/hookup/expression.hpp"

namespace vatwright::test {

/// Of what a joint divides, each branch gets at least this share: with less it is the smaller hookup.
constexpr double least_share = 1e-4;

/// Every hookup of 1 .. most out of n vessels, each once, shares free.
std::vector<Hookup> all_hookups(int n, int most);

/// Shares of all besides struck out, groups of one kind made one.
Hookup with_free_shares(const Hookup& hookup);

/// Whether there are shares of every beside that keep within the feed lines.
bool keeps_feed_lines(const SmallPlant& plant, const Hookup& hookup, double feed_m3_s);

/// The most that it converts by any shares within its feed lines; absent: there are none.
std::optional<double> best_conversion(const SmallPlant& plant, const Hookup& hookup, double feed_m3_s);

/// What it converts at these shares, in the order of the text (a member's own before those inside it).
double conversion_at(const SmallPlant& plant, const Hookup& hookup, const std::vector<double>& shares,
                     double feed_m3_s);

/// The greatest feed rate at which it converts X, to 1e-10, looked for from `near` on (what it converts falls with the
/// feed rate); absent: not at a millionth of that.
std::optional<double> ceiling(const SmallPlant& plant, const Hookup& hookup, double X, double near_m3_s);

}  // namespace vatwright::test
