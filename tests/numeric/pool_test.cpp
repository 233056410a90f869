#include "vatwright/numeric/pool.hpp"

#include <atomic>
#include <stdexcept>
#include <string>
#include <vector>

#include "support/catch.hpp"

using namespace vatwright;

TEST_CASE("every index is worked on once, whatever the number of threads", "[pool]") {
  const int threads = GENERATE(-1, 0, 1, 2, 3, 8, 100);
  std::vector<int> times(257, 0);
  for_each_index(times.size(), threads, [&](std::size_t i) { ++times[i]; });
  CHECK(times == std::vector<int>(257, 1));
}

TEST_CASE("nothing to do is done", "[pool]") {
  std::atomic<int> calls = 0;
  for_each_index(0, 4, [&](std::size_t) { ++calls; });
  CHECK(calls == 0);
}

TEST_CASE("of what the work throws the first by index comes out, after all is done", "[pool]") {
  const int threads = GENERATE(1, 2, 5);
  std::atomic<int> calls = 0;
  const auto work = [&](std::size_t i) {
    ++calls;
    if (i % 7 == 3) throw std::runtime_error(std::to_string(i));
  };
  CHECK_THROWS_WITH(for_each_index(100, threads, work), "3");
  CHECK(calls == 100);
}
