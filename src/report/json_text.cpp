#include "json_text.hpp"

#include <algorithm>
#include <cmath>

#include "vatwright/quantity/show.hpp"

namespace vatwright {
namespace {

std::string quoted(const std::string& text) { return Json(text).dump(-1, ' ', false, Json::error_handler_t::replace); }

std::string scalar(const Json& json) {
  if (json.is_string()) return quoted(json.get_ref<const std::string&>());
  if (json.is_number_float()) return shortest(json.get<double>());
  return json.dump();
}

bool on_one_line(const Json& json) {
  if (json.is_primitive() || json.empty()) return true;
  return json.is_array() && std::none_of(json.begin(), json.end(), [](const Json& item) {
           return item.is_string() || item.is_object() || !on_one_line(item);
         });
}

void write(const Json& json, const std::string& indent, std::string& out);

void write_line(const Json& json, std::string& out) {
  if (json.is_primitive()) {
    out += scalar(json);
  } else if (json.is_object()) {
    out += "{}";
  } else {
    out += '[';
    for (std::size_t i = 0; i < json.size(); ++i) {
      if (i != 0) out += ", ";
      write_line(json[i], out);
    }
    out += ']';
  }
}

void write(const Json& json, const std::string& indent, std::string& out) {
  if (on_one_line(json)) return write_line(json, out);
  const std::string inner = indent + "  ";
  const bool object = json.is_object();
  out += object ? '{' : '[';
  bool first = true;
  for (auto item = json.begin(); item != json.end(); ++item) {
    out += (first ? "\n" : ",\n") + inner;
    if (object) out += quoted(item.key()) + ": ";
    write(*item, inner, out);
    first = false;
  }
  out += "\n" + indent + (object ? '}' : ']');
}

}  // namespace

Json number(std::optional<double> value) {
  if (!value || !std::isfinite(*value)) return nullptr;
  return *value == 0 ? 0.0 : *value;
}
Json text(const std::optional<std::string>& value) { return value ? Json(*value) : Json(nullptr); }
Json text_or_null(const std::string& value) { return value.empty() ? Json(nullptr) : Json(value); }

std::string json_text(const Json& json) {
  std::string out;
  write(json, "", out);
  return out + "\n";
}

}  // namespace vatwright
