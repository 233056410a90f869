#include "start_up.hpp"

#include <algorithm>
#include <cmath>
#include <numeric>

#include "broken_order.hpp"
#include "vatwright/numeric/march.hpp"
#include "vatwright/numeric/matrix.hpp"

namespace vatwright {
namespace {

std::vector<double> extents_of_product(const Chemistry& chemistry) {
  const Kinetics& kinetics = chemistry.kinetics;
  std::vector<double> xi(static_cast<std::size_t>(kinetics.reactions()));
  for (int j = 0; j < kinetics.reactions(); ++j) {
    if (!(kinetics.nu(kinetics.of(), j) < 0)) continue;
    double most = std::numeric_limits<double>::infinity();
    for (int i = 0; i < kinetics.species(); ++i)
      if (const double nu = kinetics.nu(i, j); nu < 0)
        most = std::min(most, chemistry.feed.c_mol_m3[static_cast<std::size_t>(i)] / -nu);
    xi[static_cast<std::size_t>(j)] = most;
    break;
  }
  return xi;
}

/// The transient balances of a tank in space times, theta = t v/V, per m3 of its working fluid:
///   dC_i/dtheta = c_in,i - w C_i + tau sum_j nu_ij m_j r_j
///   (sum C_i cp_i) dT/dtheta = -sensible(feed, T_in to T) + tau sum_j m_j r_j (-dH_j) + agitator/v
/// w: what leaves over what is fed, by volume: 1 for a liquid; a gas stays at its pressure, sum C_i = P/(R T).
class Transient {
 public:
  Transient(const Setup& setup, double feed_m3_s)
      : setup_(setup), evaluator_(setup.chemistry.kinetics), broken_(broken_orders(setup.chemistry.kinetics)) {
    tau_ = setup.volume_m3 / feed_m3_s;
    agitator_ = setup.agitator_W / feed_m3_s;
    n_ = static_cast<std::size_t>(setup.chemistry.kinetics.species());
    c_in_.resize(n_);
    C_.resize(n_);
    r_.resize(setup.capacity.size());
    setup.chemistry.kinetics.amounts(setup.chemistry.feed.c_mol_m3, setup.arrives.xi_mol_m3, c_in_);
    for (double& c : c_in_) c = std::max(c, 0.0);  // rounding of what is gone
    total_in_ = std::accumulate(c_in_.begin(), c_in_.end(), 0.0);
    moves_ = !setup.is_held && setup.heat_known();
  }
  [[nodiscard]] std::size_t size() const { return n_ + (moves_ ? 1 : 0); }
  [[nodiscard]] bool moves() const { return moves_; }
  [[nodiscard]] double scale() const { return total_in_ > 0 ? total_in_ : 1; }

  void operator()(std::span<const double> y, std::span<double> dy) {
    const double T = moves_ ? y[n_] : setup_.inlet_K;
    if (!(T > 1)) {  // a trial step gone astray: no value there
      std::ranges::fill(dy, std::numeric_limits<double>::quiet_NaN());
      return;
    }
    rates(y, T);
    double made = 0;
    for (std::size_t i = 0; i < n_; ++i) {
      dy[i] = c_in_[i];
      for (std::size_t j = 0; j < r_.size(); ++j)
        dy[i] += tau_ * setup_.chemistry.kinetics.nu(static_cast<int>(i), static_cast<int>(j)) * r_[j];
      made += dy[i];
    }
    const double dT = moves_ ? warming(y, T) : 0;
    double leaves = 1;
    if (setup_.is_gas) {
      const double held = setup_.inlet_Pa / (gas_constant * T);  // sum C_i
      leaves = (made + held / T * dT) / held;
    }
    for (std::size_t i = 0; i < n_; ++i) dy[i] -= leaves * y[i];
    if (moves_) dy[n_] = dT;
  }

  /// By differences in proportion to each amount, so that what is nearly gone is felt at its own size.
  void jacobian(std::span<const double> y, std::span<double> J) {
    const std::size_t m = size();
    std::vector<double> moved(y.begin(), y.end()), dy(m), dy_moved(m);
    (*this)(y, dy);
    for (std::size_t k = 0; k < m; ++k) {
      const double h = k < n_ ? std::max(1e-7 * std::abs(y[k]), 1e-3 * fade * scale()) : 1e-6 * y[k];
      moved[k] = y[k] + h;
      (*this)(moved, dy_moved);
      for (std::size_t i = 0; i < m; ++i) J[i * m + k] = (dy_moved[i] - dy[i]) / h;
      moved[k] = y[k];
    }
  }

 private:
  void rates(std::span<const double> y, double T) {
    for (std::size_t i = 0; i < n_; ++i) C_[i] = y[i];
    const double X = 0;  // tables never come here: they are held and start on the line of their extents
    evaluator_(C_, T, X, r_);
    for (std::size_t j = 0; j < r_.size(); ++j) r_[j] *= setup_.capacity[j];
    // A reactant of an order below 1 that runs out: its rate fades over the last millionth, so that the march can go
    // on.
    for (const BrokenOrder& b : broken_) {
      const double c = std::max(0.0, C_[b.species]), last = fade * scale();
      const double nu = setup_.chemistry.kinetics.nu(static_cast<int>(b.species), static_cast<int>(b.reaction));
      if (nu * r_[b.reaction] < 0) r_[b.reaction] *= c / (c + last);
    }
  }

  double warming(std::span<const double> y, double T) const {
    const Chemistry& chemistry = setup_.chemistry;
    double heat = agitator_ - sensible_heat(chemistry, setup_.arrives.xi_mol_m3, setup_.arrives.temperature_K, T);
    for (std::size_t j = 0; j < r_.size(); ++j)
      heat -= tau_ * r_[j] * chemistry.kinetics.reaction(static_cast<int>(j)).heat->at(T);
    return heat / capacity(y, T);
  }

  /// Of the contents, J/K per m3; a gas with one heat capacity for the mixture: in proportion to its moles.
  double capacity(std::span<const double> y, double T) const {
    const Feed& feed = setup_.chemistry.feed;
    if (feed.heat_capacity_J_kg_K) {
      const double of_feed = heat_capacity(setup_.chemistry, setup_.arrives.xi_mol_m3, T);
      return setup_.is_gas ? of_feed * setup_.inlet_Pa / (gas_constant * T) / total_in_ : of_feed;
    }
    double sum = 0;
    for (std::size_t i = 0; i < n_; ++i)
      if (const auto& cp = feed.species[i].heat_capacity) sum += std::max(0.0, y[i]) * cp->at(T);
    return sum;
  }

  static constexpr double fade = 1e-6;
  const Setup& setup_;
  RateEvaluator evaluator_;
  std::vector<BrokenOrder> broken_;
  double tau_ = 0, agitator_ = 0, total_in_ = 0;
  std::size_t n_ = 0;
  std::vector<double> c_in_, C_, r_;
  bool moves_ = false;
};

/// Extents (and for a gas also how many m3 of mixed feed fill 1 m3) by least squares; empty where the reactions are not
/// independent.
std::vector<double> extents_of(const Setup& setup, std::span<const double> C) {
  const Kinetics& kinetics = setup.chemistry.kinetics;
  const auto R = static_cast<std::size_t>(kinetics.reactions());
  const std::size_t m = R + (setup.is_gas ? 1 : 0);
  std::vector<double> A(m * m), b(m), row(m);
  for (std::size_t i = 0; i < C.size(); ++i) {  // e C_i - nu xi = c_feed,i, e = 1 for a liquid
    for (std::size_t j = 0; j < R; ++j) row[j] = -kinetics.nu(static_cast<int>(i), static_cast<int>(j));
    if (setup.is_gas) row[R] = C[i];
    const double right = setup.chemistry.feed.c_mol_m3[i] - (setup.is_gas ? 0 : C[i]);
    for (std::size_t j = 0; j < m; ++j) {
      for (std::size_t k = 0; k < m; ++k) A[j * m + k] += row[j] * row[k];
      b[j] += row[j] * right;
    }
  }
  if (kinetics.independent() < kinetics.reactions() || !solve_linear(A, b)) return {};
  b.resize(R);
  return b;
}

}  // namespace

StartState start_state(const Setup& setup) {
  const Chemistry& chemistry = setup.chemistry;
  const Kinetics& kinetics = chemistry.kinetics;
  StartState start;
  start.temperature_K =
      setup.is_held ? setup.inlet_K : setup.start.temperature_K.value_or(chemistry.feed.temperature_K);
  start.C.resize(static_cast<std::size_t>(kinetics.species()));
  start.xi_all.assign(static_cast<std::size_t>(kinetics.reactions()), 0.0);
  if (setup.start.filled_with == Start::Filled::product) start.xi_all = extents_of_product(chemistry);
  start.xi = start.xi_all[0];
  kinetics.amounts(chemistry.feed.c_mol_m3, start.xi_all, start.C);
  for (double& c : start.C) c = std::max(c, 0.0);
  if (setup.start.filled_with == Start::Filled::solvent) {
    start.on_extents = false;
    for (int i = 0; i < kinetics.species(); ++i)
      for (int j = 0; j < kinetics.reactions(); ++j)
        if (kinetics.nu(i, j) < 0) start.C[static_cast<std::size_t>(i)] = 0;
  }
  chemistry.concentrations_of_amounts(start.C, start.temperature_K, setup.inlet_Pa, start.C);
  return start;
}

Outcome<StartRun> run_start_up(const Setup& setup, const StartState& start, double feed_m3_s, double space_times) {
  if (setup.is_gas && std::accumulate(start.C.begin(), start.C.end(), 0.0) <= 0)
    return cannot_tell("a gas without its reactants leaves nothing to fill the tank with at the start");
  Transient transient(setup, feed_m3_s);
  const std::size_t n = start.C.size();
  std::vector<double> y = start.C, scale(n, transient.scale());
  if (transient.moves()) {
    y.push_back(start.temperature_K);
    scale.push_back(300);
  }
  const auto f = [&](double, std::span<const double> at, std::span<double> dy) { transient(at, dy); };
  const auto by_amounts = [&](double, std::span<const double> at, std::span<double> J) { transient.jacobian(at, J); };
  const Jacobian jacobian(by_amounts);
  const MarchOptions options{.rel_tol = 1e-8, .abs_tol = 1e-11, .scale = scale, .most_calls = 400'000};
  const auto track = march(f, y, 0, space_times, options, {}, &jacobian);
  if (const auto* no = std::get_if<NoAnswer>(&track)) return unsolved("the start-up could not be followed: " + no->why);
  const Track& path = std::get<Track>(track);
  StartRun run;
  run.peak_K = start.temperature_K;
  std::vector<double> there(y.size());
  if (transient.moves())
    for (std::size_t k = 0; k + 1 < path.nodes().size(); ++k)
      for (double part : {0.25, 0.5, 0.75, 1.0}) {
        path.read(path.nodes()[k] + part * (path.nodes()[k + 1] - path.nodes()[k]), there);
        run.peak_K = std::max(run.peak_K, there[n]);
      }
  path.read(path.end(), there);
  std::vector<double> dy(y.size());
  transient(there, dy);
  for (std::size_t i = 0; i < dy.size(); ++i) run.drift = std::max(run.drift, std::abs(dy[i]) / scale[i]);
  run.temperature_K = transient.moves() ? there[n] : setup.inlet_K;
  run.C.assign(there.begin(), there.begin() + static_cast<std::ptrdiff_t>(n));
  run.xi = extents_of(setup, run.C);
  return run;
}

}  // namespace vatwright
