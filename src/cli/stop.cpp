#include "stop.hpp"

#include <atomic>
#include <csignal>

namespace vatwright {
namespace {

std::atomic<bool> interrupted = false;
static_assert(std::atomic<bool>::is_always_lock_free, "set by a signal handler");

void note(int) {
  interrupted = true;
  std::signal(SIGINT, SIG_DFL);
}

}  // namespace

StopOnInterrupt::StopOnInterrupt() : before_((interrupted = false, std::signal(SIGINT, note))) {}
StopOnInterrupt::~StopOnInterrupt() { std::signal(SIGINT, before_ == SIG_ERR ? SIG_DFL : before_); }
bool StopOnInterrupt::asked() { return interrupted; }

}  // namespace vatwright
