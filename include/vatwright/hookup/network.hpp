#pragma once
#include <memory>
#include <optional>
#include <vector>

#include "vatwright/hookup/expression.hpp"
#include "vatwright/rating/rating.hpp"

namespace vatwright {

/// What happens in one vessel of a hookup.
struct VesselPass {
  double feed_m3_s = 0;  ///< of the mixed feed, through this vessel
  double arrives_K = 0;
  std::optional<double> arrives_Pa;  ///< absent: a first vessel
  Outcome<VesselOutcome> outcome = NoAnswer{};
};
struct NetworkOutcome {
  std::vector<VesselPass> vessels;  ///< in the order of the text
  Outcome<Stream> outlet = NoAnswer{};
};

/// A hookup ready to be evaluated at any feed rate and shares. Keeps the work of every vessel whose inlet did not
/// change since the last call (first vessels always; behind them all at one feed rate and one set of shares before
/// them). The problem outlives it. One per thread.
class Network {
 public:
  Network(const Problem& problem, const Hookup& hookup);
  ~Network();
  Network(Network&&) noexcept;
  Network& operator=(Network&&) noexcept;

  /// shares: of every beside's members in the order of the text, each > 0, adding to 1. Where a vessel gives no answer,
  /// nothing behind it has one (NoAnswer::cannot_tell there); vessels beside it are still rated. outlet: that of the
  /// whole, or the first reason why there is none.
  [[nodiscard]] NetworkOutcome at(double feed_m3_s, const std::vector<double>& shares, Detail detail);
  /// The outlet of the whole alone, at the least cost.
  [[nodiscard]] Outcome<Stream> outlet(double feed_m3_s, const std::vector<double>& shares);

  [[nodiscard]] const Hookup& hookup() const;
  /// In the order of the text.
  [[nodiscard]] const std::vector<int>& vessels() const;
  [[nodiscard]] const Operation& operation(std::size_t place) const;
  /// Fluid volume of every vessel, in the order of the text, m3.
  [[nodiscard]] const std::vector<double>& volumes() const;

 private:
  struct Walk;
  struct Model;
  std::unique_ptr<Model> model_;
};

/// The feed rates searched for windows of this hookup: from its whole fluid volume.
std::pair<double, double> search_range(const Network& network);

}  // namespace vatwright
