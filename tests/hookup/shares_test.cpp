#include "site.hpp"
#include "support/catch.hpp"
#include "vatwright/hookup/network.hpp"

using namespace vatwright;
using namespace vatwright::test;

TEST_CASE("tubes of 50 and 30 L beside one of 40 L: two thirds go to the longer way", "[shares]") {
  // O. Levenspiel, Chemical Reaction Engineering, 3rd ed. 1999, Ex. 6.1: equal space times, 0.667 of the feed.
  // Closed form at k V/v = 1.2: X = 1 - exp(-1.2); half and half only 0.674387.
  const double k = 1.2 / 120;
  const Problem p = problem_of({tube("A", 50), tube("B", 30), tube("C", 40)}, {1, 0}, {reaction({{0, -1}, {1, 1}}, k, {{0, 1}})}, 1, 0.5);
  const auto rating = rate_hookup(p, parsed("[A then B] beside C", p.site), {.windows = false});
  CHECK(rating.shares[0] == Approx(2.0 / 3).margin(1e-5));
  CHECK(*rating.whole.conversion == Approx(1 - std::exp(-1.2)).margin(1e-10));
  CHECK(conversion(p, "50% [A then B] beside 50% C") == Approx(0.674387).margin(1e-6));
  CHECK(rating.free_shares == 1);
  CHECK(*rating.vessels[2].feed_fraction == Approx(1.0 / 3).margin(1e-5));
}

TEST_CASE("chosen shares are not beaten by any on a fine scan", "[shares]") {
  // Independent of the chooser: 4001 shares by the network alone, for kinetics whose split is concave, hindered, and a plateau.
  for (const double order : {0.5, 1.0, 2.0}) {
    const Problem p = power_law({tank("A", 4), tube("B", 2), tank("C", 0.7)}, order);
    for (const std::string text : {"A beside B", "[A beside B] then C", "[A then C] beside B"}) {
      INFO(order << " " << text);
      const Hookup h = parsed(text, p.site);
      const double chosen = *rate_hookup(p, h, {.windows = false}).whole.conversion;
      Network network(p, h);
      double best = 0;
      for (int i = 1; i <= 4000; ++i) {
        const double s = i / 4001.0;
        const auto out = network.outlet(1, {s, 1 - s});
        REQUIRE(answer(out));
        best = std::max(best, p.duty.chemistry.kinetics.conversion(answer(out)->xi_mol_m3));
      }
      CHECK(chosen >= best - 1e-9);
      CHECK(chosen <= best + 1e-5);  // a scan at 1/4000 misses the top by no more
    }
  }
}

TEST_CASE("three branches: equal tubes get equal space times", "[shares]") {
  // Levenspiel, ch. 5 and 6: tubes beside each other do best at equal space time.
  const Problem p = power_law({tube("A", 0.5), tube("B", 1), tube("C", 1.5)}, 2);
  const auto rating = rate_hookup(p, parsed("A beside B beside C", p.site), {.windows = false});
  CHECK(*rating.whole.conversion == Approx(0.75).margin(1e-9));  // one tube of 3: X = Da/(1 + Da)
  CHECK(rating.shares[0] == Approx(1.0 / 6).margin(1e-4));
  CHECK(rating.shares[2] == Approx(0.5).margin(1e-4));
}

TEST_CASE("shares serve the end of the hookup, not the joint", "[shares]") {
  // A -> B -> C: the yield of B over-reacts in what follows; a scan over the split, judged at the end, is the yardstick.
  Problem p = problem_of({tank("A", 0.8), tank("B", 0.4), tank("C", 2)}, {1, 0, 0},
                         {reaction({{0, -1}, {1, 1}}, 1, {{0, 1}}), reaction({{1, -1}, {2, 1}}, 0.6, {{1, 1}})}, 1, 0.1);
  p.duty.target.demands.push_back({Demand::On::yield, 1, 0.2, true});
  const Hookup h = parsed("[A beside B] then C", p.site);
  const auto rating = rate_hookup(p, h, {.windows = false});
  Network network(p, h);
  double best = 0;
  for (int i = 1; i < 2000; ++i) {
    const double s = std::max(1e-4, std::min(1 - 1e-4, i / 2000.0));
    const auto out = network.outlet(1, {s, 1 - s});
    const auto& xi = answer(out)->xi_mol_m3;
    best = std::max(best, xi[0] - xi[1]);
  }
  REQUIRE(rating.whole.yields[0].second);
  CHECK(*rating.whole.yields[0].second >= best - 1e-9);
}

TEST_CASE("a feed line caps a share, and both lines cap the ceiling", "[shares]") {
  // By hand: first order tubes 3 beside 1, X wanted 0.5: alone they would go to (3 + 1)/ln 2 = 5.77 m3/s at equal space times. The first
  // line passes 1 m3/s: at 2 m3/s its share is at most 0.5, and more than that does not pay.
  Problem p = power_law({tube("A", 3), tube("B", 1)}, 1);
  p.site.vessels[0].feed_line_m3_s = 1;
  p.duty.target.feed_m3_s = 2;
  const auto rating = rate_hookup(p, parsed("A beside B", p.site), {});
  CHECK(rating.whole.verdict == Verdict::fits);
  CHECK(rating.shares[0] == Approx(0.5).margin(1e-8));
  // At the ceiling A passes 1 m3/s and converts 1 - exp(-3), B takes the rest q: 1 - exp(-3) + q (1 - exp(-1/q)) = 0.5 (1 + q),
  // solved apart from this program by bisection.
  const auto short_of = [](double q) { return 1 - std::exp(-3.0) + q * (1 - std::exp(-1 / q)) - 0.5 * (1 + q); };
  double lo = 1, hi = 20;
  for (int i = 0; i < 200; ++i) (short_of(0.5 * (lo + hi)) > 0 ? lo : hi) = 0.5 * (lo + hi);
  REQUIRE(rating.whole.windows);
  REQUIRE(rating.whole.windows->ceiling_m3_s);
  CHECK(*rating.whole.windows->ceiling_m3_s == Approx(1 + lo).epsilon(1e-6));
  CHECK(rating.whole.windows->ends.ceiling == "target");
  p.site.vessels[1].feed_line_m3_s = 0.8;
  const auto both = rate_hookup(p, parsed("A beside B", p.site), {});
  REQUIRE(both.whole.windows);
  REQUIRE(both.whole.windows->ceiling_m3_s);
  CHECK(*both.whole.windows->ceiling_m3_s == Approx(1.8).epsilon(1e-6));
  CHECK(both.whole.verdict == Verdict::does_not_fit);
}

TEST_CASE("the window of a train ends where the target is just met", "[window]") {
  // Closed form: two tanks of 1 m3, first order, X = 0.75: (1 + 1/q)^2 = 4, q = 1.
  const Problem p = power_law({tank("A", 1), tank("B", 1)}, 1, 0.75);
  const auto rating = rate_hookup(p, parsed("A then B", p.site), {});
  REQUIRE(rating.whole.windows);
  REQUIRE(rating.whole.windows->intervals.size() == 1);
  CHECK_FALSE(rating.whole.windows->floor_m3_s);
  CHECK(*rating.whole.windows->ceiling_m3_s == Approx(1).epsilon(1e-8));
  CHECK(rating.whole.windows->ends.ceiling == "target");
  CHECK(rating.whole.verdict == Verdict::fits);
}
