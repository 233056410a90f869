#pragma once
#include <string>

#include "vatwright/report/answer.hpp"

namespace vatwright {

/// Answers as comma-separated values (RFC 4180): lines end in CR LF, cells that hold a comma, a quote or a line end are
/// quoted; one header row always; one row a vessel (screen), the whole and then each vessel (examine), a hookup (rank).
///   Headers are the keys of the JSON answer, nested by a dot: `outlet.flow_mol_s.A`. A limit has its own columns by
///   name, `limits.fill.margin`; one that no row has been asked has none. Units as there; null and what does not exist:
///   empty. Windows `lo..hi`, joined by `;` (an absent end is empty); numbers of one kind (steady states) joined by
///   `;`; texts joined by `; `. Cells that begin with = + - @ and are not numbers get a leading ', so that no
///   spreadsheet reckons them. Figures are those of the base; verdict, worst_case and windows_all_cases_m3_s say what
///   the cases change.
std::string to_csv(const ScreenAnswer& answer);
std::string to_csv(const ExamineAnswer& answer);
std::string to_csv(const RankAnswer& answer);

}  // namespace vatwright
