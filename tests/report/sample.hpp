#pragma once
#include "vatwright/report/answer.hpp"

/// Answers made by hand, with every kind of figure there and absent. No figure here comes from a calculation.
vatwright::Head sample_head();
vatwright::Rating sample_tank();     ///< fits, with two windows, a limit that holds, and a steady state
vatwright::Rating sample_tube();     ///< does not fit; a limit broken, a yield absent, a profile
vatwright::Rating sample_unrated();  ///< cannot tell; no figures at all
vatwright::ScreenAnswer sample_screen();
vatwright::ExamineAnswer sample_examine();
vatwright::RankAnswer sample_rank();
