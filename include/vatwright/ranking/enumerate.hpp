#pragma once
#include <optional>
#include <span>
#include <vector>

#include "vatwright/hookup/expression.hpp"

namespace vatwright {

/// How many series-parallel hookups use each of n different vessels once: 1, 3, 19, 195, 2791, 51303, .. (OEIS
/// A048172). With q = x + P (a member of a train) and r = x + S (a member of a beside) as exponential generating
/// functions:
///   S = q^2/(1 - q),  P = e^r - 1 - r,  all = x + S + P
/// R. P. Stanley, Proc. Amer. Math. Soc. 45 (1974) 295. Absent: n < 1, or more than 2^62.
std::optional<long long> count_hookups(int n);
/// The same, those that are a series at the top (n >= 2: 2, 12, 122, ..).
std::optional<long long> count_series(int n);
/// All hookups of 1 .. most out of n vessels. Absent: more than 2^62.
std::optional<long long> count_hookups_up_to(int n, int most);

/// Every hookup that uses each of the vessels exactly once, in normal form with free shares, each once: members of a
/// beside stand by their smallest vessel. The list grows as count_hookups(n): 51303 for six.
std::vector<Hookup> hookups_of(std::span<const int> vessels);

/// Every hookup of `counts.size()` classes of equal vessels that uses counts[c] of class c, each once up to exchange of
/// equals. A leaf is numbered by its place: 0 .. counts[0] - 1 are of class 0, and so on, rising in the order of the
/// text.
std::vector<Hookup> hookups_of_classes(const std::vector<int>& counts);

/// Members of every beside in the order of their smallest vessel. Precondition: all shares free.
Hookup sorted_members(Hookup hookup);
/// Every leaf's vessel v replaced by to[v].
Hookup relabelled(const Hookup& hookup, std::span<const int> to);

}  // namespace vatwright
