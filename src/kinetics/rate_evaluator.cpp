#include <algorithm>
#include <cmath>
#include <limits>

#include "rate_part.hpp"
#include "vatwright/kinetics/kinetics.hpp"
#include "vatwright/kinetics/rate_table.hpp"

namespace vatwright {
namespace {

/// C to an order; the usual ones without the general function.
struct Power {
  enum class Kind { one, two, half, other };
  Power(int of, double n) : species(static_cast<std::size_t>(of)), order(n) {
    if (n == 1) kind = Kind::one;
    if (n == 2) kind = Kind::two;
    if (n == 0.5) kind = Kind::half;
  }
  double operator()(double C) const {
    switch (kind) {
      case Kind::one:
        return C;
      case Kind::two:
        return C * C;
      case Kind::half:
        return std::sqrt(C);
      case Kind::other:
        break;
    }
    return std::pow(C, order);
  }
  std::size_t species;
  double order;
  Kind kind = Kind::other;
};

/// One direction of a reaction, its text and its maps gone: factor and constants belong to the temperature set last.
class Direction {
 public:
  explicit Direction(RatePart part)
      : part_(std::move(part)), half_(part_.half), adsorption_(part_.adsorption), whole_(0, part_.adsorption_power) {
    powers_.reserve(part_.orders.size());
    for (const auto& [species, order] : part_.orders) {
      powers_.emplace_back(species, order);
      sum_of_orders_ += order;
    }
    part_.orders = {};
  }

  void set_temperature(double T_K) {
    factor_ = part_.k.at(T_K) / part_.divisor;
    if (part_.over) factor_ /= part_.over->at(T_K);
    if (part_.basis == Basis::concentration) return;
    const double RT = gas_constant * T_K;  // p_i = C_i R T, gathered into the constants
    factor_ *= std::pow(RT, sum_of_orders_ - static_cast<double>(half_.size()));
    for (std::size_t i = 0; i < half_.size(); ++i) half_[i].value = part_.half[i].value / RT;
    for (std::size_t i = 0; i < adsorption_.size(); ++i) adsorption_[i].value = part_.adsorption[i].value * RT;
  }

  double operator()(std::span<const double> C, long& no_value) const {
    for (int i : part_.needs)
      if (C[static_cast<std::size_t>(i)] <= 0) return 0;
    double rate = factor_;
    for (const Power& power : powers_) rate *= power(std::max(C[power.species], 0.0));
    for (const SpeciesFigure& h : half_) rate /= h.value + above_zero(C, h.species);
    if (!adsorption_.empty()) rate /= adsorbed(C);
    if (std::isfinite(rate)) return rate;
    ++no_value;
    return 0;
  }

 private:
  static double above_zero(std::span<const double> C, int i) {
    const double value = C[static_cast<std::size_t>(i)];
    return value < 0 ? 0 : value;
  }
  double adsorbed(std::span<const double> C) const {
    double sum = 1;
    for (const SpeciesFigure& K : adsorption_) sum += K.value * above_zero(C, K.species);
    return whole_(sum);
  }

  RatePart part_;
  std::vector<Power> powers_;
  std::vector<SpeciesFigure> half_, adsorption_;
  Power whole_;  // of the adsorption term
  double factor_ = 0, sum_of_orders_ = 0;
};

}  // namespace

struct RateEvaluator::Compiled {
  std::vector<Direction> directions;  // forward, then reverse where there is one
  std::optional<RateCurve> table;
  double of_coefficient = 1;  // of a table: |nu| of conversion_of
};

RateEvaluator::RateEvaluator(const Kinetics& kinetics) {
  if (kinetics.compiled_) {
    laws_ = kinetics.compiled_->laws_;
    return;
  }
  for (int j = 0; j < kinetics.reactions(); ++j) {
    Compiled law;
    for (RatePart& part : parts_of(kinetics, j)) law.directions.emplace_back(std::move(part));
    if (const auto* table = std::get_if<RateTable>(&kinetics.reaction(j).forward)) {
      law.table.emplace(*table);
      law.of_coefficient = std::abs(kinetics.nu(kinetics.of(), j));
    }
    laws_.push_back(std::move(law));
  }
}

RateEvaluator::~RateEvaluator() = default;
RateEvaluator::RateEvaluator(const RateEvaluator&) = default;
RateEvaluator& RateEvaluator::operator=(const RateEvaluator&) = default;
RateEvaluator::RateEvaluator(RateEvaluator&&) noexcept = default;
RateEvaluator& RateEvaluator::operator=(RateEvaluator&&) noexcept = default;

void RateEvaluator::set_temperature(double T_K) {
  T_K_ = T_K;
  for (Compiled& law : laws_)
    for (Direction& direction : law.directions) direction.set_temperature(T_K);
}

void RateEvaluator::operator()(std::span<const double> C, double T_K, double X, std::span<double> r) {
  ++calls_;
  if (T_K != T_K_) set_temperature(T_K);
  for (std::size_t j = 0; j < laws_.size(); ++j) {
    const Compiled& law = laws_[j];
    if (law.table) {
      r[j] = (*law.table)(X) / law.of_coefficient;
      continue;
    }
    r[j] = law.directions[0](C, no_value_);
    if (law.directions.size() == 2) r[j] -= law.directions[1](C, no_value_);
  }
}

}  // namespace vatwright
