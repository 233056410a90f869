#pragma once
#include "vatwright/hookup/chooser.hpp"
#include "vatwright/hookup/hookup_rating.hpp"

namespace vatwright {

/// All answers at one feed rate and one set of shares; windows are left absent.
HookupRating tell_hookup(Chooser& chooser, const JudgedHookup& judged);

}  // namespace vatwright
