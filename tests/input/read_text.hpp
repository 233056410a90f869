#pragma once
#include <fstream>
#include <sstream>
#include <stdexcept>
#include <deque>
#include <string>

#include "vatwright/input/read.hpp"

namespace vatwright::test {

/// The bytes of a file of the project.
inline std::string file_text(const std::string& path) {
  std::ifstream file(std::string(VATWRIGHT_SOURCE_DIR) + "/" + path, std::ios::binary);
  std::ostringstream text;
  text << file.rdbuf();
  return text.str();
}

inline const std::string one_tank =
    "format = 1\n[[vessel]]\ntag = \"K-1\"\nkind = \"stirred-tank\"\nvolume = \"2 m3\"\nfill = [0.2, 0.8]\n";

/// Head of a duty whose one reactant is A.
inline const std::string head = "format = 1\nphase = \"liquid\"\nconversion_of = \"A\"\n";
inline const std::string target = "[target]\nconversion = 0.8\nfeed_rate = \"2 m3/h\"\n";
inline const std::string feed = "[feed]\ntemperature = \"25 degC\"\nconcentration = { A = \"2 mol/L\" }\n";
inline const std::string reaction = "[[reaction]]\nequation = \"A -> B\"\n[reaction.rate]\nk = \"0.3 1/min\"\n";

inline ReadResult read_both(const std::string& inventory, const std::string& duty) {
  return read_texts({"site.toml", inventory, ""}, FileText{"duty.toml", duty, ""});
}
inline ReadResult read_duty(const std::string& duty) { return read_both(one_tank, duty); }

/// What is told, whole.
inline std::string told(const ReadResult& result) { return to_text(result.diagnostics, false); }

/// The duty of a text that has to be right; what is told otherwise becomes the fault of the test.
/// It is kept for the whole run, so that tests may hold on to parts of it.
inline const Problem& right(const ReadResult& result) {
  static std::deque<Problem> kept;
  if (!result.problems) throw std::runtime_error(told(result));
  return kept.emplace_back(result.problems->base);
}
inline const Duty& right_duty(const std::string& text) { return right(read_duty(text)).duty; }

inline double fed(const Duty& duty, const std::string& species) {
  return duty.chemistry.feed.c_mol_m3.at(static_cast<std::size_t>(duty.chemistry.feed.index_of(species)));
}
inline const RateLaw& law_of(const Duty& duty, int j = 0) {
  return std::get<RateLaw>(duty.chemistry.kinetics.reaction(j).forward);
}
inline const PowerLaw& power_of(const Duty& duty, int j = 0) { return std::get<PowerLaw>(law_of(duty, j).law); }

inline std::string assumed(const Problem& problem, const std::string& key) {
  for (const Assumed& a : problem.assumed)
    if (a.key == key) return a.value;
  return "not assumed";
}

}  // namespace vatwright::test
