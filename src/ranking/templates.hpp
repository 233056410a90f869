#pragma once
#include <map>
#include <vector>

#include "vatwright/hookup/expression.hpp"

namespace vatwright {

/// Hookups by the pattern of equals among their vessels (counts of each class), made once for all choices of vessels.
/// Leaves are places: equals beside each other, in the order of the pattern.
class Templates {
 public:
  const std::vector<Hookup>& of(const std::vector<int>& pattern);
  /// Those of them that are a beside at the top.
  const std::vector<Hookup>& besides(const std::vector<int>& pattern);
  /// Makes the besides of all patterns of up to so many vessels, so that threads may read them by known_besides.
  void make_besides_up_to(int vessels);
  [[nodiscard]] const std::vector<Hookup>& known_besides(const std::vector<int>& pattern) const {
    return besides_.at(pattern);
  }

 private:
  void make_besides(std::vector<int>& pattern, int left);
  std::map<std::vector<int>, std::vector<Hookup>> all_, besides_;
  int made_up_to_ = 0;
};

}  // namespace vatwright
