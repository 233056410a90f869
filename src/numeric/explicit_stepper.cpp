#include "stepper.hpp"

namespace vatwright {

void ExplicitStepper::attempt(CountedRhs& f, Step& s) {
  const auto system = [&f](const State& y, State& dydt, double t) { f(t, y, dydt); };
  stepper_.do_step(system, s.y, s.dydt, s.t, s.y1, s.dydt1, s.h, s.error);
}

void ExplicitStepper::dense(const Step& s, std::span<double> rows) {
  const std::size_t n = s.y.size();
  middle_.resize(n);
  stepper_.calc_state(s.t + s.h / 2, middle_, s.y, s.dydt, s.t, s.y1, s.dydt1, s.t + s.h);
  for (std::size_t i = 0; i < n; ++i) {
    // The method's polynomial is of degree 4 and meets value and slope at both ends: its middle tells the rest.
    const double rise = s.y1[i] - s.y[i], a = s.h * s.dydt[i], b = s.h * s.dydt1[i];
    const double bulge = 16 * (middle_[i] - s.y[i] - rise / 2 - (a - b) / 8);
    rows[i] = s.y[i];
    rows[n + i] = a;
    rows[2 * n + i] = 3 * rise - 2 * a - b + bulge;
    rows[3 * n + i] = a + b - 2 * rise - 2 * bulge;
    rows[4 * n + i] = bulge;
    rows[5 * n + i] = 0;
  }
}

}  // namespace vatwright
