#include "vatwright/vessel/rate_line.hpp"

#include <algorithm>
#include <cmath>

#include "start_state.hpp"
#include "tube_balance.hpp"
#include "way.hpp"

namespace vatwright {

struct RateLine::Model {
  Setup setup;
  std::optional<RatePath> path = {};
  std::optional<Way> way = {};
  StartsAt starts_at = StartsAt::feed;
};

namespace {

/// Why the rate of this vessel is no function of the extent alone; empty: it is.
std::string what_else_counts(const Setup& setup) {
  if (setup.chemistry.kinetics.reactions() != 1) return "several reactions";
  if (setup.chemistry.kinetics.has_table()) return "a table of measured rates ends somewhere";
  if (setup.operation.thermal == Thermal::jacketed) return "a jacket moves the temperature";
  if (setup.T_moves() && setup.agitator_W != 0) return "an agitator warms the tank";
  if (setup.is_gas && setup.operation.pressure_Pa) return "a gas at a pressure of its own";
  if (!setup.is_tank && TubeBalance::pressure_acts(setup)) return "a gas that loses pressure";
  return {};
}

RateLine::StartsAt place_of_start(const Setup& setup, const RatePath& path, const Way& way) {
  const StartState start = start_state(setup);
  if (!start.on_extents) return RateLine::StartsAt::off_the_line;
  if (!setup.is_held && std::abs(path.temperature(start.xi) - start.temperature_K) > 1e-9 * start.temperature_K)
    return RateLine::StartsAt::off_the_line;
  if (way.distance(start.xi) <= 0) return RateLine::StartsAt::feed;
  return way.distance(start.xi) >= way.length() ? RateLine::StartsAt::end : RateLine::StartsAt::off_the_line;
}

}  // namespace

std::variant<RateLine, RateLine::NoLine, NoAnswer> RateLine::find(const Vessel& vessel, const Chemistry& chemistry,
                                                                  const Operation& operation, const Start& start,
                                                                  const Stream& arrives) {
  auto made = make_setup(vessel, chemistry, operation, start, arrives);
  if (const auto* why = std::get_if<NoAnswer>(&made)) return *why;
  auto model = std::make_unique<Model>(Model{std::get<Setup>(std::move(made))});
  if (std::string why = what_else_counts(model->setup); !why.empty()) return NoLine{std::move(why)};
  model->path.emplace(model->setup, Exchange{});
  RatePath& path = *model->path;
  if (!(path.rate(path.inlet(), 0) > 0)) return NoLine{"the reaction does not run forward in the feed"};
  model->way = Way::find(path, 1);
  if (!model->way || model->way->kind() == EndKind::confined) return NoLine{"the model ends on the way"};
  if (path.no_value() > 0) return NoLine{"a rate has no finite value where a species that slows it is absent"};
  if (model->setup.is_tank) model->starts_at = place_of_start(model->setup, path, *model->way);
  return RateLine(std::move(model));
}

RateLine::RateLine(std::unique_ptr<Model> model) : model_(std::move(model)) {}
RateLine::~RateLine() = default;
RateLine::RateLine(RateLine&&) noexcept = default;
RateLine& RateLine::operator=(RateLine&&) noexcept = default;

double RateLine::length() const { return model_->way->length(); }
bool RateLine::ends_depleted() const { return model_->way->kind() == EndKind::depleted; }
double RateLine::rate(double d, double s) { return model_->way->rate(d, s); }
double RateLine::rounding() const {
  if (ends_depleted()) return 0;
  return 4e-15 * std::max(1.0, model_->path->reach(1).distance / length());
}
double RateLine::volume_m3() const { return model_->setup.volume_m3; }
bool RateLine::is_tank() const { return model_->setup.is_tank; }
RateLine::StartsAt RateLine::starts_at() const { return model_->starts_at; }

}  // namespace vatwright
