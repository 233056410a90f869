#pragma once
#include <string>

#include "vatwright/report/answer.hpp"
#include "vatwright/report/look.hpp"

namespace vatwright {

/// Answers for people: text of at most 80 columns, in trade or field units.
std::string to_page(const ScreenAnswer& answer, const Look& look);
std::string to_page(const ExamineAnswer& answer, const Look& look);
std::string to_page(const RankAnswer& answer, const Look& look);
std::string to_page(const CheckAnswer& answer, const Look& look);

}  // namespace vatwright
