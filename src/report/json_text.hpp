#pragma once
#include <nlohmann/json.hpp>
#include <optional>
#include <string>

namespace vatwright {

using Json = nlohmann::ordered_json;

/// A number, or null where it is absent or not finite; -0 is 0.
Json number(std::optional<double> value);
/// A text, or null where it is absent.
Json text(const std::optional<std::string>& value);
/// A text, or null where it is empty.
Json text_or_null(const std::string& value);

/// The text of a JSON value: objects and arrays of objects over several lines, arrays of numbers or texts on one.
/// Doubles by `shortest`. Bytes that are no UTF-8 are replaced by U+FFFD, in keys too.
std::string json_text(const Json& json);

}  // namespace vatwright
