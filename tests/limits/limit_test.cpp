#include <set>

#include "limits/scene.hpp"
#include "support/catch.hpp"

using namespace vatwright;
using namespace vatwright::test;

TEST_CASE("limits stand in one order, each name once", "[limits]") {
  const std::vector<std::string> expected = {"fill",
                                             "pressure rating",
                                             "temperature rating",
                                             "product temperature",
                                             "wetted material",
                                             "bubble point",
                                             "heat removal",
                                             "heating",
                                             "pressure drop",
                                             "feed line",
                                             "utility total",
                                             "steady state stable",
                                             "start-up peak",
                                             "runaway sensitivity",
                                             "temperature if cooling fails",
                                             "glass temperature step"};
  std::vector<std::string> names;
  for (const auto& listed : all_limits()) names.emplace_back(listed.name);
  CHECK(names == expected);
  CHECK(place_of("bubble point") == 5);
  CHECK(place_of("no such limit") == names.size());
}

TEST_CASE("what a limit is called is what it is listed as", "[limits]") {
  Scene s;
  s.with_jacket().needs(1000);
  s.product.hottest_K = 400;
  s.vessel.feed_line_m3_s = 1;
  std::size_t last = 0;
  for (const Limit& limit : check_limits(s.input())) {
    INFO(limit.name);
    const std::size_t place = place_of(limit.name);
    CHECK(place < all_limits().size());
    CHECK(place >= last);
    last = place;
    CHECK(limit.why.empty() == (limit.state == Limit::State::holds));
  }
}

TEST_CASE("fill", "[limits]") {
  Scene s;
  SECTION("at its most it holds, with no room") {
    const auto limit = s.limit("fill");
    CHECK(holds(limit));
    CHECK(*limit->value == 0.85);
    CHECK(*limit->bound == 0.85);
    CHECK(*limit->margin == 0.0);
    CHECK(limit->unit == "1");
  }
  SECTION("above: (0.85 - 0.9)/0.85") {
    s.operation.fill = 0.9;
    const auto limit = s.limit("fill");
    CHECK(broken(limit));
    CHECK(*limit->margin == Approx(-0.05 / 0.85).epsilon(1e-12));
    CHECK(limit->why == "fill: 0.9 asked, the vessel works between 0.3 and 0.85");
  }
  SECTION("below: a lower bound counts value less bound, (0.2 - 0.3)/0.3") {
    s.operation.fill = 0.2;
    CHECK(broken(s.limit("fill")));
    CHECK(*s.limit("fill")->bound == 0.3);
    CHECK(*s.limit("fill")->margin == Approx(-1.0 / 3).epsilon(1e-12));
  }
  SECTION("not asked of a gas or a tube") {
    s.chemistry.feed.phase = Phase::gas;
    CHECK_FALSE(s.limit("fill"));
    Scene tube;
    CHECK_FALSE(tube.as_tube().limit("fill"));
  }
}

TEST_CASE("pressure rating shows the tighter of its two bounds", "[limits]") {
  Scene s;
  CHECK_FALSE(s.limit("pressure rating"));
  s.vessel.pressure_Pa = {101325 - 1e5, 4e5};
  CHECK(holds(s.limit("pressure rating")));
  CHECK(*s.limit("pressure rating")->margin == Approx(0.25));  // (4 - 3)/4
  CHECK(s.limit("pressure rating")->unit == "Pa");
  s.outcome.highest_Pa = 5e5;
  CHECK(broken(s.limit("pressure rating")));
  CHECK(s.limit("pressure rating")->why == "pressure rating: 5 bar inside, rated for 0.01325 bar to 4 bar");
  s.outcome.highest_Pa = 3e5;
  s.vessel.pressure_Pa = {2.9e5, 9e5};
  CHECK(*s.limit("pressure rating")->bound == 2.9e5);
  CHECK(*s.limit("pressure rating")->margin == Approx(0.1 / 2.9));
}

TEST_CASE("temperature limits count a plain difference", "[limits]") {
  Scene s;
  CHECK_FALSE(s.limit("temperature rating"));
  CHECK_FALSE(s.limit("product temperature"));
  s.vessel.temperature_K = {253.15, 453.15};
  s.outcome.coldest_K = 300;
  s.outcome.hottest_K = 450;
  const auto rating = s.limit("temperature rating");
  CHECK(holds(rating));
  CHECK(rating->unit == "K");
  CHECK(*rating->margin == Approx(3.15));
  CHECK(*rating->search_margin == Approx(3.15 / 453.15));
  s.outcome.hottest_K = 460;
  CHECK(broken(s.limit("temperature rating")));
  CHECK(*s.limit("temperature rating")->margin == Approx(-6.85));

  s.product.hottest_K = 440;
  CHECK(broken(s.limit("product temperature")));
  CHECK(*s.limit("product temperature")->margin == Approx(-20.0));
  s.product.hottest_K.reset();
  s.product.coldest_K = 310;
  CHECK(broken(s.limit("product temperature")));
  CHECK(s.limit("product temperature")->why.find("to stay above") != std::string::npos);
  s.product.coldest_K = 290;
  CHECK(holds(s.limit("product temperature")));
}

TEST_CASE("a hold temperature that equals the rating holds in spite of rounding", "[limits]") {
  Scene s;
  s.vessel.temperature_K = {0, 453.15};
  s.outcome.hottest_K = s.outcome.coldest_K = 453.15 * (1 + 4e-16);
  CHECK(holds(s.limit("temperature rating")));
  s.outcome.hottest_K = 453.15 * (1 + 1e-8);
  CHECK(broken(s.limit("temperature rating")));
}

TEST_CASE("wetted material", "[limits]") {
  Scene s;
  s.vessel.wetted = {"316L", "PTFE"};
  CHECK_FALSE(s.limit("wetted material"));
  s.product.wetted = {"316l", "glass", "ptfe"};  // case does not matter
  const auto good = s.limit("wetted material");
  CHECK(holds(good));
  CHECK_FALSE((good->value || good->bound || good->margin));
  CHECK(good->unit.empty());
  s.product.wetted = {"glass", "PTFE"};
  CHECK(broken(s.limit("wetted material")));
  CHECK(s.limit("wetted material")->why == "wetted material: 316L is wetted, the product may touch glass, PTFE only");
  s.vessel.wetted.clear();
  CHECK(untold(s.limit("wetted material")));
  CHECK_FALSE(s.limit("wetted material")->search_margin);  // does not narrow a window
}

TEST_CASE("feed line", "[limits]") {
  Scene s;
  CHECK_FALSE(s.limit("feed line"));
  s.vessel.feed_line_m3_s = 12.0 / 3600;
  CHECK(*s.limit("feed line")->margin == Approx(0.8));
  s.feed_m3_s = 15.0 / 3600;
  CHECK(broken(s.limit("feed line")));
  CHECK(s.limit("feed line")->why == "feed line: 15 m3/h needed, the line passes 12 m3/h");
  s.feed_m3_s = 12.0 / 3600 * (1 + 5e-10);
  CHECK(holds(s.limit("feed line")));
}

TEST_CASE("pressure drop", "[limits]") {
  Scene s;
  s.as_tube();
  s.outcome.pressure_drop_Pa = 2e5;
  SECTION("not asked where the vessel does not state one") { CHECK_FALSE(s.limit("pressure drop")); }
  SECTION("stated") {
    s.vessel.pressure_drop_Pa = 3e5;
    CHECK(holds(s.limit("pressure drop")));
    s.outcome.pressure_drop_Pa = 3.3e5;
    CHECK(*s.limit("pressure drop")->margin == Approx(-0.1));
    s.outcome.pressure_drop_Pa.reset();
    CHECK(untold(s.limit("pressure drop")));
    CHECK(s.limit("pressure drop")->why == "pressure drop: the feed has no viscosity");
  }
  SECTION("a let-down can not go up") {
    s.operation.pressure_Pa = 4e5;
    CHECK_FALSE(s.limit("pressure drop"));  // a first vessel: its own pressure
    s.arrives_Pa = 4e5;
    CHECK(holds(s.limit("pressure drop")));
    s.arrives_Pa = 3e5;
    CHECK(broken(s.limit("pressure drop")));
    CHECK(s.limit("pressure drop")->why == "pressure drop: 4 bar asked, 3 bar arrives");
  }
}

TEST_CASE("steady state stable", "[limits]") {
  Scene s;
  CHECK(holds(s.limit("steady state stable")));
  s.outcome.cycle = true;
  CHECK(broken(s.limit("steady state stable")));
  CHECK_FALSE(s.limit("steady state stable")->margin);
  CHECK_FALSE(s.as_tube().limit("steady state stable"));
}
