#include <string>
#include <vector>

#include "support/catch.hpp"
#include "vatwright/error/diagnostic.hpp"

using namespace vatwright;

TEST_CASE("the nearest word by edits", "[error][nearest]") {
  CHECK(nearest("voidge", {"particle", "voidage", "bulk_density"}) == "voidage");
  CHECK(nearest("operations", {"target", "operation"}) == "operation");
  CHECK(nearest("K-210", {"K-201", "K-999"}) == "K-201");  // neighbours swapped count once
  CHECK(nearest("kk", {"k", "activation_energy"}) == "k");
  CHECK(nearest("zzzz", {"k", "volume"}).empty());
  CHECK(nearest("x", {"k"}).empty());
  CHECK(nearest("", {"k"}).empty());
  CHECK(nearest("volume", {}).empty());
}

TEST_CASE("case and - _ do not count", "[error][nearest]") {
  CHECK(nearest("towerwater", {"towerwaters", "tower-water"}) == "tower-water");
  CHECK(nearest("Feed_Rate", {"feed_rates", "feed-rate"}) == "feed-rate");
  CHECK(nearest("a", {"B", "A"}) == "A");
}

TEST_CASE("a word that is a part of one known word", "[error][nearest]") {
  CHECK(nearest("tank", {"stirred-tank", "tube", "packed-tube"}) == "stirred-tank");
  CHECK(nearest("rate", {"feed_rate", "rate_table"}).empty());  // of two: neither
}

TEST_CASE("words of great length cost nothing", "[error][nearest]") {
  const std::string a(300000, 'a');
  std::string capital = a, other = a;
  capital.front() = 'A', other.back() = 'c';
  CHECK(nearest(a, {other, "k"}).empty());
  CHECK(nearest(a, {"k", capital}) == capital);
}
