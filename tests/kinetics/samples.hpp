#pragma once
#include <map>
#include <string>
#include <utility>
#include <vector>

#include "vatwright/kinetics/kinetics.hpp"

namespace vatwright::samples {

using Figures = std::vector<std::pair<int, double>>;

inline std::vector<SpeciesFigure> figures(const Figures& pairs) {
  std::vector<SpeciesFigure> all;
  for (const auto& [species, value] : pairs) all.push_back({species, value});
  return all;
}

inline RateConstant constant(double k) {
  RateConstant rate;
  rate.k = k;
  return rate;
}

inline RateConstant arrhenius(double k, double at_K, double activation_J_mol) {
  RateConstant rate;
  rate.k = k;
  rate.at_K = at_K;
  rate.moves = RateConstant::Moves::arrhenius;
  rate.activation_J_mol = activation_J_mol;
  return rate;
}

inline RateLaw power_law(const RateConstant& k, const Figures& orders) {
  RateLaw law;
  law.law = PowerLaw{k, figures(orders)};
  return law;
}

inline RateLaw saturating(const RateConstant& most, const Figures& half) {
  RateLaw law;
  law.law = Saturating{most, figures(half)};
  return law;
}

inline Reaction reaction(const Figures& nu, const RateLaw& law) {
  Reaction one;
  one.nu = figures(nu);
  one.forward = law;
  return one;
}

/// k times the product of the reactants to the power of their coefficients.
inline Reaction elementary(const Figures& nu, double k) {
  Figures orders;
  for (const auto& [species, value] : nu)
    if (value < 0) orders.emplace_back(species, -value);
  return reaction(nu, power_law(constant(k), orders));
}

inline std::vector<double> rates(const Kinetics& kinetics, const std::vector<double>& C, double T_K = 300,
                                 double X = 0) {
  std::vector<double> r(static_cast<std::size_t>(kinetics.reactions()));
  RateEvaluator evaluate(kinetics);
  evaluate(C, T_K, X, r);
  return r;
}

inline double rate(const Reaction& one, const std::vector<double>& C, double T_K = 300) {
  return rates(Kinetics({one}, static_cast<int>(C.size()), 0, 1.0), C, T_K)[0];
}

}  // namespace vatwright::samples
