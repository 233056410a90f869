#include "support/allocation_watch.hpp"

#include <atomic>
#include <cstdlib>
#include <new>

namespace {
std::atomic<long> allocations{0};

void* tried(std::size_t size) noexcept {
  ++allocations;
  return std::malloc(size > 0 ? size : 1);
}
void* counted(std::size_t size) {
  if (void* place = tried(size)) return place;
  throw std::bad_alloc();
}
}  // namespace

void* operator new(std::size_t size) { return counted(size); }
void* operator new[](std::size_t size) { return counted(size); }
void* operator new(std::size_t size, const std::nothrow_t&) noexcept { return tried(size); }
void* operator new[](std::size_t size, const std::nothrow_t&) noexcept { return tried(size); }
void operator delete(void* place) noexcept { std::free(place); }
void operator delete[](void* place) noexcept { std::free(place); }
void operator delete(void* place, std::size_t) noexcept { std::free(place); }
void operator delete[](void* place, std::size_t) noexcept { std::free(place); }
void operator delete(void* place, const std::nothrow_t&) noexcept { std::free(place); }
void operator delete[](void* place, const std::nothrow_t&) noexcept { std::free(place); }

AllocationWatch::AllocationWatch() : before_(allocations) {}
long AllocationWatch::count() const { return allocations - before_; }
