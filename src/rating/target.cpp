#include <cmath>

#include "vatwright/rating/rating.hpp"

namespace vatwright {

namespace {
std::vector<bool> fed(const Feed& feed) {
  std::vector<bool> is_fed;
  for (const double c : feed.c_mol_m3) is_fed.push_back(c > 0);
  return is_fed;
}

/// Moles of species i made per m3 of mixed feed, sum_j nu_ij xi_j.
double made(const Kinetics& kinetics, int i, const Stream& outlet) {
  double sum = 0;
  for (int j = 0; j < kinetics.reactions(); ++j)
    sum += kinetics.nu(i, j) * outlet.xi_mol_m3[static_cast<std::size_t>(j)];
  return sum;
}

/// Yield of i: n (F_i,out - F_i,fed)/F_A,fed. Selectivity: the same over F_A,fed - F_A,out.
std::optional<double> yield_of(const Duty& duty, int i, const Stream& outlet) {
  const Kinetics& k = duty.chemistry.kinetics;
  const auto n = moles_needed(k, fed(duty.chemistry.feed), i);
  if (!n || !(k.c_of_feed() > 0)) return std::nullopt;
  return *n * made(k, i, outlet) / k.c_of_feed();
}
std::optional<double> selectivity_of(const Duty& duty, int i, const Stream& outlet) {
  const double X = duty.chemistry.kinetics.conversion(outlet.xi_mol_m3);
  const auto Y = yield_of(duty, i, outlet);
  if (!Y || X == 0) return std::nullopt;
  const double S = *Y / X;
  return std::isfinite(S) ? std::optional(S) : std::nullopt;
}

double concentration_of(const Chemistry& chemistry, int i, const Stream& outlet, bool fraction) {
  std::vector<double> C(chemistry.feed.species.size());
  chemistry.concentrations(outlet.xi_mol_m3, outlet.temperature_K, outlet.pressure_Pa, C);
  const double c = C[static_cast<std::size_t>(i)];
  if (!fraction) return c;
  double sum = 0;
  for (const double each : C) sum += each;
  return sum > 0 ? c / sum : 0;
}

TargetItem judged(TargetItem item) {
  const double scale = item.bound == 0 ? 1 : std::abs(item.bound);
  item.margin = item.value ? (item.at_least ? *item.value - item.bound : item.bound - *item.value) / scale : -1;
  item.met = item.margin >= -holds_within;
  return item;
}

TargetItem check_demand(const Duty& duty, const Demand& demand, const Stream& outlet) {
  const Feed& feed = duty.chemistry.feed;
  const std::string& name = feed.species[static_cast<std::size_t>(demand.species)].name;
  TargetItem item{.bound = demand.bound, .at_least = demand.at_least};
  switch (demand.on) {
    case Demand::On::yield:
      item.text = "yield of " + name;
      item.shown = Shown::percent;
      item.value = yield_of(duty, demand.species, outlet);
      break;
    case Demand::On::selectivity:
      item.text = "selectivity to " + name;
      item.shown = Shown::percent;
      item.value = selectivity_of(duty, demand.species, outlet);
      break;
    case Demand::On::concentration:
      item.text = "outlet " + name;
      item.shown = feed.amounts == Amounts::mass ? Shown::density : Shown::concentration;
      item.value = concentration_of(duty.chemistry, demand.species, outlet, false);
      break;
    case Demand::On::fraction:
      item.text = "outlet fraction of " + name;
      item.value = concentration_of(duty.chemistry, demand.species, outlet, true);
      break;
  }
  return judged(std::move(item));
}
}  // namespace

std::vector<TargetItem> check_target(const Duty& duty, const Stream& outlet) {
  std::vector<TargetItem> items;
  if (duty.target.conversion) {
    TargetItem item{.text = "conversion of " + duty.conversion_of, .bound = *duty.target.conversion};
    item.shown = Shown::percent;
    item.value = duty.chemistry.kinetics.conversion(outlet.xi_mol_m3);
    items.push_back(judged(std::move(item)));
  }
  for (const Demand& demand : duty.target.demands) items.push_back(check_demand(duty, demand, outlet));
  return items;
}

std::vector<std::pair<std::string, std::optional<double>>> yields_of(const Duty& duty, const Stream& outlet) {
  const Kinetics& k = duty.chemistry.kinetics;
  std::vector<std::pair<std::string, std::optional<double>>> yields;
  for (int i = 0; i < k.species(); ++i) {
    bool is_made = false;
    for (int j = 0; j < k.reactions(); ++j) is_made = is_made || k.nu(i, j) > 0;
    if (is_made && i != k.of()) {
      yields.emplace_back(duty.chemistry.feed.species[static_cast<std::size_t>(i)].name, yield_of(duty, i, outlet));
    }
  }
  return yields;
}

std::vector<std::pair<std::string, double>> outlet_flows(const Duty& duty, const Stream& outlet) {
  const Chemistry& chemistry = duty.chemistry;
  std::vector<double> c(chemistry.feed.species.size());
  chemistry.kinetics.amounts(chemistry.feed.c_mol_m3, outlet.xi_mol_m3, c);
  std::vector<std::pair<std::string, double>> flows;
  for (std::size_t i = 0; i < c.size(); ++i)
    flows.emplace_back(chemistry.feed.species[i].name, c[i] * outlet.feed_m3_s);
  return flows;
}

}  // namespace vatwright
