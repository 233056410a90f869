#pragma once
#include <array>
#include <streambuf>

namespace vatwright {

/// Writes to a file descriptor. A reader that has gone (a closed pipe) is no failure: what is left is dropped quietly.
/// Anything else that can not be written makes the stream fail. SIGPIPE must be ignored by the program.
class DescriptorBuffer : public std::streambuf {
 public:
  explicit DescriptorBuffer(int descriptor);
  ~DescriptorBuffer() override;
  DescriptorBuffer(const DescriptorBuffer&) = delete;
  DescriptorBuffer& operator=(const DescriptorBuffer&) = delete;

 protected:
  int_type overflow(int_type next) override;
  int sync() override;

 private:
  bool drain();

  int descriptor_;
  bool reader_gone_ = false;
  std::array<char, 16384> buffer_;
};

}  // namespace vatwright
