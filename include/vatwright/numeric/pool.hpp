#pragma once
#include <cstddef>

#include "vatwright/numeric/rhs.hpp"

namespace vatwright {

/// Calls work(0) .. work(n - 1), each once, on `threads` threads (1: here). The order is free, so each call writes only
/// to its own place; the answer must not depend on it.
void for_each_index(std::size_t n, int threads, FunctionRef<void(std::size_t)> work);

}  // namespace vatwright
