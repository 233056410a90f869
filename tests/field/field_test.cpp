// A key is declared once: reader, check, hint and page come from it. Tables here are built by hand, no file is read.
#include "vatwright/field/field.hpp"

#include <cmath>
#include <limits>

#include "support/catch.hpp"
#include "vatwright/field/kinds.hpp"
#include "vatwright/field/merge.hpp"

using namespace vatwright;
namespace {

enum class Colour { red, blue };

struct Pot : Common {
  Given<double> volume, share;
  Given<std::string> name;
  Given<bool> lid;
  Given<std::int64_t> handles;
  Given<Colour> colour;
  Given<std::pair<double, double>> range;
};

const Fields<Pot>& pot_fields() {
  static const Fields<Pot> fields{
      figure("volume", {dim::volume, above(0)}, &Pot::volume, "what it holds", needed),
      figure("share", {dim::none, between(0, 1)}, &Pot::share, "how full it is", "1"),
      text("name", "a text", &Pot::name, "how it is called"),
      truth("lid", &Pot::lid, "whether it has a lid", "false"),
      whole("handles", 1, &Pot::handles, "how many handles", "2"),
      words<Pot, Colour>("colour", {{"dark-red", Colour::red}, {"blue", Colour::blue}}, &Pot::colour, "its colour"),
      pair_of("range", {dim::temperature, anything, Sense::temperature}, "coldest and hottest", "[\"0 degC\", \"90 degC\"]",
              &Pot::range, "where it may stand"),
  };
  return fields;
}

template <class T>
Member member(const std::string& key, T value) {
  return {key, {0, 1, 1}, {decltype(Node::value)(std::move(value)), {0, 1, 9}}};
}

/// What is told of a table, the texts of the faults joined.
struct Reading {
  Pot pot;
  std::string told;
  Collected collected;
};
Reading read_pot(std::vector<Member> members) {
  Diagnostics diagnostics;
  Reading r;
  Scope scope;
  scope.diagnostics = &diagnostics, scope.collected = &r.collected, scope.subject = "pot", scope.trail = "pot";
  read_table(pot_fields(), Table{std::move(members)}, scope, r.pot);
  for (const Diagnostic& d : diagnostics.sorted()) r.told += d.key + ": " + d.found + "; " + d.expected + "\n";
  return r;
}
const std::string litre = "1 L";

}  // namespace

TEST_CASE("values go where their keys say, in SI, with their places", "[field]") {
  const Reading r = read_pot({member("volume", std::string("1.5 L")), member("share", std::string("40 %")), member("lid", true),
                              member("handles", std::int64_t{3}), member("colour", std::string("blue")),
                              member("note", std::string("dented"))});
  CHECK(r.told.empty());
  CHECK(*r.pot.volume == Approx(1.5e-3));
  CHECK(r.pot.volume.place.column == 9);
  CHECK(*r.pot.share == Approx(0.4));
  CHECK(*r.pot.lid);
  CHECK(*r.pot.handles == 3);
  CHECK(*r.pot.colour == Colour::blue);
  CHECK(*r.pot.note == "dented");
  CHECK_FALSE(r.pot.name.written);
}

TEST_CASE("a missing key, an unknown one and a wrong value are all told", "[field]") {
  const Reading r = read_pot({member("volum", litre), member("handles", 1.5)});
  CHECK(r.told.find("unknown key \"volum\"; nearest known key: \"volume\"") != std::string::npos);
  CHECK(r.told.find("volume: missing; expected a volume above zero, such as \"6.3 m3\"") != std::string::npos);
  CHECK(r.told.find("handles: found 1.5; expected a whole number, 1 or more") != std::string::npos);
  CHECK(r.pot.handles.written);
  CHECK_FALSE(r.pot.handles.value.has_value());
}

TEST_CASE("ranges hold their ends as they say", "[field]") {
  CHECK(read_pot({member("volume", litre), member("share", std::int64_t{0})}).told.empty());
  CHECK(read_pot({member("volume", litre), member("share", std::int64_t{1})}).told.empty());
  CHECK_FALSE(read_pot({member("volume", litre), member("share", 1.0000001)}).told.empty());
  CHECK_FALSE(read_pot({member("volume", std::string("0 L"))}).told.empty());
}

TEST_CASE("neither nan nor infinity comes in", "[field]") {
  const double inf = std::numeric_limits<double>::infinity();
  for (const double x : {inf, -inf, std::nan("")})
    CHECK_FALSE(read_pot({member("volume", litre), member("share", x)}).told.empty());
  CHECK_FALSE(read_pot({member("volume", std::string("inf L"))}).told.empty());
  CHECK_FALSE(read_pot({member("volume", std::string("1e999 L"))}).told.empty());
}

TEST_CASE("the near word is named, by edits, by case and by part", "[field]") {
  for (const char* word : {"Blue", "bleu", "blu"})
    CHECK(read_pot({member("volume", litre), member("colour", std::string(word))}).told.find("nearest: \"blue\"") !=
          std::string::npos);
  CHECK(read_pot({member("volume", litre), member("colour", std::string("red"))}).told.find("nearest: \"dark-red\"") !=
        std::string::npos);
}

TEST_CASE("a range upside down is told", "[field]") {
  const auto range = [](const char* lo, const char* hi) {
    return read_pot({member("volume", litre), member("range", Array{{{std::string(lo), {}}, {std::string(hi), {}}}})});
  };
  CHECK(range("0 degC", "90 degC").told.empty());
  CHECK(range("90 degC", "0 degC").told.find("the range is upside down") != std::string::npos);
}

TEST_CASE("spreads are shares or half-widths of keys beside them", "[field]") {
  const auto spread = [](const char* key, const char* width) {
    return read_pot({member("volume", litre), member("spread", Table{{member(key, std::string(width))}})});
  };
  REQUIRE(spread("volume", "5 %").collected.spreads.size() == 1);
  CHECK(spread("volume", "5 %").collected.spreads[0].key == "pot.volume");
  CHECK(spread("volume", "5 %").collected.spreads[0].half_width == Approx(0.05));
  CHECK_FALSE(spread("volume", "0.2 L").collected.spreads[0].relative);
  CHECK(spread("volume", "1 L").told.find("which reaches zero") != std::string::npos);
  CHECK(spread("volume", "1 m").told.find("not of the kind of \"volume\"") != std::string::npos);
  CHECK(spread("volum", "5 %").told.find("no sibling key \"volum\"; nearest: \"volume\"") != std::string::npos);
  CHECK(spread("share", "5 %").told.find("has a spread but is not given") != std::string::npos);
}

TEST_CASE("tables merge deeply, lists are replaced", "[field]") {
  Table base{{member("a", Table{{member("x", std::int64_t{1}), member("y", std::int64_t{2})}}),
              member("b", Array{{{std::int64_t{1}, {}}, {std::int64_t{2}, {}}}})}};
  const Table over{{member("a", Table{{member("y", std::int64_t{3})}}), member("b", Array{{{std::int64_t{9}, {}}}}),
                    member("c", true)}};
  merge_into(base, over);
  CHECK(std::get<std::int64_t>(base.find("a")->table()->find("x")->value) == 1);
  CHECK(std::get<std::int64_t>(base.find("a")->table()->find("y")->value) == 3);
  CHECK(base.find("b")->array()->items.size() == 1);
  CHECK(base.find("c") != nullptr);
  remove_key(base, "a");
  CHECK(base.find("a") == nullptr);
}

TEST_CASE("the page says of each key what its declaration says", "[field]") {
  const auto docs = docs_of(pot_fields());
  REQUIRE(docs.size() == 7);
  CHECK(docs[0].key == "volume");
  CHECK(docs[0].form == "a volume above zero, `\"6.3 m3\"`");
  CHECK(docs[0].left_out == "needed");
  CHECK(docs[5].form == "dark-red or blue");
}
