#include <charconv>
#include <cmath>

#include "build_reaction.hpp"
#include "file.hpp"

namespace vatwright {
namespace {

std::string_view trimmed(std::string_view s) {
  while (!s.empty() && (s.front() == ' ' || s.front() == '\t')) s.remove_prefix(1);
  while (!s.empty() && (s.back() == ' ' || s.back() == '\t' || s.back() == '\r')) s.remove_suffix(1);
  return s;
}

std::optional<double> number(std::string_view s) {
  s = trimmed(s);
  double value = 0;
  const auto [end, fault] = std::from_chars(s.data(), s.data() + s.size(), value);
  if (fault != std::errc() || end != s.data() + s.size() || !std::isfinite(value)) return std::nullopt;
  return value;
}

/// Conversions and rates with their unit, from a CSV text with the header `conversion,consumption [unit]`.
struct Csv {
  std::vector<double> conversion, consumption;
  std::string unit, fault;
};
Csv read_csv(std::string_view text) {
  Csv csv;
  int line_number = 0;
  if (text.substr(0, 3) == "\xEF\xBB\xBF") text.remove_prefix(3);
  while (!text.empty()) {
    const auto end = text.find('\n');
    const std::string_view line = trimmed(text.substr(0, end));
    text.remove_prefix(end == text.npos ? text.size() : end + 1);
    ++line_number;
    if (line.empty()) continue;
    const auto comma = line.find(',');
    const std::string_view left = trimmed(line.substr(0, comma)),
                           right = comma == line.npos ? std::string_view() : trimmed(line.substr(comma + 1));
    if (csv.unit.empty()) {
      const auto open = right.find('['), close = right.find(']');
      if (left != "conversion" || trimmed(right.substr(0, open)) != "consumption" || open == right.npos ||
          close == right.npos || close < open) {
        csv.fault = "line " + std::to_string(line_number) + ": found " + quoted(line) +
                    ", expected the header conversion,consumption [mol/m3/min]";
        return csv;
      }
      csv.unit = std::string(trimmed(right.substr(open + 1, close - open - 1)));
      continue;
    }
    const auto x = number(left), r = number(right);
    if (!x || !r) {
      csv.fault = "line " + std::to_string(line_number) + ": found " + quoted(line) +
                  ", expected two numbers with decimal points, joined by a comma";
      return csv;
    }
    csv.conversion.push_back(*x), csv.consumption.push_back(*r);
  }
  if (csv.unit.empty()) csv.fault = "found an empty file, expected the header conversion,consumption [mol/m3/min]";
  return csv;
}

class TableMaker {
 public:
  TableMaker(const RateDraft& d, const std::string& subject, const ReactionContext& context)
      : d_(d), subject_(subject), context_(context) {}

  std::optional<RateTable> make() {
    table_.at_K = d_.at.value;
    refuse(d_.k, "k"), refuse(d_.most, "most"), refuse(d_.half, "half"), refuse(d_.orders, "orders");
    refuse(d_.of, "of"), refuse(d_.activation_energy, "activation_energy"), refuse(d_.theta, "theta");
    refuse(d_.adsorption, "adsorption"), refuse(d_.adsorption_power, "adsorption_power"), refuse(d_.basis, "basis");
    if (d_.per && *d_.per != Per::fluid)
      error(d_.per.place, "per", "found a measured table that does not count on the fluid", "expected per = \"fluid\"");
    if (d_.table.written && (d_.conversion.written || d_.consumption.written))
      error(d_.table.place, "table", "found a file beside conversion and consumption", "expected one of them");
    if (!(d_.table.written ? from_file() : from_keys())) return std::nullopt;
    return judge() ? std::optional(table_) : std::nullopt;
  }

 private:
  template <class T>
  void refuse(const Given<T>& given, const std::string& key) const {
    if (given.written)
      error(given.place, key, "found " + key + " beside a measured table", "expected the one or the other");
  }
  void error(Place at, const std::string& key, std::string found, std::string expected) const {
    context_.builder.about(subject_).error(at, "rate" + (key.empty() ? "" : "." + key), std::move(found),
                                           std::move(expected));
  }

  bool from_keys() {
    if (!d_.conversion.written) error(d_.place, "conversion", "missing", "expected a conversion for every consumption");
    if (!d_.consumption.written)
      error(d_.place, "consumption", "missing", "expected a consumption for every conversion");
    if (!d_.conversion || !d_.consumption) return false;
    table_.conversion = *d_.conversion;
    bool good = true;
    for (const Raw& raw : *d_.consumption) {
      const auto r = context_.amounts.read(raw, dim::concentration / dim::time, context_.conversion_of, subject_,
                                           "rate.consumption");
      good = good && r;
      table_.consumption_mol_m3_s.push_back(r.value_or(0));
    }
    place_ = d_.consumption.place;
    return good;
  }

  bool from_file() {
    if (!d_.table) return false;
    place_ = d_.table.place;
    const std::string path = (*d_.table)[0] == '/' ? *d_.table : context_.folder + *d_.table;
    if (is_device(path))
      return error(place_, "table", quoted(*d_.table) + ": no file but a device or pipe",
                   "expected a CSV file beside the duty"),
             false;
    const Bytes bytes = read_bytes(path);
    if (!bytes.fault.empty())
      return error(place_, "table", quoted(*d_.table) + ": " + bytes.fault, "expected a CSV file beside the duty"),
             false;
    const Csv csv = read_csv(bytes.text);
    if (!csv.fault.empty()) return error(place_, "table", quoted(*d_.table) + ", " + csv.fault, ""), false;
    const auto unit = parse_quantity("1 " + csv.unit);
    if (const auto* fault = std::get_if<QuantityFault>(&unit))
      return error(place_, "table", fault->found, fault->expected), false;
    const Raw one{std::get<Quantity>(unit), "1 " + csv.unit, place_};
    const auto factor =
        context_.amounts.read(one, dim::concentration / dim::time, context_.conversion_of, subject_, "rate.table");
    if (!factor) return false;
    table_.conversion = csv.conversion;
    for (const double r : csv.consumption) table_.consumption_mol_m3_s.push_back(r * *factor);
    return true;
  }

  bool judge() const {
    const auto &X = table_.conversion, &r = table_.consumption_mol_m3_s;
    bool rises = true, positive = true, inside = true;
    for (std::size_t i = 0; i < X.size(); ++i)
      rises = rises && (i == 0 || X[i] > X[i - 1]), inside = inside && X[i] >= 0 && X[i] <= 1;
    for (const double rate : r) positive = positive && rate > 0;
    std::string found;
    if (X.size() != r.size())
      found = "found " + std::to_string(X.size()) + " conversions, " + std::to_string(r.size()) + " consumptions";
    if (!rises) found += std::string(found.empty() ? "found" : ", and") + " conversions that do not rise";
    if (!inside) found += std::string(found.empty() ? "found" : ", and") + " conversions outside 0 to 1";
    if (!positive) found += std::string(found.empty() ? "found" : ", and") + " a consumption that is not above zero";
    if (found.empty() && X.size() < 2) found = "found fewer than two points";
    if (found.empty()) return true;
    error(place_, d_.table.written ? "table" : "consumption", found,
          "expected two points or more, conversions rising from 0 to 1, consumptions above zero");
    return false;
  }

  const RateDraft& d_;
  const std::string& subject_;
  const ReactionContext& context_;
  RateTable table_;
  Place place_;
};

}  // namespace

std::optional<RateTable> build_rate_table(const RateDraft& draft, const std::string& subject,
                                          const ReactionContext& context) {
  return TableMaker(draft, subject, context).make();
}

}  // namespace vatwright
