#include <algorithm>

#include "vatwright/error/expects.hpp"
#include "vatwright/numeric/march.hpp"

namespace vatwright {

double Track::begin() const { return t_.front(); }
double Track::end() const { return t_.back(); }

void Track::read(double t, std::span<double> y) const {
  const double slack = 1e-9 * (end() - begin());
  VATWRIGHT_EXPECTS(t >= begin() - slack && t <= end() + slack);
  const auto n = static_cast<std::size_t>(n_);
  if (t_.size() == 1) {  // no way gone: the start alone is kept
    std::copy_n(coefficients_.begin(), n, y.begin());
    return;
  }
  const auto after = std::upper_bound(t_.begin() + 1, t_.end() - 1, t);
  const auto step = static_cast<std::size_t>(after - t_.begin()) - 1;
  const double theta = (t - t_[step]) / (t_[step + 1] - t_[step]);
  const double* c = coefficients_.data() + step * 6 * n;
  for (std::size_t i = 0; i < n; ++i) {
    const double* ci = c + i;  // Horner's scheme over the rows
    y[i] =
        ci[0] + theta * (ci[n] + theta * (ci[2 * n] + theta * (ci[3 * n] + theta * (ci[4 * n] + theta * ci[5 * n]))));
  }
}

}  // namespace vatwright
