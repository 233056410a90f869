#include "vatwright/stream/feed.hpp"

#include "support/catch.hpp"

using namespace vatwright;

TEST_CASE("a species is found by its name, in the order kept", "[feed]") {
  Feed feed;
  for (const char* name : {"A", "B", "a"}) {
    feed.species.emplace_back();
    feed.species.back().name = name;
  }
  CHECK(feed.index_of("A") == 0);
  CHECK(feed.index_of("B") == 1);
  CHECK(feed.index_of("a") == 2);
  CHECK(feed.index_of("C") == -1);
  CHECK(feed.index_of("") == -1);
}
