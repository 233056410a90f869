#include "duty_draft.hpp"
#include "inventory_draft.hpp"
#include "vatwright/input/read.hpp"

namespace vatwright {
namespace {

template <class D>
void print(std::string& page, const std::string& table, const Fields<D>& fields) {
  page += "\n### `" + table + "`\n\n| key | what it takes | left out | meaning |\n|---|---|---|---|\n";
  for (const KeyDoc& doc : docs_of(fields)) {
    const auto escaped = [](std::string s) {
      for (std::size_t i = 0; (i = s.find('|', i)) != s.npos; i += 2) s.insert(i, "\\");
      return s;
    };
    page += "| `" + doc.key + "` | " + escaped(doc.form) + " | " + escaped(doc.left_out) + " | " + escaped(doc.doc) +
            " |\n";
  }
}

}  // namespace

std::string keys_reference() {
  std::string page =
      "# Keys of the files, format 1\n\nPrinted from the declarations that the reader works by (`vatwright check "
      "--keys`); do not edit by hand.\n\n"
      "Every table also takes `source`, `note` and `spread`, the half-width of a 95 % interval of the keys beside "
      "it.\n\n## Inventory\n";
  print(page, "top of the file", inventory_fields());
  print(page, "[site]", site_fields());
  print(page, "[utility.NAME]", utility_fields());
  print(page, "[[vessel]]", vessel_fields());
  print(page, "[vessel.jacket]", jacket_fields());
  print(page, "[vessel.agitator]", agitator_fields());
  print(page, "[vessel.packing]", packing_fields());
  page += "\n## Duty\n";
  print(page, "top of the file", duty_fields());
  print(page, "[target]", target_fields());
  print(page, "target.production", production_fields());
  print(page, "target.yield, target.selectivity", share_fields());
  print(page, "target.outlet", outlet_fields());
  print(page, "[feed], [[feed]]", feed_fields());
  print(page, "[species.NAME]", species_fields());
  print(page, "species.NAME.antoine", antoine_fields());
  print(page, "[[reaction]]", reaction_fields());
  print(page, "[reaction.rate], [reaction.reverse]", rate_fields());
  print(page, "rate.measured", measured_fields());
  print(page, "[reaction.equilibrium]", equilibrium_fields());
  print(page, "[operation]", operation_fields());
  print(page, "[operation.vessel.TAG]", vessel_operation_fields());
  print(page, "[start]", start_fields());
  print(page, "[limits]", limits_fields());
  print(page, "[charge]", charge_fields());
  print(page, "[dose]", dose_fields());
  print(page, "dose.equivalents", equivalents_fields());
  print(page, "[cycle]", cycle_fields());
  return page;
}

}  // namespace vatwright
