#include "vatwright/vessel/vessel.hpp"

#include <algorithm>
#include <numbers>

namespace vatwright {
namespace {

template <class T>
double volume_of_tubes(const T& t) {
  return std::numbers::pi / 4 * t.bore_m * t.bore_m * t.length_m * t.tubes;
}

}  // namespace

std::string_view kind_of(const Vessel& vessel) {
  return std::visit([](const auto& kind) { return kind.kind; }, vessel.kind);
}

double inner_volume(const StirredTank& tank) { return tank.volume_m3; }
double inner_volume(const Tube& tube) { return volume_of_tubes(tube); }
double inner_volume(const PackedTube& tube) { return volume_of_tubes(tube); }
double inner_volume(const AnyVessel& kind) {
  return std::visit([](const auto& one) { return inner_volume(one); }, kind);
}

double fluid_volume(const StirredTank& tank, double fill) { return tank.volume_m3 * fill; }
double fluid_volume(const Tube& tube, double) { return inner_volume(tube); }
double fluid_volume(const PackedTube& tube, double) { return inner_volume(tube) * tube.voidage; }
double fluid_volume(const AnyVessel& kind, double fill) {
  return std::visit([fill](const auto& one) { return fluid_volume(one, fill); }, kind);
}

double jacket_area(const StirredTank& tank, const Jacket& jacket, double fill) {
  const double most = tank.fill.second;
  return jacket.area_m2.value_or(0) * (most > 0 ? std::min(1.0, fill / most) : 1);
}
template <class T>
double area_of_tubes(const T& t) {
  return std::numbers::pi * t.bore_m * t.length_m * t.tubes;
}
double jacket_area(const Tube& tube, const Jacket&, double) { return area_of_tubes(tube); }
double jacket_area(const PackedTube& tube, const Jacket&, double) { return area_of_tubes(tube); }
double jacket_area(const Vessel& vessel, double fill) {
  if (!vessel.jacket) return 0;
  return std::visit([&](const auto& one) { return jacket_area(one, *vessel.jacket, fill); }, vessel.kind);
}

}  // namespace vatwright
