#include "random_row.hpp"

#include <cmath>
#include <cstdio>
#include <cstdlib>
#include <fstream>
#include <iterator>
#include <sstream>

#include "support/catch.hpp"

namespace vatwright::reference {

Words split(const std::string& text, const std::string& by) {
  Words parts;
  std::size_t from = 0;
  for (std::size_t at = 0; (at = text.find(by, from)) != std::string::npos; from = at + by.size())
    parts.push_back(text.substr(from, at - from));
  parts.push_back(text.substr(from));
  return parts;
}

Words words(const std::string& text) {
  std::istringstream in(text);
  return {std::istream_iterator<std::string>(in), {}};
}

std::string number(double x) {
  char text[32];
  std::snprintf(text, sizeof text, "%.10g", x);
  return text;
}

namespace {

/// { A = "12 mol/m3", B = .. } from "A 12 B .."; no unit: bare numbers.
std::string inline_table(const Words& w, const std::string& unit) {
  std::string text;
  for (std::size_t i = 0; i + 1 < w.size(); i += 2)
    text += (i ? ", " : "{ ") + w[i] + " = " + (unit.empty() ? w[i + 1] : '"' + w[i + 1] + ' ' + unit + '"');
  return text + " }";
}

/// The unit of k for a rate in mol/m3/s: (mol/m3)^(1-n)/s.
std::string unit_of_k(double n) {
  if (std::abs(n - 1) < 1e-9) return "1/s";
  return n > 1 ? "m^" + number(3 * (n - 1)) + "/mol^" + number(n - 1) + "/s"
               : "mol^" + number(1 - n) + "/m^" + number(3 * (1 - n)) + "/s";
}

double sum_of_orders(const Words& w) {
  double n = 0;
  for (std::size_t i = 2; i < w.size(); i += 2) n += std::atof(w[i].c_str());
  return n;
}

/// What K counts in: the products' coefficients less the reactants'; every coefficient of a reversible row is one.
std::string unit_of_K(const std::string& equation) {
  const auto sides = split(equation, " <-> ");
  const auto dn = split(sides[1], " + ").size() - split(sides[0], " + ").size();
  return dn == 0 ? "" : "mol/m3";
}

}  // namespace

std::string reaction_text(const std::string& text, std::size_t index) {
  const auto parts = split(text, " ; ");
  std::string head = "[[reaction]]\nname = \"r" + std::to_string(index) + "\"\nequation = \"" + parts[0] + "\"\n", rate,
              K;
  double n = 0;
  for (const auto& part : parts)
    if (part.starts_with("orders")) n = sum_of_orders(words(part));
  for (std::size_t i = 1; i < parts.size(); ++i) {
    const auto w = words(parts[i]);
    const Words rest(w.begin() + 1, w.end());
    if (w[0] == "k") rate += "k = \"" + w[1] + ' ' + unit_of_k(n) + "\"\nof = \"reaction\"\n";
    if (w[0] == "orders") rate += "orders = " + inline_table(rest, "") + '\n';
    if (w[0] == "E") rate += "activation_energy = \"" + w[1] + " J/mol\"\nat = \"" + w[3] + " K\"\n";
    if (w[0] == "releases")
      head += w[1][0] == '-' ? "absorbs = \"" + w[1].substr(1) + " J/mol\"\n" : "releases = \"" + w[1] + " J/mol\"\n";
    if (w[0] == "K") {
      const auto unit = unit_of_K(parts[0]);
      K = "[reaction.equilibrium]\nK = " + (unit.empty() ? w[1] : '"' + w[1] + ' ' + unit + '"') + "\nat = \"" + w[3] +
          " K\"\n";
    }
    if (w[0] == "adsorption") {
      rate += "adsorption = " + inline_table({rest.begin(), rest.end() - 2}, "m3/mol") +
              "\nadsorption_power = " + w.back() + '\n';
    }
  }
  return head + "[reaction.rate]\n" + rate + K;
}

std::string feed_text(const std::string& phase, const std::string& kelvin, const std::string& pascal,
                      const std::string& contents, const std::string& heat) {
  const bool gas = phase == "gas";
  std::string text = "[feed]\ntemperature = \"" + kelvin + " K\"\n";
  if (gas)
    text += "pressure = \"" + pascal + " Pa\"\nfraction = " + inline_table(words(contents), "") + '\n';
  else
    text += "concentration = " + inline_table(words(contents), "mol/m3") + '\n';
  if (heat == "-") return text;
  if (!gas)
    return text + "density = \"1000 kg/m3\"\nheat_capacity = \"" + number(std::atof(heat.c_str()) / 1000) +
           " J/kg/K\"\n";
  const auto cp = words(heat);
  for (std::size_t i = 0; i + 1 < cp.size(); i += 2)
    text += "[species." + cp[i] + "]\nheat_capacity = \"" + cp[i + 1] + " J/mol/K\"\n";
  return text;
}

int rows_as_expected(const std::string& file, Case (*case_of)(const std::string&, const std::string&, int)) {
  std::ifstream in(VATWRIGHT_SOURCE_DIR "/tests/reference/random/" + file);
  std::string row;
  int rows = 0;
  for (int line = 1; std::getline(in, row); ++line) {
    if (row.empty() || row[0] == '#') continue;
    ++rows;
    const Case c = case_of(row, file + ":" + std::to_string(line), line);
    const auto found = c.faults.empty() ? differences(c) : c.faults;
    INFO(c.file << ": " << row);
    std::string text;
    for (const auto& f : found) text += "\n  " + f;
    if (found.empty())
      SUCCEED();
    else
      FAIL_CHECK(text);
  }
  return rows;
}

}  // namespace vatwright::reference
