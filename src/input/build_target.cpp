#include <cmath>

#include "build_duty.hpp"
#include "build_feed.hpp"
#include "vatwright/quantity/show.hpp"

namespace vatwright {
namespace {

class TargetMaker {
 public:
  TargetMaker(const TargetDraft& d, const Duty& duty, const AmountReader& amounts, const Builder& builder)
      : d_(d), duty_(duty), feed_(duty.chemistry.feed), amounts_(amounts), builder_(builder) {}

  Target make(std::optional<double> sum_of_rates_m3_s) {
    target_.conversion = d_.conversion.value;
    read_share(d_.yield, Demand::On::yield, "yield");
    read_share(d_.selectivity, Demand::On::selectivity, "selectivity");
    if (d_.outlet)
      for (const OutletDraft& o : *d_.outlet) read_outlet(o);
    if (!d_.conversion.written && !d_.yield.written && !d_.selectivity.written && !d_.outlet.written)
      error(d_.place, "", "asks nothing", "expected a conversion, yield, selectivity or outlet");
    read_rate(sum_of_rates_m3_s);
    return target_;
  }

 private:
  void error(Place at, const std::string& key, std::string found, std::string expected) const {
    builder_.about("target").error(at, key, std::move(found), std::move(expected));
  }

  int species(const Given<std::string>& name, const std::string& key) const {
    if (!name) return -1;
    const int i = feed_.index_of(*name);
    std::vector<std::string> known;
    for (const Species& s : feed_.species) known.push_back(s.name);
    if (i < 0)
      error(name.place, key, "no species " + quoted(*name), "expected one that is fed or made; " + hint(*name, known));
    return i;
  }

  void read_share(const Given<ShareDraft>& share, Demand::On on, const std::string& key) {
    if (!share) return;
    const int i = species(share->species, key + ".species");
    if (i >= 0 && share->at_least) target_.demands.push_back({on, i, *share->at_least, true});
  }

  void read_outlet(const OutletDraft& o) {
    const int i = species(o.species, "outlet.species");
    if (o.at_least.written == o.at_most.written) {
      error(o.place, "outlet",
            o.at_least.written ? "found both at_least and at_most" : "found neither at_least nor at_most",
            "expected one of them");
      return;
    }
    const Given<Raw>& raw = o.at_least.written ? o.at_least : o.at_most;
    const std::string key = o.at_least.written ? "outlet.at_least" : "outlet.at_most";
    if (!raw || i < 0) return;
    const bool fraction = feed_.phase == Phase::gas && raw->quantity.dimension == dim::none;
    if (fraction && (raw->quantity.si < 0 || raw->quantity.si > 1))
      return error(raw->place, key, "found " + raw->text, "expected a mole fraction from 0 to 1");
    const auto value = fraction ? std::optional(raw->quantity.si)
                                : amounts_.read(*raw, dim::concentration,
                                                feed_.species[static_cast<std::size_t>(i)].name, "target", key);
    if (value && *value < 0)
      error(raw->place, key, "found " + quoted(raw->text), "expected zero or more");
    else if (value)
      target_.demands.push_back(
          {fraction ? Demand::On::fraction : Demand::On::concentration, i, *value, o.at_least.written});
  }

  void read_rate(std::optional<double> sum) {
    if (d_.feed_rate.written && d_.production.written) {
      error(d_.production.place, "production", "found both feed_rate and production", "expected one of them");
    } else if (d_.feed_rate) {
      if (const auto v = read_feed_rate(*d_.feed_rate, feed_, builder_, "target")) target_.feed_m3_s = *v;
    } else if (d_.production) {
      read_production(*d_.production);
    } else if (sum && !d_.feed_rate.written && !d_.production.written) {
      target_.feed_m3_s = *sum;
      builder_.assume("target.feed_rate", show(*sum, Shown::feed), "left out: the sum of the streams' rates");
    } else if (!d_.feed_rate.written && !d_.production.written) {
      error(d_.place, "feed_rate", "missing", "expected feed_rate = \"2.4 m3/h\", or production");
    }
  }

  /// amount/on_stream/(molar mass * feed concentration of conversion_of / n * Y), n the moles needed for one mole.
  void read_production(const ProductionDraft& p) {
    const int i = species(p.species, "production.species");
    if (i < 0 || !p.amount) return;
    const std::string& name = *p.species;
    Raw rate = *p.amount;
    double share_of_year = 1;
    if (p.on_stream)
      share_of_year = *p.on_stream;
    else if (!p.on_stream.written)
      builder_.assume("target.production.on_stream", "8760 h/year", "left out");
    const auto moles = amounts_.read(rate, dim::molar_flow, name, "target", "production.amount");
    if (!moles) return;
    if (!(*moles > 0))
      return error(p.amount.place, "production.amount", "found " + quoted(rate.text), "expected more than zero");
    const auto Y = wanted_yield(i);
    if (!Y) return;
    const auto& kinetics = duty_.chemistry.kinetics;
    std::vector<bool> fed;
    for (const double c : feed_.c_mol_m3) fed.push_back(c > 0);
    const auto n = kinetics.of() >= 0 ? moles_needed(kinetics, fed, i) : std::nullopt;
    if (!n)
      return error(p.species.place, "production.species", quoted(name) + " is not made from " + duty_.conversion_of,
                   "expected a product of it");
    const double v = *moles / share_of_year / (kinetics.c_of_feed() / *n * *Y);
    if (!std::isfinite(v) || !(v > 0))
      return error(p.amount.place, "production.amount",
                   "found " + quoted(rate.text) + ", which asks a feed beyond all size",
                   "expected another amount, or another concentration of " + duty_.conversion_of);
    target_.feed_m3_s = v;
    builder_.assume("target.feed_rate", show(target_.feed_m3_s, Shown::feed),
                    "from the production, at a yield of " + shortest(*Y));
  }

  std::optional<double> wanted_yield(int of) const {
    for (const Demand& d : target_.demands)
      if (d.on == Demand::On::yield && d.species == of && d.bound > 0) return d.bound;
    if (duty_.chemistry.kinetics.reactions() == 1 && target_.conversion && *target_.conversion > 0)
      return target_.conversion;
    error(d_.production.place, "production", "needs the yield that is wanted of its species",
          "expected yield = { species = " + quoted(feed_.species[static_cast<std::size_t>(of)].name) +
              ", at_least = 0.8 }");
    return std::nullopt;
  }

  const TargetDraft& d_;
  const Duty& duty_;
  const Feed& feed_;
  const AmountReader& amounts_;
  const Builder& builder_;
  Target target_;
};

}  // namespace

Target build_target(const DutyDraft& draft, const Duty& duty, std::optional<double> sum_of_rates_m3_s,
                    const AmountReader& amounts, const Builder& builder) {
  if (!draft.target) return {};
  return TargetMaker(*draft.target, duty, amounts, builder).make(sum_of_rates_m3_s);
}

}  // namespace vatwright
