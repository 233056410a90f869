// Reads any bytes as an inventory and a duty, split at the first byte 0xFF (which no text holds). Whatever they are: no
// crash, no endless run, either problems or a fault that is told, and no figure of the feed that is not finite.
#include <cmath>
#include <cstddef>
#include <cstdint>
#include <cstdlib>
#include <string>

#include "vatwright/input/read.hpp"

namespace {

bool is_sound(const vatwright::Duty& duty) {
  const vatwright::Feed& feed = duty.chemistry.feed;
  for (const double c : feed.c_mol_m3)
    if (!std::isfinite(c) || c < 0) return false;
  return std::isfinite(feed.temperature_K) && feed.temperature_K > 0 && std::isfinite(feed.pressure_Pa) &&
         std::isfinite(duty.target.feed_m3_s) && duty.target.feed_m3_s > 0 && std::isfinite(duty.hold_K);
}

}  // namespace

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  const std::string bytes(reinterpret_cast<const char*>(data), size);
  const std::size_t split = bytes.find('\xff');
  const vatwright::FileText inventory{"inventory.toml", bytes.substr(0, split), ""};
  const vatwright::FileText duty{"duty.toml", split == bytes.npos ? "" : bytes.substr(split + 1), ""};
  const vatwright::ReadResult result = vatwright::read_texts(inventory, duty);
  if (result.problems.has_value() == result.diagnostics.has_errors()) std::abort();
  if (result.problems && !is_sound(result.problems->base.duty)) std::abort();
  (void)vatwright::to_text(result.diagnostics, false);
  return 0;
}
