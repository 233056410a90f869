#include "tube_outcome.hpp"

#include <algorithm>
#include <cmath>
#include <sstream>

#include "uncooled.hpp"
#include "vatwright/numeric/root.hpp"
#include "vatwright/vessel/pressure_drop.hpp"

namespace vatwright {
namespace {

struct BoreOf {
  double operator()(const StirredTank&) const { return 0; }
  double operator()(const Tube& tube) const { return tube.bore_m; }
  double operator()(const PackedTube& tube) const { return tube.bore_m; }
};

/// Fractions of the length, denser at the inlet where most happens.
std::vector<double> standing_places(int intervals) {
  std::vector<double> all;
  for (int k = 0; k <= intervals; ++k) {
    const double z = static_cast<double>(k) / intervals;
    all.push_back(z * std::sqrt(z));
  }
  return all;
}

std::vector<double> places_of(const SolvedTube& tube, int intervals) {
  std::vector<double> all = standing_places(intervals);
  all.insert(all.end(), tube.places.begin(), tube.places.end());
  std::ranges::sort(all);
  all.erase(std::unique(all.begin(), all.end()), all.end());
  return all;
}

/// Heat that the wall must take at a place, W per m2 of inner surface.
double flux_at(const SolvedTube& tube, const Stream& there) {
  const Setup& setup = tube.setup;
  const Chemistry& chemistry = setup.chemistry;
  std::vector<double> C(static_cast<std::size_t>(chemistry.kinetics.species()));
  std::vector<double> r(setup.capacity.size());
  chemistry.concentrations(there.xi_mol_m3, there.temperature_K, there.pressure_Pa, C);
  tube.evaluator(C, there.temperature_K, chemistry.kinetics.conversion(there.xi_mol_m3), r);
  double heat = 0;
  for (std::size_t j = 0; j < r.size(); ++j) heat -= setup.capacity[j] * r[j] * setup.dH(j, there.temperature_K);
  return heat * std::visit(BoreOf{}, setup.vessel.kind) / 4;  // volume over surface
}

/// inside: the streams at the places.
void add_fluxes(const SolvedTube& tube, const std::vector<double>& places, const std::vector<Stream>& inside,
                HeatNeed& heat) {
  const auto flux = [&](double z) { return flux_at(tube, tube.at(z)); };
  std::vector<double> at_places;
  for (const Stream& there : inside) at_places.push_back(flux_at(tube, there));
  for (std::size_t i = 0; i < places.size(); ++i) {
    double most = at_places[i], least = at_places[i];
    if (i > 0 && i + 1 < places.size()) {
      const double before = at_places[i - 1], after = at_places[i + 1];
      if (most > before && most >= after) most = find_peak(flux, places[i - 1], places[i + 1], 1e-6).value;
      if (least < before && least <= after)
        least = -find_peak([&](double z) { return -flux(z); }, places[i - 1], places[i + 1], 1e-6).value;
    }
    heat.most_flux_W_m2 = std::max(heat.most_flux_W_m2, most);
    heat.least_flux_W_m2 = std::min(heat.least_flux_W_m2, least);
  }
}

HeatNeed heat_of(const SolvedTube& tube, const Stream& outlet, const std::vector<double>& places,
                 const std::vector<Stream>& inside) {
  const Setup& setup = tube.setup;
  const auto& xi_in = setup.arrives.xi_mol_m3;
  HeatNeed heat;
  heat.preheat_W = tube.feed_m3_s * sensible_heat(setup.chemistry, xi_in, setup.arrives.temperature_K, setup.inlet_K);
  heat.cooling_W = tube.feed_m3_s * released_heat(setup.chemistry, xi_in, outlet.xi_mol_m3, setup.inlet_K);
  add_fluxes(tube, places, inside, heat);
  return heat;
}

/// What a jacket that nothing holds takes: the integral of u (T - Tm) along the tube, by what the fluid gives off.
HeatNeed given_off(const SolvedTube& tube, const Stream& outlet) {
  const Setup& setup = tube.setup;
  const auto& xi_in = setup.arrives.xi_mol_m3;
  const double T = outlet.temperature_K;
  HeatNeed heat;
  heat.cooling_W = tube.feed_m3_s * (released_heat(setup.chemistry, xi_in, outlet.xi_mol_m3, T) -
                                     sensible_heat(setup.chemistry, xi_in, setup.inlet_K, T));
  return heat;
}

/// Hottest and coldest between the places, where the temperature turns.
void refine_extremes(const SolvedTube& tube, const std::vector<double>& places, const std::vector<double>& T,
                     VesselOutcome& outcome) {
  const auto temperature = [&](double z) { return tube.at(z).temperature_K; };
  const auto minus = [&](double z) { return -tube.at(z).temperature_K; };
  for (std::size_t i = 1; i + 1 < places.size(); ++i) {
    if (T[i] >= T[i - 1] && T[i] >= T[i + 1] && T[i] > std::min(T[i - 1], T[i + 1])) {
      const Peak peak = find_peak(temperature, places[i - 1], places[i + 1], 1e-6);
      if (peak.value > outcome.hottest_K) outcome.hottest_K = peak.value, outcome.hottest_at = peak.at;
    }
    if (T[i] <= T[i - 1] && T[i] <= T[i + 1] && T[i] < std::max(T[i - 1], T[i + 1]))
      outcome.coldest_K = std::min(outcome.coldest_K, -find_peak(minus, places[i - 1], places[i + 1], 1e-6).value);
  }
}

/// The worst place to lose the cooling, and the greatest difference to the medium.
void tell_uncooled(const SolvedTube& tube, const std::vector<double>& places, VesselOutcome& outcome) {
  const Setup& setup = tube.setup;
  std::vector<double> C(static_cast<std::size_t>(setup.chemistry.kinetics.species()));
  const Stream* worst = nullptr;
  double most = 0;
  for (const Stream& there : outcome.inside) {
    setup.chemistry.concentrations(there.xi_mol_m3, there.temperature_K, there.pressure_Pa, C);
    const double potential = potential_K(setup, C, there.temperature_K);
    if (worst == nullptr || potential > most) worst = &there, most = potential;
  }
  setup.chemistry.concentrations(worst->xi_mol_m3, worst->temperature_K, worst->pressure_Pa, C);
  outcome.uncooled_K = std::max(outcome.hottest_K, warmest_uncooled(setup, C, worst->temperature_K));
  if (!setup.vessel.jacket) return;
  const double U = setup.vessel.jacket->U_fouled();
  for (std::size_t i = 0; i < places.size(); ++i) {
    const Stream& there = outcome.inside[i];
    if (setup.is_held && !(U > 0)) continue;
    const double difference =
        setup.is_held ? flux_at(tube, there) / U : there.temperature_K - tube.medium_at(places[i]);
    if (difference <= (outcome.driving ? outcome.driving->contents_K : 0)) continue;
    if (const auto own = most_driving_K(setup, tube.evaluator, there))
      outcome.driving = DrivingDifference{difference, *own};
  }
}

Profile profile_of(const SolvedTube& tube, double hottest_at) {
  Profile profile;
  const double length = length_of(tube.setup.vessel.kind);
  auto places = places_of(tube, 40);
  places.insert(std::ranges::lower_bound(places, hottest_at), hottest_at);
  places.erase(std::unique(places.begin(), places.end()), places.end());
  for (double z : places) {
    const Stream there = tube.at(z);
    profile.length_m.push_back(z * length);
    profile.volume_m3.push_back(z * tube.setup.volume_m3);
    profile.conversion.push_back(tube.setup.chemistry.kinetics.conversion(there.xi_mol_m3));
    profile.temperature_K.push_back(there.temperature_K);
    profile.pressure_Pa.push_back(there.pressure_Pa);
    profile.medium_K.push_back(tube.setup.is_jacketed() ? std::optional(tube.medium_at(z)) : std::nullopt);
    if (tube.setup.is_held && tube.setup.heat_known()) profile.flux_W_m2.push_back(flux_at(tube, there));
  }
  return profile;
}

}  // namespace

VesselOutcome tell(const SolvedTube& tube, Detail detail) {
  const Setup& setup = tube.setup;
  VesselOutcome outcome;
  outcome.outlet = tube.at(1);
  outcome.conversion = setup.chemistry.kinetics.conversion(outcome.outlet.xi_mol_m3);
  outcome.enters_K = setup.inlet_K;
  outcome.isothermal = setup.is_held;
  outcome.let_down_above_Pa = setup.let_down_above_Pa;
  outcome.highest_Pa = setup.inlet_Pa;
  outcome.lowest_Pa = outcome.outlet.pressure_Pa;
  if (loss_per_length(setup, tube.feed_m3_s, setup.arrives.xi_mol_m3, setup.inlet_K, setup.inlet_Pa))
    outcome.pressure_drop_Pa = setup.inlet_Pa - outcome.outlet.pressure_Pa;
  outcome.coldest_K = std::min(setup.inlet_K, outcome.outlet.temperature_K);
  outcome.hottest_K = std::max(setup.inlet_K, outcome.outlet.temperature_K);
  outcome.hottest_at = outcome.outlet.temperature_K > setup.inlet_K ? 1 : 0;
  if (detail == Detail::map) return outcome;
  const auto places = places_of(tube, 24);
  std::vector<double> T;
  for (double z : places) {
    Stream there = tube.at(z);
    T.push_back(there.temperature_K);
    outcome.coldest_K = std::min(outcome.coldest_K, there.temperature_K);
    if (there.temperature_K > outcome.hottest_K) outcome.hottest_K = there.temperature_K, outcome.hottest_at = z;
    outcome.inside.push_back(std::move(there));
  }
  if (setup.is_jacketed()) {
    refine_extremes(tube, places, T, outcome);
    outcome.heat = given_off(tube, outcome.outlet);
  }
  if (setup.is_held && setup.heat_known()) outcome.heat = heat_of(tube, outcome.outlet, places, outcome.inside);
  if (cooling_can_fail(setup)) tell_uncooled(tube, places, outcome);
  if (detail == Detail::profile) outcome.profile = profile_of(tube, outcome.hottest_at);
  return outcome;
}

std::optional<double> loss_per_length(const Setup& setup, double feed_m3_s, std::span<const double> xi, double T_K,
                                      double P_Pa) {
  const auto mass = setup.chemistry.feed_mass();
  const auto viscosity = setup.chemistry.feed.viscosity_Pa_s;
  if (!mass || !viscosity) return std::nullopt;
  return pressure_gradient(setup.vessel.kind, {feed_m3_s * *mass, *setup.chemistry.density(xi, T_K, P_Pa), *viscosity});
}

NoAnswer pressure_used_up(double z, double length_m) {
  std::ostringstream why;
  why.precision(3);
  why << "the pressure is used up after " << z * length_m << " m of " << length_m << " m";
  return {NoAnswer::Kind::does_not_pass, why.str()};
}

}  // namespace vatwright
