#pragma once

namespace vatwright {

/// Exponents of kg, m, s, mol and K. They may be broken: rate constants of broken order need that.
struct Dimension {
  double mass = 0, length = 0, time = 0, amount = 0, temperature = 0;

  friend constexpr Dimension operator*(Dimension a, Dimension b) {
    return {a.mass + b.mass, a.length + b.length, a.time + b.time, a.amount + b.amount, a.temperature + b.temperature};
  }
  friend constexpr Dimension operator/(Dimension a, Dimension b) {
    return {a.mass - b.mass, a.length - b.length, a.time - b.time, a.amount - b.amount, a.temperature - b.temperature};
  }
  /// Equal within 1e-9 in every exponent.
  friend constexpr bool operator==(Dimension a, Dimension b) {
    constexpr auto near = [](double x, double y) { return x - y < 1e-9 && y - x < 1e-9; };
    return near(a.mass, b.mass) && near(a.length, b.length) && near(a.time, b.time) && near(a.amount, b.amount) &&
           near(a.temperature, b.temperature);
  }
};
constexpr Dimension pow(Dimension d, double n) {
  return {d.mass * n, d.length * n, d.time * n, d.amount * n, d.temperature * n};
}

namespace dim {
inline constexpr Dimension none{};
inline constexpr Dimension length{.length = 1};
inline constexpr Dimension area{.length = 2};
inline constexpr Dimension volume{.length = 3};
inline constexpr Dimension mass{.mass = 1};
inline constexpr Dimension amount{.amount = 1};
inline constexpr Dimension time{.time = 1};
inline constexpr Dimension temperature{.temperature = 1};
inline constexpr Dimension pressure{.mass = 1, .length = -1, .time = -2};
inline constexpr Dimension energy{.mass = 1, .length = 2, .time = -2};
inline constexpr Dimension power = energy / time;
inline constexpr Dimension density = mass / volume;
inline constexpr Dimension viscosity = pressure * time;
inline constexpr Dimension volume_flow = volume / time;
inline constexpr Dimension mass_flow = mass / time;
inline constexpr Dimension molar_flow = amount / time;
inline constexpr Dimension concentration = amount / volume;
inline constexpr Dimension molar_mass = mass / amount;
inline constexpr Dimension molar_energy = energy / amount;
inline constexpr Dimension heat_capacity = energy / mass / temperature;
inline constexpr Dimension molar_heat_capacity = molar_energy / temperature;
inline constexpr Dimension heat_transfer = power / area / temperature;
inline constexpr Dimension fouling = area * temperature / power;
inline constexpr Dimension frequency = none / time;
}  // namespace dim

}  // namespace vatwright
