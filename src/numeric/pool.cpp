#include "vatwright/numeric/pool.hpp"

#include <algorithm>
#include <atomic>
#include <exception>
#include <thread>
#include <vector>

namespace vatwright {
namespace {

/// What one index threw, kept until all are done.
struct Thrown {
  std::size_t index;
  std::exception_ptr what;
};

void work_through(std::atomic<std::size_t>& next, std::size_t n, FunctionRef<void(std::size_t)> work,
                  std::vector<Thrown>& thrown) {
  for (std::size_t i = next++; i < n; i = next++) {
    try {
      work(i);
    } catch (...) {
      thrown.push_back({i, std::current_exception()});
    }
  }
}

}  // namespace

void for_each_index(std::size_t n, int threads, FunctionRef<void(std::size_t)> work) {
  const std::size_t workers =
      std::clamp<std::size_t>(threads > 0 ? static_cast<std::size_t>(threads) : 1, 1, std::max<std::size_t>(n, 1));
  std::atomic<std::size_t> next = 0;
  std::vector<std::vector<Thrown>> thrown(workers);
  {
    std::vector<std::jthread> others;
    for (std::size_t w = 1; w < workers; ++w) others.emplace_back([&, w] { work_through(next, n, work, thrown[w]); });
    work_through(next, n, work, thrown[0]);
  }
  const Thrown* first = nullptr;
  for (const auto& of_worker : thrown)
    for (const Thrown& each : of_worker)
      if (first == nullptr || each.index < first->index) first = &each;
  if (first != nullptr) std::rethrow_exception(first->what);
}

}  // namespace vatwright
