#include <algorithm>
#include <cctype>

#include "build.hpp"
#include "checks.hpp"

namespace vatwright {

namespace {
bool same_letters(const std::string& a, const std::string& b) {
  return std::equal(a.begin(), a.end(), b.begin(), b.end(),
                    [](unsigned char x, unsigned char y) { return std::tolower(x) == std::tolower(y); });
}

std::string joined(const std::vector<std::string>& words) {
  std::string text;
  for (const auto& word : words) text += (text.empty() ? "" : ", ") + word;
  return text;
}
}  // namespace

std::optional<Limit> check_wetted_material(const LimitInput& input) {
  const auto& allowed = input.product.wetted;
  const auto& wetted = input.vessel.wetted;
  if (allowed.empty()) return std::nullopt;
  if (wetted.empty())
    return cannot_tell(limit_name::wetted_material, "the inventory does not say what this vessel is made of");
  std::vector<std::string> strange;
  for (const auto& material : wetted) {
    const bool listed =
        std::any_of(allowed.begin(), allowed.end(), [&](const auto& other) { return same_letters(material, other); });
    if (!listed) strange.push_back(material);
  }
  if (strange.empty()) return held(limit_name::wetted_material);
  return broken(limit_name::wetted_material,
                joined(strange) + " is wetted, the product may touch " + joined(allowed) + " only");
}

}  // namespace vatwright
