#pragma once
#include "json_text.hpp"
#include "vatwright/report/answer.hpp"

namespace vatwright {

/// The keys that all answers share, without schema, made_by and stamp.
void add_head(Json& json, const Head& head);
/// schema, made_by and stamp, then add_head.
Json start_answer(const std::string& schema, const Head& head);

Json cautions_json(const std::vector<Caution>& cautions);
Json yields_json(const Rating& rating);
Json ends_json(const std::optional<Windows>& windows);

/// Every key of VESSEL but tag and kind, onto `json`.
void add_rating(Json& json, const Rating& rating, const OverCases& over, Amounts amounts);
/// One VESSEL.
Json vessel_json(const Rating& rating, const OverCases& over, Amounts amounts);
/// One VESSEL of `examine`: with feed_fraction and profile.
Json part_json(const Rating& rating, const OverCases& over, Amounts amounts);

/// "feed_mol_s" or "feed_kg_s"; "flow_mol_s" or "flow_kg_s".
std::string amount_key(const std::string& stem, Amounts amounts);

/// The VESSELs of a screen, the whole and the VESSELs of a hookup, the places of a ranking: what JSON and CSV share.
Json vessels_json(const ScreenAnswer& answer);
Json whole_json(const ExamineAnswer& answer);
Json parts_json(const ExamineAnswer& answer);
Json places_json(const RankAnswer& answer);

}  // namespace vatwright
