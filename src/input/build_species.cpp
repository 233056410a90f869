#include <algorithm>

#include "build_feed.hpp"

namespace vatwright {
namespace {

void meet(std::vector<std::string>& names, const std::string& name) {
  if (std::find(names.begin(), names.end(), name) == names.end()) names.push_back(name);
}

const SpeciesDraft* find_draft(const DutyDraft& draft, const std::string& name) {
  if (!draft.species) return nullptr;
  for (const Named<SpeciesDraft>& s : *draft.species)
    if (s.name == name) return &s.value;
  return nullptr;
}

Antoine build_antoine(const AntoineDraft& d, const Builder& builder, const std::string& subject) {
  Antoine a;
  a.A = d.A.value.value_or(1), a.B = d.B.value.value_or(1), a.C = d.C.value.value_or(0);
  if (d.pressure) {
    const auto unit = to_si("1 " + *d.pressure, dim::pressure);
    if (const auto* pa = std::get_if<double>(&unit))
      a.unit_Pa = *pa;
    else
      builder.about(subject).error(d.pressure.place, "antoine.pressure", "found " + quoted(*d.pressure),
                                   "expected a unit of pressure, such as \"mmHg\"");
  }
  if (d.temperature && *d.temperature == AntoineScale::celsius) a.offset_K = 273.15;
  return a;
}

std::optional<HeatCapacity> build_heat_capacity(const std::vector<Raw>& raws, const std::string& name,
                                                const AmountReader& amounts, const std::string& subject) {
  HeatCapacity cp;
  Dimension expected = dim::molar_heat_capacity;
  for (const Raw& raw : raws) {
    const auto a = amounts.read(raw, expected, name, subject, "heat_capacity");
    if (!a) return std::nullopt;
    cp.a.push_back(*a);
    expected = expected / dim::temperature;
  }
  return cp.a.empty() ? std::nullopt : std::optional(cp);
}

Species build_one(const std::string& name, const SpeciesDraft* d, AmountReader& amounts, const Builder& builder) {
  Species s;
  s.name = name;
  if (!d) return s;
  const std::string subject = "species " + name;
  if (d->molar_mass && amounts.amounts() == Amounts::mass)
    builder.about(subject).error(d->molar_mass.place, "molar_mass", "found a molar mass under amounts = \"mass\"",
                                 "expected none: every species counts in kg");
  else if (d->molar_mass)
    s.molar_mass_kg_mol = *d->molar_mass, amounts.know(name, *d->molar_mass);
  if (d->heat_capacity) s.heat_capacity = build_heat_capacity(*d->heat_capacity, name, amounts, subject);
  if (d->antoine) s.antoine = build_antoine(*d->antoine, builder, subject);
  s.is_volatile = d->is_volatile.value.value_or(true);
  s.solvent = d->solvent.value.value_or(false);
  if (s.antoine && s.antoine->pressure_Pa(298.15) > 1e9)
    builder.about(subject).error(d->antoine.place, "antoine", "gives a vapour pressure above 10 000 bar at 25 degC",
                                 "expected the units of the equation: pressure = \"mmHg\", temperature = \"degC\"?");
  return s;
}

/// Of species that fill up there may be one.
void meet_solvents(const ByName<SpeciesDraft>& species, std::vector<std::string>& names, const Builder& builder) {
  std::string first;
  for (const auto& s : species) {
    if (!s.value.solvent.value.value_or(false)) continue;
    meet(names, s.name);
    if (first.empty())
      first = s.name;
    else
      builder.about("species " + s.name)
          .error(s.value.solvent.place, "solvent", "found a second solvent",
                 "expected solvent = true once; " + quoted(first) + " is one already");
  }
}

}  // namespace

std::vector<Species> build_species(const DutyDraft& draft, const std::vector<std::optional<Equation>>& equations,
                                   AmountReader& amounts, const Builder& builder) {
  std::vector<std::string> names;
  if (draft.feeds)
    for (const FeedDraft& f : *draft.feeds) {
      if (f.concentration)
        for (const auto& c : *f.concentration) meet(names, c.name);
      if (f.fraction)
        for (const auto& x : *f.fraction) meet(names, x.name);
    }
  if (draft.species) meet_solvents(*draft.species, names, builder);
  for (const auto& e : equations)
    if (e)
      for (const std::string& name : e->species()) meet(names, name);
  std::vector<Species> species;
  for (const std::string& name : names) species.push_back(build_one(name, find_draft(draft, name), amounts, builder));
  if (draft.species)
    for (const auto& s : *draft.species)
      if (std::find(names.begin(), names.end(), s.name) == names.end())
        builder.about("species " + s.name)
            .error(s.name_place, "", "no species " + quoted(s.name) + " is fed or made",
                   "expected one that is; " + hint(s.name, names));
  return species;
}

}  // namespace vatwright
