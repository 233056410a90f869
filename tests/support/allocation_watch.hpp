#pragma once

/// Counts what the program allocates with `new` while it lives: hot loops are tested to allocate nothing. Linking this
/// file replaces the global operator new of the test program.
class AllocationWatch {
 public:
  AllocationWatch();
  [[nodiscard]] long count() const;  ///< allocations since it was made, of all threads

 private:
  long before_;
};
