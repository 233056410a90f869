#pragma once
// All of the room: hookups as text and tree, the rating of one, and the ranking of all.
#include "vatwright/hookup/expression.hpp"
#include "vatwright/hookup/hookup_rating.hpp"
#include "vatwright/hookup/rank.hpp"
