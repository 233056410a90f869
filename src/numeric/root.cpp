#include "vatwright/numeric/root.hpp"

#include <algorithm>
#include <boost/math/tools/minima.hpp>
#include <boost/math/tools/toms748_solve.hpp>
#include <cmath>
#include <cstdint>
#include <limits>
#include <optional>
#include <string>

#include "number_text.hpp"
#include "vatwright/error/expects.hpp"

namespace vatwright {
namespace {

struct NotFinite {
  double at;
};

NoAnswer unsolved(std::string why) { return {NoAnswer::Kind::unsolved, std::move(why)}; }

NoAnswer not_finite_at(double x) { return unsolved("the function has no value at " + number_text(x)); }

double checked(Function f, double x) {
  const double value = f(x);
  if (!std::isfinite(value)) throw NotFinite{x};  // toms748 would call it "no bracket"
  return value;
}

/// The middle of the last bracket, whose ends lie together (a jump through zero has no better place).
Outcome<double> search(Function f, double a, double b, double fa, double fb, const RootOptions& options) {
  const auto narrow = [&](double lo, double hi) {
    const double eps = std::numeric_limits<double>::epsilon();
    const double largest = std::max(std::abs(lo), std::abs(hi));
    return hi - lo <= std::max({options.abs_tol, options.rel_tol * largest, 2 * eps * largest, 1e-300});
  };
  const auto g = [&](double x) { return checked(f, x); };
  auto calls = static_cast<std::uintmax_t>(options.most_calls);
  const auto [lo, hi] = boost::math::tools::toms748_solve(g, a, b, fa, fb, narrow, calls);
  if (lo == hi || narrow(lo, hi)) return lo + (hi - lo) / 2;
  return unsolved("no root pinned down in " + std::to_string(options.most_calls) + " evaluations; it lies between " +
                  number_text(lo) + " and " + number_text(hi));
}

}  // namespace

Outcome<double> find_root(Function f, double a, double b, const RootOptions& options) {
  if (!(std::isfinite(a) && std::isfinite(b) && a <= b)) return unsolved("the range of a root is empty or not finite");
  try {
    const double fa = checked(f, a), fb = checked(f, b);
    if (fa == 0) return a;
    if (fb == 0) return b;
    if ((fa > 0) == (fb > 0)) return unsolved("no change of sign between " + number_text(a) + " and " + number_text(b));
    return search(f, a, b, fa, fb, options);
  } catch (const NotFinite& at) {
    return not_finite_at(at.at);
  }
}

namespace {

/// Sampled values of f, and the roots that they show.
class RootHunt {
 public:
  RootHunt(Function f, const std::vector<double>& at, double touch, const RootOptions& options)
      : f_(f), at_(at), touch_(touch), options_(options) {}

  Outcome<std::vector<double>> run() {
    for (double x : at_) values_.push_back(checked(f_, x));
    for (std::size_t i = 0; i < at_.size(); ++i) {
      if (values_[i] == 0) roots_.push_back(at_[i]);
      if (i + 1 < at_.size() && values_[i] * signum(values_[i + 1]) < 0) add_between(i, i + 1);
      if (near_miss(i)) refine(i - 1, i + 1);
    }
    const std::size_t last = at_.size() - 2;  // interval
    // no third sample beyond an end shows a dip there; the neighbour's hunt may have covered it
    if (dips_within(0) && !near_miss(1)) refine(0, 1);
    if (last > 0 && dips_within(last) && !near_miss(last)) refine(last, last + 1);
    if (failed_) return *failed_;
    std::ranges::sort(roots_);
    return roots_;
  }

 private:
  static double signum(double v) { return v > 0 ? 1 : v < 0 ? -1 : 0; }

  void add_root(double a, double b, double fa, double fb) {
    auto root = search(f_, a, b, fa, fb, options_);
    if (const double* found = answer(root))
      roots_.push_back(*found);
    else
      failed_ = std::get<NoAnswer>(root);
  }
  void add_between(std::size_t i, std::size_t j) { add_root(at_[i], at_[j], values_[i], values_[j]); }

  bool near_miss(std::size_t i) const {
    if (i == 0 || i + 1 >= at_.size()) return false;
    const double sign = signum(values_[i]);
    if (sign == 0 || signum(values_[i - 1]) != sign || signum(values_[i + 1]) != sign) return false;
    const double middle = std::abs(values_[i]), left = std::abs(values_[i - 1]), right = std::abs(values_[i + 1]);
    return middle < left && middle <= right;  // two equal ones: hunted once
  }

  /// |f| falls into the interval after sample i from both of its ends, which are of one sign.
  bool dips_within(std::size_t i) const {
    const double sign = signum(values_[i]);
    if (sign == 0 || signum(values_[i + 1]) != sign) return false;
    const double aside = 1e-4 * (at_[i + 1] - at_[i]);
    return sign * checked(f_, at_[i] + aside) < std::abs(values_[i]) &&
           sign * checked(f_, at_[i + 1] - aside) < std::abs(values_[i + 1]);
  }

  /// The extremum nearest to zero between two samples: two roots where it lies beyond zero, one where it touches.
  void refine(std::size_t i, std::size_t j) {
    const double sign = signum(values_[i]);
    const double a = at_[i], b = at_[j];
    const Peak nearest = find_peak([&](double x) { return -sign * checked(f_, x); }, a, b, 1e-8);
    const double value = -sign * nearest.value;
    if (value * sign < -touch_) {
      add_root(a, nearest.at, values_[i], value);
      add_root(nearest.at, b, value, values_[j]);
    } else if (value * sign <= touch_) {
      roots_.push_back(nearest.at);
    }
  }

  Function f_;
  const std::vector<double>& at_;
  double touch_;
  const RootOptions& options_;
  std::vector<double> values_, roots_;
  std::optional<NoAnswer> failed_;
};

}  // namespace

Outcome<std::vector<double>> find_all_roots(Function f, const std::vector<double>& at, double touch,
                                            const RootOptions& options) {
  VATWRIGHT_EXPECTS(at.size() >= 2 && touch >= 0);
  try {
    return RootHunt(f, at, touch, options).run();
  } catch (const NotFinite& nowhere) {
    return not_finite_at(nowhere.at);
  }
}

Peak find_peak(Function f, double a, double b, double rel_tol) {
  const int bits = std::clamp(static_cast<int>(std::ceil(-std::log2(rel_tol))), 4, 26);  // no more is in f near a peak
  const auto height = [&](double x) {
    const double value = f(x);
    return std::isnan(value) ? -1e300 : value;
  };
  std::uintmax_t most_calls = 200;
  const auto [at, least] =
      boost::math::tools::brent_find_minima([&](double x) { return -height(x); }, a, b, bits, most_calls);
  Peak best{at, -least};
  for (double end : {a, b})
    if (const double value = height(end); value > best.value) best = {end, value};
  return best;
}

}  // namespace vatwright
