#pragma once
#include "vatwright/error/diagnostic.hpp"
#include "vatwright/field/node.hpp"

namespace vatwright {

/// Carries out every `like` of an inventory: the vessel named, resolved itself, then the keys given here upon it,
/// deeply. tag, note and source are not taken over; lists are replaced whole. It may point forward and on. Told: a tag
/// that is not there, a circle, kinds that differ.
void resolve_likes(Table& inventory, Diagnostics& diagnostics);

}  // namespace vatwright
