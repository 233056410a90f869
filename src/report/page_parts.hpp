#pragma once
#include <string>
#include <vector>

#include "vatwright/report/answer.hpp"
#include "vatwright/report/layout.hpp"

namespace vatwright {

/// The parts that pages share.

std::string words_of(Verdict verdict);            ///< "fits", "does not fit", "cannot tell"
std::string words_of(Limit::State state);         ///< "holds", "broken", "cannot tell"
std::string short_kind(const std::string& kind);  ///< "tank", "tube", "packed"
std::string number_word(long long n);             ///< "two"; figures from thirteen on

/// The figure in the unit of `unit_of`, "-" where there is none.
std::string figure(std::optional<double> si, Shown shown, const Look& look);
/// The figure with its unit.
std::string figure_with_unit(std::optional<double> si, Shown shown, const Look& look);
/// "0.2 .. 2.9 m3/h and above 5 m3/h"; "none".
std::string words_of(const std::vector<Interval>& windows, const Look& look);
/// A column head with the unit below it.
std::string with_unit(const std::string& name, Shown shown, const Look& look);

/// What was asked, of what; `more` belongs to the command.
void add_head(Page& page, const std::string& command, const Head& head, const Look& look,
              const std::vector<Page::Item>& more = {});
/// Assumed values, what was not asked, cautions, each once.
void add_tail(Page& page, const Head& head, const std::vector<Caution>& more = {});
/// Texts of cautions with the tags they belong to; equal texts once.
void add_vessel_cautions(Page& page, const std::vector<Rating>& vessels);
/// For every rating that does not fit or cannot be told: what stands in the way.
std::vector<Page::Item> obstacles(const std::vector<Rating>& ratings);

}  // namespace vatwright
