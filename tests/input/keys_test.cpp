// docs/keys.md is the page that the declarations of the keys print. Where it differs, what they print now is left as
// docs/keys.md.received below the build folder of the tests: look at it and take it over.
#include <fstream>
#include <sstream>
#include <string>

#include "support/catch.hpp"
#include "vatwright/input/read.hpp"

TEST_CASE("docs/keys.md is what the keys print", "[input][keys]") {
  std::ifstream file(std::string(VATWRIGHT_SOURCE_DIR) + "/docs/keys.md", std::ios::binary);
  std::ostringstream page;
  page << file.rdbuf();
  const std::string printed = vatwright::keys_reference();
  CHECK(page.str() == printed);
  if (page.str() != printed) std::ofstream("keys.md.received", std::ios::binary) << printed;
}
