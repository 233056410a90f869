#include <algorithm>
#include <cmath>

#include "build.hpp"
#include "checks.hpp"
#include "vatwright/numeric/root.hpp"
#include "vatwright/quantity/show.hpp"

namespace vatwright {

namespace {
constexpr double trace = 1e-9;      // mole fraction below which a species does not count
constexpr double hottest_K = 3000;  // no liquid is looked for above

/// What the search for the bubble point starts from: the equation must make sense there, T + C > 0.
double lowest_K(const Species& s) { return s.antoine->offset_K - s.antoine->C; }

bool counts(const Species& s, double x) { return s.is_volatile && s.antoine && x > trace; }

double pressure_over(const std::vector<Species>& species, const std::vector<double>& x, double T_K) {
  double p = 0;  // sum x_i p_i(T)
  for (std::size_t i = 0; i < x.size(); ++i) {
    if (counts(species[i], x[i]) && T_K > lowest_K(species[i])) p += x[i] * species[i].antoine->pressure_Pa(T_K);
  }
  return p;
}

std::vector<double> mole_fractions(const Chemistry& chemistry, const Stream& place) {
  std::vector<double> x(chemistry.feed.species.size());
  chemistry.concentrations(place.xi_mol_m3, place.temperature_K, place.pressure_Pa, x);
  double sum = 0;
  for (double& c : x) sum += (c = std::max(c, 0.0));  // a species used up may stand at -1e-17
  for (double& c : x) c = sum > 0 ? c / sum : 0;
  return x;
}

/// What keeps the bubble point from being told; empty: nothing.
std::string missing(const Chemistry& chemistry, const std::vector<double>& x) {
  if (chemistry.feed.amounts == Amounts::mass) return "amounts are by mass, so mole fractions are not known";
  if (chemistry.feed.unnamed_solvent) return "the solvent is not named, so its vapour pressure is not known";
  for (std::size_t i = 0; i < x.size(); ++i) {
    const Species& s = chemistry.feed.species[i];
    if (s.is_volatile && !s.antoine && x[i] > trace) return "no vapour pressure given for " + s.name;
  }
  return {};
}

/// "forbid where every vapour pressure that it takes is given": of everything fed or made.
bool all_given(const Chemistry& chemistry) {
  if (chemistry.feed.amounts == Amounts::mass || chemistry.feed.unnamed_solvent) return false;
  return std::all_of(chemistry.feed.species.begin(), chemistry.feed.species.end(),
                     [](const Species& s) { return !s.is_volatile || s.antoine; });
}

std::string explain(double T_K, double boils_K) {
  return show(T_K, Shown::temperature) + " inside, it boils at " + show(boils_K, Shown::temperature);
}

Limit against_given(const LimitInput& input) {
  const double boils_K = input.product.boiling_K;
  const double T_K = input.outcome.hottest_K;
  return explained(limit_of(limit_name::bubble_point, T_K, boils_K, Side::most, "K"),
                   [&] { return explain(T_K, boils_K); });
}

/// The place nearest to boiling; nullopt: nothing volatile anywhere.
std::optional<Limit> against_reckoned(const LimitInput& input) {
  std::optional<Limit> worst;
  for (const Stream& place : input.outcome.inside) {
    const auto x = mole_fractions(input.chemistry, place);
    if (auto why = missing(input.chemistry, x); !why.empty()) return cannot_tell(limit_name::bubble_point, why);
    const auto boils_K = bubble_temperature(input.chemistry.feed.species, x, place.pressure_Pa);
    if (!boils_K) continue;
    const auto here = limit_of(limit_name::bubble_point, place.temperature_K, *boils_K, Side::most, "K");
    if (!worst || *here.margin < *worst->margin) worst = here;
  }
  if (worst) worst = explained(*worst, [&] { return explain(*worst->value, *worst->bound); });
  return worst;
}
}  // namespace

std::optional<double> bubble_temperature(const std::vector<Species>& species, const std::vector<double>& x,
                                         double P_Pa) {
  double low = hottest_K;
  for (std::size_t i = 0; i < x.size(); ++i) {
    if (counts(species[i], x[i])) low = std::min(low, std::max(lowest_K(species[i]), 0.0));
  }
  if (low >= hottest_K || !(pressure_over(species, x, hottest_K) > P_Pa)) return std::nullopt;
  // ln p is nearly a straight line in 1/T, so the root is looked for there: few calls
  const auto excess = [&](double inverse_T) {
    const double p = pressure_over(species, x, 1 / inverse_T);
    return p > 0 ? std::max(std::log(p / P_Pa), -700.0) : -700.0;
  };
  const auto root = find_root(excess, 1 / hottest_K, 1 / std::max(low, 1.0), {.rel_tol = 1e-13});
  if (const double* inverse_T = answer(root)) return 1 / *inverse_T;
  return std::nullopt;
}

std::optional<Limit> check_bubble_point(const LimitInput& input) {
  if (input.chemistry.feed.phase != Phase::liquid) return std::nullopt;
  switch (input.product.boiling) {
    case ProductLimits::Boiling::ignore:
      return std::nullopt;
    case ProductLimits::Boiling::at:
      return against_given(input);
    case ProductLimits::Boiling::unsaid:
      if (!all_given(input.chemistry)) return std::nullopt;
      break;
    case ProductLimits::Boiling::forbid:
      break;
  }
  return against_reckoned(input);
}

}  // namespace vatwright
