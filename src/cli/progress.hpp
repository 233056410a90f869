#pragma once
#include <chrono>
#include <mutex>
#include <string>

#include "command.hpp"

namespace vatwright {

/// Tells on `err` how far long work is: only on a terminal, not with --quiet, and only after half a second. Any thread
/// may call it. The line is taken away at the end.
class Progress {
 public:
  Progress(const Context& context, std::string what, long long total);
  void one_more();
  void at(long long done, long long total);
  void end();

 private:
  void tell();

  std::ostream& err_;
  bool wanted_;
  std::string what_;
  long long done_ = 0, total_;
  std::size_t shown_ = 0;  ///< length of the line that stands there
  std::chrono::steady_clock::time_point begun_, next_;
  std::mutex mutex_;
};

}  // namespace vatwright
