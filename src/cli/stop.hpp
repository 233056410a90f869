#pragma once

namespace vatwright {

/// While it lives, the first interrupt (Ctrl-C) is noted and not obeyed, so that what is known by then can be told; a
/// second one ends the program as ever.
class StopOnInterrupt {
 public:
  StopOnInterrupt();
  ~StopOnInterrupt();
  StopOnInterrupt(const StopOnInterrupt&) = delete;
  StopOnInterrupt& operator=(const StopOnInterrupt&) = delete;
  [[nodiscard]] static bool asked();

 private:
  void (*before_)(int);
};

}  // namespace vatwright
