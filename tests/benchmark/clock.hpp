#pragma once
#include <algorithm>
#include <chrono>
#include <cstdio>
#include <functional>
#include <string>
#include <vector>

namespace bench {

/// One way of doing a case: what it is called, how to do it once, and how many rate evaluations that took (-1: not
/// counted).
struct Way {
  std::string name;
  std::function<void()> once;
  std::function<long()> calls = [] { return -1L; };
};

/// Median seconds per repetition of each way, taken in turn (A B A B ..) so that a drifting machine drifts for all.
inline std::vector<double> time_in_turn(const std::vector<Way>& ways, int rounds = 9, double least_s = 0.01) {
  using clock = std::chrono::steady_clock;
  std::vector<std::vector<double>> seconds(ways.size());
  for (int round = 0; round < rounds; ++round)
    for (std::size_t w = 0; w < ways.size(); ++w) {
      long repetitions = 0;
      const auto start = clock::now();
      double gone = 0;
      do {
        ways[w].once();
        ++repetitions;
        gone = std::chrono::duration<double>(clock::now() - start).count();
      } while (gone < least_s);
      seconds[w].push_back(gone / static_cast<double>(repetitions));
    }
  std::vector<double> medians;
  for (auto& s : seconds) {
    std::nth_element(s.begin(), s.begin() + rounds / 2, s.end());
    medians.push_back(s[static_cast<std::size_t>(rounds / 2)]);
  }
  return medians;
}

/// Prints a case: each way with its time, its rate evaluations and its ratio to the first way.
inline void print_case(const char* title, const std::vector<Way>& ways) {
  const auto s = time_in_turn(ways);
  std::printf("\n%s\n", title);
  for (std::size_t w = 0; w < ways.size(); ++w) {
    const long calls = ways[w].calls();
    const std::string counted = calls < 0 ? "-" : std::to_string(calls);
    std::printf("  %-52s %12.3f us %9s rates %9.2f\n", ways[w].name.c_str(), s[w] * 1e6, counted.c_str(), s[w] / s[0]);
  }
}

}  // namespace bench
