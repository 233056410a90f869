#include "same_vessel.hpp"

namespace vatwright {
namespace {

bool same(const StirredTank& a, const StirredTank& b) {
  return a.volume_m3 == b.volume_m3 && a.fill == b.fill && a.agitator_W == b.agitator_W;
}
bool same(const Tube& a, const Tube& b) {
  return a.bore_m == b.bore_m && a.length_m == b.length_m && a.tubes == b.tubes && a.roughness_m == b.roughness_m;
}
bool same(const PackedTube& a, const PackedTube& b) {
  return a.bore_m == b.bore_m && a.length_m == b.length_m && a.tubes == b.tubes && a.particle_m == b.particle_m &&
         a.voidage == b.voidage && a.bulk_density_kg_m3 == b.bulk_density_kg_m3;
}
template <class A, class B>
bool same(const A&, const B&) {
  return false;
}

bool same(const Jacket& a, const Jacket& b) {
  return a.utilities == b.utilities && a.area_m2 == b.area_m2 && a.U_W_m2_K == b.U_W_m2_K &&
         a.fouling_m2_K_W == b.fouling_m2_K_W && a.passage == b.passage;
}

bool same(const Operation& a, const Operation& b) {
  return a.thermal == b.thermal && a.hold_K == b.hold_K && a.pressure_Pa == b.pressure_Pa && a.fill == b.fill &&
         a.catalyst_kg_m3 == b.catalyst_kg_m3 && a.utility == b.utility;
}

bool same_walls(const Vessel& a, const Vessel& b) {
  return a.status == b.status && a.pressure_Pa == b.pressure_Pa && a.temperature_K == b.temperature_K &&
         a.wetted == b.wetted && a.feed_line_m3_s == b.feed_line_m3_s && a.pressure_drop_Pa == b.pressure_drop_Pa;
}

}  // namespace

bool same_but_name(const Duty& duty, const Vessel& a, const Vessel& b) {
  const bool same_kind = std::visit([](const auto& x, const auto& y) { return same(x, y); }, a.kind, b.kind);
  if (!same_kind || !same_walls(a, b) || a.jacket.has_value() != b.jacket.has_value()) return false;
  if (a.jacket && !same(*a.jacket, *b.jacket)) return false;
  return same(operation_of(duty, a), operation_of(duty, b));
}

}  // namespace vatwright
