#include <cmath>
#include <numbers>

#include "site.hpp"
#include "vatwright/quantity/show.hpp"

namespace vatwright {
namespace {

std::string kind_word(Kind kind) {
  return std::string(kind == Kind::stirred_tank ? StirredTank::kind
                     : kind == Kind::tube       ? Tube::kind
                                                : PackedTube::kind);
}

/// Judges one vessel.
class VesselMaker {
 public:
  VesselMaker(const VesselDraft& draft, const std::vector<std::string>& utilities, const Builder& builder)
      : d_(draft),
        utilities_(utilities),
        builder_(builder),
        scope_(builder.about(draft.tag.value.value_or("vessel"))) {}

  Vessel make() {
    Vessel v;
    v.tag = d_.tag.value.value_or("");
    v.status = d_.status.value.value_or(Status::idle);
    v.pressure_Pa = d_.pressure.value;
    v.temperature_K = d_.temperature.value;
    v.wetted = d_.wetted.value.value_or(std::vector<std::string>{});
    v.feed_line_m3_s = d_.feed_line.value;
    v.pressure_drop_Pa = d_.pressure_drop.value;
    v.note = d_.note.value.value_or("");
    v.source = d_.source.value.value_or("");
    if (d_.kind) v.kind = make_kind(*d_.kind);
    if (d_.jacket) v.jacket = make_jacket(*d_.jacket);
    return v;
  }

 private:
  AnyVessel make_kind(Kind kind) {
    if (kind == Kind::stirred_tank) return make_tank();
    refuse(d_.fill, "fill");
    refuse_table(d_.agitator, "agitator");
    require(d_.bore, "bore", "an inside diameter, such as \"52.5 mm\"");
    require(d_.length, "length", "a length, such as \"96 m\"");
    refuse_volume();
    return kind == Kind::tube ? AnyVessel(make_tube()) : AnyVessel(make_packed_tube());
  }

  StirredTank make_tank() {
    require(d_.volume, "volume", "the brimful volume, such as \"6.3 m3\"");
    refuse(d_.bore, "bore"), refuse(d_.length, "length"), refuse(d_.tubes, "tubes"), refuse(d_.roughness, "roughness");
    refuse(d_.pressure_drop, "pressure_drop");
    refuse_table(d_.packing, "packing");
    StirredTank tank;
    tank.volume_m3 = d_.volume.value.value_or(1);
    if (d_.fill) tank.fill = *d_.fill;
    if (d_.fill && tank.fill.second <= 0)
      scope_.error(d_.fill.place, "fill", "found a most fill of 0", "expected it above zero");
    if (!d_.fill.written)
      builder_.assume("vessel." + scope_.subject + ".fill", "0 to 1", "left out: any fill, up to the brim");
    if (d_.agitator) check_agitator(*d_.agitator, tank);
    return tank;
  }

  void check_agitator(const AgitatorDraft& a, StirredTank& tank) {
    tank.agitator_W = a.power.value.value_or(0);
    if (!a.speed || !d_.volume) return;
    // common practice, no source: liquid as high as wide, agitator half as wide as the tank, tip seldom above 10 m/s
    constexpr double fast_m_s = 15;
    const double diameter_m = std::cbrt(4 * tank.volume_m3 / std::numbers::pi) / 2;
    const double tip_m_s = std::numbers::pi * diameter_m * *a.speed;
    if (tip_m_s <= fast_m_s) return;
    scope_.warning(a.speed.place, "agitator.speed",
                   "found a tip speed of " + show(tip_m_s, Shown::speed) + " at a diameter of " +
                       show(diameter_m, Shown::length) + ", half that of the tank",
                   "rpm meant?");
  }

  int tubes() const { return static_cast<int>(d_.tubes.value.value_or(1)); }

  Tube make_tube() {
    refuse_table(d_.packing, "packing");
    Tube tube{d_.bore.value.value_or(1), d_.length.value.value_or(1), tubes(), d_.roughness.value.value_or(0)};
    if (d_.bore && d_.roughness && tube.roughness_m >= tube.bore_m)
      scope_.error(d_.roughness.place, "roughness",
                   "found a roughness of " + show(tube.roughness_m, Shown::length) + ", not under the bore of " +
                       show(tube.bore_m, Shown::length),
                   "mm meant?");
    if (!d_.roughness.written)
      builder_.assume("vessel." + scope_.subject + ".roughness", "0 mm", "left out: a smooth wall");
    return tube;
  }

  PackedTube make_packed_tube() {
    refuse(d_.roughness, "roughness");
    if (!d_.packing.written)
      scope_.error(d_.place, "packing", "missing", "expected [vessel.packing] with particle, voidage and bulk_density");
    PackedTube tube{d_.bore.value.value_or(1), d_.length.value.value_or(1), tubes(), 1e-3, 0.4, 1000};
    if (!d_.packing) return tube;
    tube.particle_m = d_.packing->particle.value.value_or(tube.particle_m);
    tube.voidage = d_.packing->voidage.value.value_or(tube.voidage);
    tube.bulk_density_kg_m3 = d_.packing->bulk_density.value.value_or(tube.bulk_density_kg_m3);
    if (d_.bore && d_.packing->particle && tube.particle_m >= tube.bore_m)
      scope_.error(d_.packing->particle.place, "packing.particle",
                   "found particles of " + show(tube.particle_m, Shown::length) + ", not under the bore of " +
                       show(tube.bore_m, Shown::length),
                   "mm meant?");
    return tube;
  }

  Jacket make_jacket(const JacketDraft& j) {
    Jacket jacket;
    jacket.utilities = j.utilities.value.value_or(std::vector<std::string>{});
    jacket.area_m2 = j.area.value;
    jacket.U_W_m2_K = j.U.value.value_or(0);
    jacket.fouling_m2_K_W = j.fouling.value.value_or(0);
    jacket.passage = j.passage.value.value_or(Passage::uniform);
    check_utilities(j);
    warn_of_U(j);
    if (!d_.kind) return jacket;
    if (*d_.kind == Kind::stirred_tank) {
      if (!j.area.written)
        scope_.error(j.place, "jacket.area", "missing", "expected the wetted area, such as \"14.2 m2\"");
      if (j.passage.written)
        scope_.error(j.passage.place, "jacket.passage", "found a passage on a stirred-tank, whose jacket is mixed",
                     "expected it on tubes only");
    } else {
      refuse_area(j);
    }
    return jacket;
  }

  void check_utilities(const JacketDraft& j) {
    if (!j.utilities) return;
    if (j.utilities->empty())
      scope_.error(j.utilities.place, "jacket.utilities", "found an empty list", "expected one utility or more");
    for (const std::string& name : *j.utilities) {
      bool known = false;
      for (const std::string& u : utilities_) known = known || u == name;
      if (!known)
        scope_.error(j.utilities.place, "jacket.utilities", "no utility " + quoted(name), hint(name, utilities_));
    }
  }

  /// Usual for jackets: 50 to 1200 W/m2/K. Common practice, no source.
  void warn_of_U(const JacketDraft& j) {
    if (!j.U || *j.U == 0 || (*j.U >= 50 && *j.U <= 1200)) return;
    const bool kilo = *j.U * 1000 >= 50 && *j.U * 1000 <= 1200;
    scope_.warning(j.U.place, "jacket.U",
                   "found " + show(*j.U, Shown::heat_transfer) + ", outside 50 to 1200 W/m2/K, the usual for jackets",
                   kilo ? "kW/m2/K meant?" : "");
  }

  bool has_size() const { return d_.bore && d_.length; }
  double inside_area() const { return std::numbers::pi * *d_.bore * *d_.length * tubes(); }

  void refuse_area(const JacketDraft& j) {
    if (!j.area.written) return;
    const std::string its = has_size() ? " (" + show(inside_area(), Shown::area) + ")" : "";
    scope_.error(j.area.place, "jacket.area", "found an area on a " + kind_word(*d_.kind),
                 "expected none: it follows from bore and length" + its);
  }
  void refuse_volume() {
    if (!d_.volume.written) return;
    const std::string its = has_size() ? ": " + show(inside_area() * *d_.bore / 4, Shown::volume) : "";
    scope_.error(d_.volume.place, "volume", "found a volume on a " + kind_word(*d_.kind),
                 "expected none: it follows from bore, length and tubes" + its);
  }
  template <class T>
  void refuse(const Given<T>& given, const std::string& key) {
    if (given.written)
      scope_.error(given.place, key, "found " + key + " on a " + kind_word(*d_.kind), "expected it on " + home_of(key));
  }
  template <class T>
  void refuse_table(const Given<T>& given, const std::string& key) {
    refuse(given, key);
  }
  static std::string home_of(const std::string& key) {
    if (key == "fill" || key == "agitator") return "a stirred-tank only";
    if (key == "packing") return "a packed-tube only";
    return key == "roughness" ? "a tube only" : "a tube or packed-tube only";
  }
  template <class T>
  void require(const Given<T>& given, const std::string& key, const std::string& what) {
    if (!given.written) scope_.error(d_.place, key, "missing on a " + kind_word(*d_.kind), "expected " + what);
  }

  const VesselDraft& d_;
  const std::vector<std::string>& utilities_;
  const Builder& builder_;
  Scope scope_;
};

}  // namespace

Vessel build_vessel(const VesselDraft& draft, const std::vector<std::string>& utilities, const Builder& builder) {
  return VesselMaker(draft, utilities, builder).make();
}

}  // namespace vatwright
