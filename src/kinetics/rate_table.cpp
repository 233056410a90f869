#include "vatwright/kinetics/rate_table.hpp"

#include <algorithm>

#include "vatwright/error/expects.hpp"

namespace vatwright {
namespace {

std::vector<double> reciprocals(const std::vector<double>& rates) {
  VATWRIGHT_EXPECTS(std::ranges::all_of(rates, [](double r) { return r > 0; }));
  std::vector<double> all;
  for (double r : rates) all.push_back(1 / r);
  return all;
}

}  // namespace

RateCurve::RateCurve(const RateTable& table) : reciprocal_(table.conversion, reciprocals(table.consumption_mol_m3_s)) {}

}  // namespace vatwright
