#pragma once
#include <optional>
#include <string>
#include <string_view>
#include <utility>
#include <variant>
#include <vector>

#include "vatwright/thermal/utility.hpp"

namespace vatwright {

enum class Status { idle, in_service, mothballed };

/// A stirred tank, perfectly mixed.
struct StirredTank {
  static constexpr std::string_view kind = "stirred-tank";
  double volume_m3 = 0;                     ///< brimful
  std::pair<double, double> fill = {0, 1};  ///< least and most working fill, fraction of volume
  double agitator_W = 0;
};
/// Equal tubes side by side, plug flow.
struct Tube {
  static constexpr std::string_view kind = "tube";
  double bore_m = 0, length_m = 0;
  int tubes = 1;
  double roughness_m = 0;  ///< left out: smooth
};
/// Equal packed tubes side by side, plug flow through the voids.
struct PackedTube {
  static constexpr std::string_view kind = "packed-tube";
  double bore_m = 0, length_m = 0;
  int tubes = 1;
  double particle_m = 0, voidage = 0, bulk_density_kg_m3 = 0;
};
/// The one list of kinds.
using AnyVessel = std::variant<StirredTank, Tube, PackedTube>;

/// One standing piece of equipment: what every kind has, and the kind.
struct Vessel {
  std::string tag;
  Status status = Status::idle;
  AnyVessel kind;
  std::optional<std::pair<double, double>> pressure_Pa;    ///< design range, absolute
  std::optional<std::pair<double, double>> temperature_K;  ///< design range
  std::vector<std::string> wetted;                         ///< wetted materials; empty: silent
  std::optional<double> feed_line_m3_s;
  std::optional<double> pressure_drop_Pa;  ///< the most that may be spent here (tubes)
  std::optional<Jacket> jacket;
  std::string note, source;
};
std::string_view kind_of(const Vessel& vessel);

/// Volume that the coordinate of a vessel counts, m3: tank: working fluid volume (liquid: volume * fill; gas: all of
/// it); tube: its inside; packed tube: the bed.
double inner_volume(const AnyVessel& kind);
/// Fluid volume, m3: `fill` for a tank with liquid (gas: pass 1); the voids of a bed.
double fluid_volume(const AnyVessel& kind, double fill);
/// Heat transfer area of the jacket, m2: tank: area * fill/most fill, at most area; tubes: pi bore length tubes.
double jacket_area(const Vessel& vessel, double fill);

}  // namespace vatwright
