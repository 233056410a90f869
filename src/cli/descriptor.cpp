#include "vatwright/cli/descriptor.hpp"

#include <unistd.h>

#include <cerrno>

namespace vatwright {

DescriptorBuffer::DescriptorBuffer(int descriptor) : descriptor_(descriptor) {
  setp(buffer_.data(), buffer_.data() + buffer_.size());
}
DescriptorBuffer::~DescriptorBuffer() { drain(); }

DescriptorBuffer::int_type DescriptorBuffer::overflow(int_type next) {
  if (!drain()) return traits_type::eof();
  if (!traits_type::eq_int_type(next, traits_type::eof())) {
    *pptr() = traits_type::to_char_type(next);
    pbump(1);
  }
  return traits_type::not_eof(next);
}

int DescriptorBuffer::sync() { return drain() ? 0 : -1; }

bool DescriptorBuffer::drain() {
  const char* from = pbase();
  while (!reader_gone_ && from != pptr()) {
    const ssize_t written = ::write(descriptor_, from, static_cast<std::size_t>(pptr() - from));
    if (written >= 0) {
      from += written;
    } else if (errno == EPIPE) {
      reader_gone_ = true;
    } else if (errno != EINTR) {
      return false;
    }
  }
  setp(buffer_.data(), buffer_.data() + buffer_.size());
  return true;
}

}  // namespace vatwright
