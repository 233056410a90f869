#include "file.hpp"

#include <sha256.h>
#include <sys/stat.h>

#include <array>
#include <cerrno>
#include <cstdio>
#include <cstring>
#include <memory>

namespace vatwright {
namespace {

std::string in_words(int error) {
  switch (error) {
    case ENOENT:
      return "no such file";
    case EACCES:
      return "may not be read by this user";
    case ENOTDIR:
      return "no such file: a part of the path is not a folder";
    case EISDIR:
      return "a folder, not a file";
    case ENAMETOOLONG:
      return "no such file: the name is too long";
    default:
      return std::string("could not be read: ") + std::strerror(error);
  }
}

/// Bytes of one letter of UTF-8 that begins at `at`, 0 where there is none (overlong forms and surrogates are none).
std::size_t letter_length(std::string_view s, std::size_t at) {
  const auto byte = [&](std::size_t i) -> unsigned {
    return at + i < s.size() ? static_cast<unsigned char>(s[at + i]) : 0u;
  };
  const auto follows = [&](std::size_t i) { return (byte(i) & 0xC0u) == 0x80u; };
  const unsigned b = byte(0);
  if (b < 0x80) return 1;
  if (b >= 0xC2 && b <= 0xDF) return follows(1) ? 2 : 0;
  if (b >= 0xE0 && b <= 0xEF) {
    if (!follows(1) || !follows(2)) return 0;
    if ((b == 0xE0 && byte(1) < 0xA0) || (b == 0xED && byte(1) > 0x9F)) return 0;
    return 3;
  }
  if (b >= 0xF0 && b <= 0xF4) {
    if (!follows(1) || !follows(2) || !follows(3)) return 0;
    if ((b == 0xF0 && byte(1) < 0x90) || (b == 0xF4 && byte(1) > 0x8F)) return 0;
    return 4;
  }
  return 0;
}

std::string what_is(unsigned char byte, std::size_t at) {
  if (byte == 0) return "a zero byte: this is no text file";
  if (at == 0 && byte >= 0xFE) return "the mark of UTF-16 text";
  std::array<char, 8> hex{};
  std::snprintf(hex.data(), hex.size(), "0x%02X", byte);
  return std::string("byte ") + hex.data() + ", which is not UTF-8";
}

}  // namespace

bool is_device(const std::string& path) {
  struct stat status {};
  return ::stat(path.c_str(), &status) == 0 && !S_ISREG(status.st_mode) && !S_ISDIR(status.st_mode);
}

Bytes read_bytes(const std::string& path) {
  struct stat status {};
  if (path.find('\0') != path.npos) return {"", "no such file"};
  if (::stat(path.c_str(), &status) != 0) return {"", in_words(errno)};
  if (S_ISDIR(status.st_mode)) return {"", in_words(EISDIR)};
  const auto close = [](std::FILE* f) { std::fclose(f); };
  const std::unique_ptr<std::FILE, decltype(close)> file(std::fopen(path.c_str(), "rb"), close);
  if (!file) return {"", in_words(errno)};
  std::string text;
  std::array<char, 65536> block{};
  while (const std::size_t n = std::fread(block.data(), 1, block.size(), file.get())) {
    text.append(block.data(), n);
    if (text.size() > most_bytes) return {"", "larger than 16 MB: this is no inventory and no duty"};
  }
  if (std::ferror(file.get())) return {"", in_words(errno)};
  return {std::move(text), ""};
}

std::string sha256_of(std::string_view bytes) {
  SHA256_CTX context;
  std::array<unsigned char, SHA256_DIGEST_LENGTH> digest{};
  SHA256_Init(&context);
  SHA256_Update(&context, reinterpret_cast<const unsigned char*>(bytes.data()), bytes.size());
  SHA256_Final(digest.data(), &context);
  std::string hex;
  for (const unsigned char byte : digest) {
    hex += "0123456789abcdef"[byte >> 4];
    hex += "0123456789abcdef"[byte & 15];
  }
  return hex;
}

std::optional<NotText> not_text(std::string_view bytes) {
  NotText place;
  for (std::size_t i = 0; i < bytes.size();) {
    const std::size_t length = letter_length(bytes, i);
    if (length == 0 || bytes[i] == '\0') {
      place.what = what_is(static_cast<unsigned char>(bytes[i]), i);
      return place;
    }
    const bool line_ends = bytes[i] == '\n';
    place.line += line_ends ? 1 : 0;
    place.column = line_ends ? 1 : place.column + 1;
    i += length;
  }
  return std::nullopt;
}

}  // namespace vatwright
