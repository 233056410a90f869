#include "progress.hpp"

#include <cmath>
#include <ostream>

namespace vatwright {
namespace {

constexpr auto first_after = std::chrono::milliseconds(500);
constexpr auto then_every = std::chrono::milliseconds(200);
constexpr double estimate_after_s = 2;

}  // namespace

Progress::Progress(const Context& context, std::string what, long long total)
    : err_(context.err),
      wanted_(context.terminals.err && !context.settings.quiet),
      what_(std::move(what)),
      total_(total),
      begun_(std::chrono::steady_clock::now()),
      next_(begun_ + first_after) {}

void Progress::one_more() {
  if (!wanted_) return;
  const std::lock_guard lock(mutex_);
  ++done_;
  tell();
}

void Progress::at(long long done, long long total) {
  if (!wanted_) return;
  const std::lock_guard lock(mutex_);
  done_ = done;
  total_ = total;
  tell();
}

void Progress::tell() {
  const auto now = std::chrono::steady_clock::now();
  if (now < next_) return;
  next_ = now + then_every;
  std::string line = std::to_string(done_) + " of " + std::to_string(total_) + " " + what_;
  if (const double gone = std::chrono::duration<double>(now - begun_).count(); done_ > 0 && gone > estimate_after_s) {
    const double left = gone * static_cast<double>(total_ - done_) / static_cast<double>(done_);
    line += ", about " + std::to_string(std::lround(left)) + " s left";
  }
  if (line.size() < shown_) line.append(shown_ - line.size(), ' ');
  err_ << '\r' << line << std::flush;
  shown_ = line.size();
}

void Progress::end() {
  if (shown_ != 0) err_ << '\r' << std::string(shown_, ' ') << '\r' << std::flush;
  shown_ = 0;
}

}  // namespace vatwright
