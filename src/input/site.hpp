#pragma once
#include "builder.hpp"
#include "inventory_draft.hpp"

namespace vatwright {

/// Judges the tables of an inventory together and makes the site of them. fallback_name: where it has no name.
Site build_site(const InventoryDraft& draft, const std::string& fallback_name, const Builder& builder);

/// What is wrong with a plant tag, in words; empty where nothing is: words and marks of hookups are no tags.
std::string fault_of_tag(const std::string& tag);

/// One vessel, judged by itself. utilities: the names of those of the site.
Vessel build_vessel(const VesselDraft& draft, const std::vector<std::string>& utilities, const Builder& builder);

}  // namespace vatwright
