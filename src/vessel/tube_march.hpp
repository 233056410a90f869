#pragma once
#include <optional>
#include <vector>

#include "tube_balance.hpp"
#include "vatwright/numeric/march.hpp"

namespace vatwright {

/// Marches the balances of a tube through every place where something runs out or comes back, and keeps what it
/// marched.
class TubeMarch {
 public:
  enum class Accuracy { full, rough };  ///< rough: to look around with, relative 1e-6
  /// medium_K: at the feed's end, where it moves.
  TubeMarch(TubeBalance balance, double medium_K, Accuracy accuracy = Accuracy::full)
      : balance_(std::move(balance)), start_(balance_.at_inlet(medium_K)), y_(start_), accuracy_(accuracy) {}
  /// The march ends where a medium that moves leaves this range, K.
  void keep_medium_within(double lowest_K, double highest_K) { medium_range_ = {lowest_K, highest_K}; }

  /// Goes on to s (from where it is). An error, the end of the pressure or of the medium's range ends it for good.
  void go_to(double s);
  void read(double s, std::span<double> y) const;
  /// Largest imbalance of an extent (or temperature) up to s over the largest sum of terms: step by step the change
  /// that is kept against the integral of the rates along the track. Where reactions are much faster than the step, a
  /// slip of the track shows many times over in them; it is told as the shift of the state that closes the balance, (I
  /// - h J) shift = slip.
  double residual(double s);

  /// The least time in which a component would change by its scale at the inlet's rates, 1 where nothing happens there.
  [[nodiscard]] double time_scale();
  [[nodiscard]] double reached() const { return s_; }
  /// What the march is at now.
  [[nodiscard]] const std::vector<double>& state() const { return y_; }
  [[nodiscard]] const std::optional<NoAnswer>& failed() const { return failed_; }
  [[nodiscard]] bool used_up() const { return used_up_; }
  /// +1: the medium grew hotter than its range, -1: colder, 0: neither.
  [[nodiscard]] int medium_left() const { return medium_left_; }
  [[nodiscard]] std::vector<double> nodes() const;
  TubeBalance& balance() { return balance_; }
  [[nodiscard]] const TubeBalance& balance() const { return balance_; }

 private:
  using Rates = std::vector<double>;
  /// A stretch in which the same species are exhausted.
  struct Stretch {
    Track track;
    std::vector<bool> exhausted;
  };

  /// The sum of slips up to the end of a step.
  struct Sum {
    double end;
    Rates total;
  };
  Rates slip_of(const Stretch& stretch, double a, double b);
  Rates slips(double s);
  Rates gauss(const Track& track, double a, double b);
  void add_integral(const Track& track, double a, double b, const Rates& whole, int depth, Rates& sum);
  void close_by_shift(const Rates& y, double h, Rates& slip);
  std::vector<bool> still_exhausted();
  void step_to(double s);
  void ended_by(std::size_t event, const std::vector<bool>& exhausted);

  TubeBalance balance_;
  std::vector<double> start_, y_;
  Accuracy accuracy_;
  std::optional<std::pair<double, double>> medium_range_;
  double s_ = 0, step_ = 0;  // how far it is, and its last step
  bool stiff_ = false;       // the last step was made by the stiff method
  std::vector<Stretch> stretches_;
  struct {
    std::size_t stretch = 0, step = 0;
  } checked_;  // the first step whose slip is not in sums_
  std::vector<Sum> sums_;
  std::optional<NoAnswer> failed_;
  bool used_up_ = false;
  int medium_left_ = 0;
};

}  // namespace vatwright
