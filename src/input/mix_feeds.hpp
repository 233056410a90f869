#pragma once
#include <vector>

#include "builder.hpp"
#include "vatwright/stream/feed.hpp"

namespace vatwright {

/// Streams that meet before the first vessel, v in m3/s each at its own temperature and pressure, mixed: liquids by
/// volume, gases by moles, heat capacity by mass, temperature by enthalpy (by volume and told where heat capacities are
/// missing), pressure the lowest. Answers the sum of their rates, m3/s of the mixed feed at its temperature and
/// pressure.
double mix_feeds(const std::vector<Feed>& streams, const std::vector<double>& v_m3_s, Feed& mixed,
                 const Builder& builder);

}  // namespace vatwright
