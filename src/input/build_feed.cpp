#include "build_feed.hpp"

#include <algorithm>
#include <cmath>

#include "mix_feeds.hpp"
#include "vatwright/kinetics/kinetics.hpp"
#include "vatwright/quantity/show.hpp"

namespace vatwright {
namespace {

/// Named species that fall short of the density by less than this share leave no solvent unnamed.
constexpr double full_within = 5e-3;

std::string subject_of(const FeedDraft& d) { return d.name ? "feed " + *d.name : "feed"; }

/// One stream before mixing.
class StreamMaker {
 public:
  StreamMaker(const FeedDraft& d, Phase phase, const std::vector<Species>& species, const AmountReader& amounts,
              const Builder& b)
      : d_(d), amounts_(amounts), builder_(b), subject_(subject_of(d)) {
    feed_.phase = phase;
    feed_.amounts = amounts.amounts();
    feed_.species = species;
    feed_.c_mol_m3.assign(species.size(), 0.0);
  }

  Feed make() {
    feed_.temperature_K = d_.temperature.value.value_or(298.15);
    feed_.pressure_Pa = d_.pressure.value.value_or(101325);
    feed_.viscosity_Pa_s = d_.viscosity.value;
    feed_.heat_capacity_J_kg_K = d_.heat_capacity.value;
    feed_.phase == Phase::liquid ? make_liquid() : make_gas();
    warn_of_slips();
    return feed_;
  }

 private:
  void error(Place at, const std::string& key, std::string found, std::string expected) const {
    builder_.about(subject_).error(at, key, std::move(found), std::move(expected));
  }

  void make_liquid() {
    feed_.density_kg_m3 = d_.density.value;
    if (d_.fraction.written)
      error(d_.fraction.place, "fraction", "found mole fractions in a liquid feed",
            "expected concentration; fraction is for gases");
    if (!d_.concentration.written && !d_.fraction.written)
      error(d_.place, "concentration", "missing", "expected what is fed, such as { A = \"3.2 mol/L\" }");
    if (!d_.concentration) return;
    for (const auto& entry : *d_.concentration) {
      const auto c =
          amounts_.read(entry.value, dim::concentration, entry.name, subject_, "concentration." + entry.name);
      if (c && *c < 0)
        error(entry.place, "concentration." + entry.name, "found " + quoted(entry.value.text), "expected zero or more");
      if (c) feed_.c_mol_m3[static_cast<std::size_t>(feed_.index_of(entry.name))] = *c;
    }
    weigh();
  }

  double mass_of(const Species& s) const {
    return feed_.amounts == Amounts::mass ? 1.0 : s.molar_mass_kg_mol.value_or(0);
  }

  /// Concentrations against the density; the named solvent fills up.
  void weigh() {
    double named = 0;
    bool all_known = true;
    int solvent = -1;
    for (std::size_t i = 0; i < feed_.species.size(); ++i) {
      const Species& s = feed_.species[i];
      if (s.solvent && solvent < 0) solvent = static_cast<int>(i);
      if (feed_.c_mol_m3[i] <= 0) continue;
      all_known = all_known && mass_of(s) > 0;
      named += feed_.c_mol_m3[i] * mass_of(s);
    }
    const auto& rho = feed_.density_kg_m3;
    if (rho && named > *rho * (1 + full_within)) return tell_too_heavy(named);
    if (solvent >= 0) return fill_up(static_cast<std::size_t>(solvent), named, all_known);
    feed_.unnamed_solvent = !(rho && all_known && named >= *rho * (1 - full_within));
  }

  void tell_too_heavy(double named) const {
    const auto& entry = d_.concentration->front();
    error(entry.place, "concentration",
          "found species that weigh " + show(named, Shown::density) + " together, above the density " +
              show(*feed_.density_kg_m3, Shown::density),
          "expected less; a smaller unit meant?");
  }

  void fill_up(std::size_t i, double named, bool all_known) {
    const Species& s = feed_.species[i];
    if (feed_.c_mol_m3[i] > 0)
      error(d_.concentration.place, "concentration." + s.name, "found a concentration of the solvent",
            "expected none: it fills up to the density");
    else if (!feed_.density_kg_m3)
      error(d_.place, "density", "missing", "expected it: solvent " + quoted(s.name) + " fills up to the density");
    else if (!all_known || mass_of(s) <= 0)
      error(d_.place, "", "a molar mass is missing",
            "expected one for every fed species: solvent " + quoted(s.name) + " fills up to the density");
    else
      feed_.c_mol_m3[i] = std::max(0.0, *feed_.density_kg_m3 - named) / mass_of(s);
  }

  void make_gas() {
    if (d_.concentration.written)
      error(d_.concentration.place, "concentration", "found concentrations in a gas feed",
            "expected fraction; concentration is for liquids");
    if (d_.density.written)
      error(d_.density.place, "density", "found a density of a gas",
            "expected none: it follows from molar masses, temperature and pressure");
    if (!d_.pressure.written)
      builder_.assume((d_.name ? "feed." + *d_.name : "feed") + ".pressure", "1.01325 bar", "left out");
    if (!d_.fraction.written && !d_.concentration.written)
      error(d_.place, "fraction", "missing", "expected mole fractions, such as { A = 0.5, N2 = 0.5 }");
    if (!d_.fraction) return;
    double sum = 0;
    for (const auto& x : *d_.fraction) sum += x.value;
    if (std::abs(sum - 1) > 1e-6) {
      error(
          d_.fraction.place, "fraction", "mole fractions add to " + shortest(std::round(sum * 1e9) / 1e9),
          "expected 1" + (sum < 1 ? "; " + shortest(std::round((1 - sum) * 1e9) / 1e9) + " of what?" : std::string()));
      return;
    }
    const double c = feed_.pressure_Pa / (gas_constant * feed_.temperature_K);
    for (const auto& x : *d_.fraction)
      feed_.c_mol_m3[static_cast<std::size_t>(feed_.index_of(x.name))] = x.value / sum * c;
    feed_.density_kg_m3 = mass_per_m3();
  }

  std::optional<double> mass_per_m3() const {
    double mass = 0;
    for (std::size_t i = 0; i < feed_.species.size(); ++i) {
      if (feed_.c_mol_m3[i] > 0 && !feed_.species[i].molar_mass_kg_mol) return std::nullopt;
      mass += feed_.c_mol_m3[i] * feed_.species[i].molar_mass_kg_mol.value_or(0);
    }
    return mass;
  }

  /// Usual ranges of liquids: common practice, no source.
  void warn_of_slips() const {
    if (feed_.phase == Phase::gas) return;
    if (d_.density && (*d_.density < 500 || *d_.density > 2000))
      builder_.about(subject_).warning(
          d_.density.place, "density",
          "found " + show(*d_.density, Shown::density) + ", outside 500 to 2000 kg/m3, the usual for liquids");
    if (d_.heat_capacity && (*d_.heat_capacity < 1200 || *d_.heat_capacity > 4500))
      builder_.about(subject_).warning(
          d_.heat_capacity.place, "heat_capacity",
          "found " + shortest(*d_.heat_capacity / 1000) + " kJ/kg/K, outside 1.2 to 4.5, the usual for liquids");
  }

  const FeedDraft& d_;
  const AmountReader& amounts_;
  const Builder& builder_;
  std::string subject_;
  Feed feed_;
};

}  // namespace

std::optional<double> read_feed_rate(const Raw& raw, const Feed& feed, const Builder& builder,
                                     const std::string& subject) {
  const Scope scope = builder.about(subject);
  const Dimension found = raw.quantity.dimension;
  const auto refuse = [&](std::string expected) {
    const std::string what = name_of(found);
    scope.error(raw.place, "feed_rate", "found " + quoted(raw.text) + (what.empty() ? "" : ", " + what),
                std::move(expected));
    return std::nullopt;
  };
  double v = raw.quantity.si;
  if (found == dim::mass_flow) {
    if (!feed.density_kg_m3)
      return refuse(feed.phase == Phase::gas
                        ? "expected a molar mass for every fed species, or a flow by volume or moles"
                        : "expected a density in [feed], or a flow by volume");
    v /= *feed.density_kg_m3;
  } else if (found == dim::molar_flow) {
    if (feed.phase != Phase::gas) return refuse("expected a flow by volume or mass; moles are for gases");
    double c = 0;
    for (const double ci : feed.c_mol_m3) c += ci;
    if (!(c > 0)) return std::nullopt;  // told already
    v /= c;
  } else if (!(found == dim::volume_flow)) {
    return refuse(found == dim::volume ? "expected a flow: per hour?" : "expected a flow, such as \"2.4 m3/h\"");
  }
  if (!(v > 0) || !std::isfinite(v)) return refuse("expected a flow above zero, of a size that can be");
  return v;
}

BuiltFeed build_feed(const DutyDraft& draft, std::vector<Species> species, const AmountReader& amounts,
                     const Builder& builder) {
  BuiltFeed built;
  const Phase phase = draft.phase.value.value_or(Phase::liquid);
  built.feed.phase = phase;
  built.feed.amounts = amounts.amounts();
  built.feed.species = species;
  built.feed.c_mol_m3.assign(species.size(), 0.0);
  if (!draft.feeds || draft.feeds->empty()) return built;
  std::vector<Feed> streams;
  for (const FeedDraft& f : *draft.feeds) {
    streams.push_back(StreamMaker(f, phase, species, amounts, builder).make());
    built.said_pressure = built.said_pressure || f.pressure.written;
  }
  built.feed = streams[0];
  if (draft.one_feed) {
    const FeedDraft& f = draft.feeds->front();
    if (f.feed_rate.written)
      builder.about("feed").error(f.feed_rate.place, "feed_rate", "found a rate in a single [feed]",
                                  "expected it in [target]");
    return built;
  }
  std::vector<double> v;
  for (std::size_t k = 0; k < streams.size(); ++k) {
    const FeedDraft& f = (*draft.feeds)[k];
    if (built.said_pressure && !f.pressure.written && phase == Phase::liquid)
      builder.assume((f.name ? "feed." + *f.name : "feed") + ".pressure", "1.01325 bar",
                     "left out; the mixed feed has the lowest pressure of its streams");
    if (!f.feed_rate.written)
      builder.about(subject_of(f))
          .error(f.place, "feed_rate", "missing", "expected the rate of each stream: they give the proportions");
    const auto rate = f.feed_rate ? read_feed_rate(*f.feed_rate, streams[k], builder, subject_of(f)) : std::nullopt;
    if (rate) v.push_back(*rate);
  }
  if (v.size() == streams.size()) built.sum_of_rates_m3_s = mix_feeds(streams, v, built.feed, builder);
  return built;
}

}  // namespace vatwright
