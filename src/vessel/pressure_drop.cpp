#include "vatwright/vessel/pressure_drop.hpp"

#include <cmath>
#include <numbers>

namespace vatwright {
namespace {

double cross_section(double bore_m, int tubes) { return std::numbers::pi / 4 * bore_m * bore_m * tubes; }

struct LengthOf {
  double operator()(const StirredTank&) const { return 0; }
  double operator()(const Tube& tube) const { return tube.length_m; }
  double operator()(const PackedTube& tube) const { return tube.length_m; }
};

}  // namespace

double friction_factor(double Re, double rough) {
  if (Re < 100) return 64 / Re;  // the other terms are below 1e-16 of it, and would overflow
  const double A = std::pow(-2.457 * std::log(std::pow(7 / Re, 0.9) + 0.27 * rough), 16);
  const double B = std::pow(37530 / Re, 16);
  return 8 * std::pow(std::pow(8 / Re, 12) + std::pow(A + B, -1.5), 1.0 / 12);
}

double ergun_gradient(double u, double rho, double mu, double dp, double e) {
  const double e3 = e * e * e;
  return 150 * mu * (1 - e) * (1 - e) / (e3 * dp * dp) * u + 1.75 * (1 - e) / (e3 * dp) * rho * u * u;
}

double pressure_gradient(const StirredTank&, const Flow&) { return 0; }

double pressure_gradient(const Tube& tube, const Flow& flow) {
  const double G = flow.mass_kg_s / cross_section(tube.bore_m, tube.tubes);
  const double Re = G * tube.bore_m / flow.viscosity_Pa_s;
  if (!(Re > 0)) return 0;
  return friction_factor(Re, tube.roughness_m / tube.bore_m) * G * G / (2 * flow.density_kg_m3 * tube.bore_m);
}

double pressure_gradient(const PackedTube& tube, const Flow& flow) {
  const double u = flow.mass_kg_s / cross_section(tube.bore_m, tube.tubes) / flow.density_kg_m3;
  return ergun_gradient(u, flow.density_kg_m3, flow.viscosity_Pa_s, tube.particle_m, tube.voidage);
}

double pressure_gradient(const AnyVessel& kind, const Flow& flow) {
  return std::visit([&](const auto& one) { return pressure_gradient(one, flow); }, kind);
}

double length_of(const AnyVessel& kind) { return std::visit(LengthOf{}, kind); }

}  // namespace vatwright
