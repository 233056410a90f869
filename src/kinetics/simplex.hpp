#pragma once
#include <optional>
#include <vector>

namespace vatwright {

/// The least c.x under A x = b, x >= 0 (b >= 0), for a handful of rows: the two-phase simplex method on a dense tableau
/// with Bland's rule, so that it ends. A: row by row, b.size() x c.size(). nullopt: no x does, or no bound below. R. G.
/// Bland, Math. Oper. Res. 2 (1977) 103 (from memory).
std::optional<double> least(const std::vector<double>& c, const std::vector<double>& A, const std::vector<double>& b);

}  // namespace vatwright
