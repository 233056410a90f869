// Reads any bytes as an inventory and a duty, split at the first byte 0xFF (which no text holds). Whatever they are: no
// crash, no endless run, and either problems or a fault that is told.
#include <cstddef>
#include <cstdint>
#include <cstdlib>
#include <string>

#include "vatwright/input/read.hpp"

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  const std::string bytes(reinterpret_cast<const char*>(data), size);
  const std::size_t split = bytes.find('\xff');
  const vatwright::FileText inventory{"inventory.toml", bytes.substr(0, split), ""};
  const vatwright::FileText duty{"duty.toml", split == bytes.npos ? "" : bytes.substr(split + 1), ""};
  const vatwright::ReadResult result = vatwright::read_texts(inventory, duty);
  if (result.problems.has_value() == result.diagnostics.has_errors()) std::abort();
  (void)vatwright::to_text(result.diagnostics, false);
  return 0;
}
