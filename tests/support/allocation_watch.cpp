#include "support/allocation_watch.hpp"

#include <atomic>
#include <cstdlib>
#include <new>

namespace {
std::atomic<long> allocations{0};

void* counted(std::size_t size) {
  ++allocations;
  if (void* place = std::malloc(size > 0 ? size : 1)) return place;
  throw std::bad_alloc();
}
}  // namespace

void* operator new(std::size_t size) { return counted(size); }
void* operator new[](std::size_t size) { return counted(size); }
void operator delete(void* place) noexcept { std::free(place); }
void operator delete[](void* place) noexcept { std::free(place); }
void operator delete(void* place, std::size_t) noexcept { std::free(place); }
void operator delete[](void* place, std::size_t) noexcept { std::free(place); }

AllocationWatch::AllocationWatch() : before_(allocations) {}
long AllocationWatch::count() const { return allocations - before_; }
