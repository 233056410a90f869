#include "duty_draft.hpp"
#include "inventory_draft.hpp"
#include "vatwright/input/read.hpp"

namespace vatwright {
namespace {

template <class D>
void print(std::string& page, const std::string& table, const Fields<D>& fields) {
  const std::string title = table.find('.') == table.npos && table[0] != '[' ? table : "`" + table + "`";
  page += "\n### " + title + "\n\n| key | what it takes | left out | meaning |\n|---|---|---|---|\n";
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
      "# Keys of the files, format 1\n\n"
      "What an inventory and a duty may hold, table by table. This page is printed from the declarations that the "
      "reader "
      "works by: change it there. The test `docs/keys.md is what the keys print` compares it, and leaves what they "
      "print "
      "now in `keys.md.received` where it was run.\n\n"
      "- Figures with a dimension are texts with a unit, `\"6.3 m3\"`; figures without one are bare numbers, or "
      "`\"95 %\"`.\n"
      "- \"needed\" under *left out*: the file is refused without it. Nothing there: what it would say is not asked.\n"
      "- Every table also takes `source` and `note`, texts; and `spread`, the half-width of a 95 % interval of figures "
      "beside it: `spread = { k = \"15 %\", U = \"60 W/m2/K\" }`, deeper ones by their path, `\"concentration.A\" = "
      "\"5 %\"`. "
      "Tables whose keys are species take none of the three; the table around them does.\n"
      "- `[case.NAME]` takes tables of either file; of lists it takes an entry by its name: `vessel.TAG`, "
      "`reaction.NAME`, `feed.NAME`.\n\n"
      "## Inventory\n";
  print(page, "Top of an inventory", inventory_fields());
  print(page, "[site]", site_fields());
  print(page, "[utility.NAME]", utility_fields());
  print(page, "[[vessel]]", vessel_fields());
  print(page, "[vessel.jacket]", jacket_fields());
  print(page, "[vessel.agitator]", agitator_fields());
  print(page, "[vessel.packing]", packing_fields());
  page += "\n## Duty\n";
  print(page, "Top of a duty", duty_fields());
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
