#pragma once
#include <string>

#include "vatwright/report/answer.hpp"

namespace vatwright {

/// Answers as one JSON object each: SI, a key ends in its unit, every key of the command always there, null where
/// something does not exist. Doubles are the shortest text that reads back, -0 is 0, what is not finite is null; bytes
/// that are no UTF-8 become U+FFFD. Schemas "vatwright.screen/1", .. name the shape.
///   Under amounts by mass feed_mol_s is called feed_kg_s, flow_mol_s flow_kg_s.
///   `cases` holds the answers of every case by name: all keys but schema, made_by, stamp and cases.
///   Every VESSEL, and every place of a ranking, has besides its own figures (the base's): worst_case (the case the
///   verdict comes from, null = base) and, but in rank, windows_all_cases_m3_s (the intersection over base and cases).
std::string to_json(const ScreenAnswer& answer);
std::string to_json(const ExamineAnswer& answer);
std::string to_json(const RankAnswer& answer);
std::string to_json(const CheckAnswer& answer);

}  // namespace vatwright
