#pragma once
#include <string>

#include "vatwright/error/diagnostic.hpp"
#include "vatwright/field/node.hpp"

namespace vatwright {

/// Puts the overrides of one [case.NAME] upon both files: site, utility and vessel go to the inventory, all else to the
/// duty. Lists of tables are addressed by name: vessel.TAG, reaction.NAME, feed.NAME. Told: names that are not there.
void apply_case(const Table& overrides, const std::string& name, Table& inventory, Table& duty,
                Diagnostics& diagnostics);

}  // namespace vatwright
