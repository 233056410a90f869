#pragma once
#include "vatwright/vessel/vessel.hpp"

namespace vatwright {

/// Darcy friction factor of a pipe in every flow regime, by one formula:
///   f = 8 [(8/Re)^12 + (A + B)^-1.5]^(1/12),  A = [2.457 ln(1/((7/Re)^0.9 + 0.27 rough))]^16,  B = (37530/Re)^16
/// Re > 0, any; rough = roughness/bore, 0 .. 0.05. Laminar flow gives 64/Re; against Colebrook's equation within 3.5 %
/// for Re 4e3 .. 1e8. S. W. Churchill, Friction-factor equation spans all fluid-flow regimes, Chem. Eng. 84 (24), 1977,
/// 91-92.
double friction_factor(double Re, double rough);

/// Loss of pressure per length in a packed bed, Pa/m:
///   -dP/dz = 150 mu (1 - e)^2/(e^3 dp^2) u + 1.75 (1 - e)/(e^3 dp) rho u^2
/// u: superficial velocity, m/s, >= 0; e: voidage, 0 .. 1; dp: equivalent diameter of a particle, m.
/// S. Ergun, Fluid flow through packed columns, Chem. Eng. Progr. 48 (2), 1952, 89-94.
double ergun_gradient(double velocity_m_s, double density_kg_m3, double viscosity_Pa_s, double particle_m,
                      double voidage);

/// What flows through a vessel, all its tubes together.
struct Flow {
  double mass_kg_s = 0, density_kg_m3 = 0, viscosity_Pa_s = 0;
};
/// Loss of pressure per length, Pa/m, >= 0: Darcy's equation f rho u^2/(2 bore) in a tube, Ergun's in a packed one;
/// none in a tank. Acceleration and height are neglected. Entrances and bends do not count.
double pressure_gradient(const StirredTank& tank, const Flow& flow);
double pressure_gradient(const Tube& tube, const Flow& flow);
double pressure_gradient(const PackedTube& tube, const Flow& flow);
double pressure_gradient(const AnyVessel& kind, const Flow& flow);

/// Length that the fluid travels, m; 0 for a tank.
double length_of(const AnyVessel& kind);

}  // namespace vatwright
