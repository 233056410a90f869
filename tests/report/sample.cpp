#include "sample.hpp"

using namespace vatwright;

Head sample_head() {
  Head head;
  head.made_by = {"1.2.3", "aa11", "bb22"};
  head.site = "East bay";
  head.duty = "Trial";
  head.conversion_of = "A";
  head.species = {"A", "B", "C"};
  head.feed_m3_s = 0.001;
  head.feed_mol_s = 7.1;
  head.target = {"conversion of A at least 90 %"};
  head.conversion_asked = 0.9;
  head.assumed = {{"operation.pressure", "1.013 bar", "not given"}};
  head.not_asked = {"decomposition"};
  head.cautions = {{"screening", "Screening is not design."}};
  return head;
}

Rating sample_tank() {
  Rating tank;
  tank.tag = "K-1";
  tank.kind = "stirred-tank";
  tank.verdict = Verdict::fits;
  tank.conversion = 0.95;
  tank.yields = {{"C", 0.9}};
  tank.outlet = Stream{0.001, {3040}, 343.15, 4e5};
  tank.outlet_mol_s = {{"A", 0.16}, {"B", -0.0}, {"C", 3.04}};
  tank.hottest_K = 343.15;
  tank.cooling_W = -1500;
  tank.medium = "tower-water";
  tank.steady_states = std::vector<SteadyState>{{{3040}, 0.95, 343.15, true, true}};
  tank.states_complete = true;
  tank.windows = Windows{};
  tank.windows->intervals = {{{}, 0.0005}, {0.0008, 0.002}};
  tank.windows->ceiling_m3_s = 0.002;
  tank.windows->floor_m3_s = 0.0008;
  tank.windows->ends = {"target", "heat removal"};
  Limit fill;
  fill.name = "fill";
  fill.value = 0.8;
  fill.bound = 0.85;
  fill.unit = "1";
  fill.margin = 0.0588;
  tank.limits = {fill};
  tank.residual = 1e-13;
  tank.cautions = {{"near-fold", "The state jumps nearby."}};
  return tank;
}

Rating sample_tube() {
  Rating tube;
  tube.tag = "P-2";
  tube.kind = "tube";
  tube.verdict = Verdict::does_not_fit;
  tube.stands_in_the_way = {"wetted material: copper is not on the product's list",
                            "conversion of A 40 %, at least 90 % is asked"};
  tube.conversion = 0.4;
  tube.yields = {{"C", std::nullopt}};
  tube.outlet = Stream{0.001, {1280}, 343.15, 3.5e5};
  tube.outlet_mol_s = {{"A", 1.92}, {"B", 0.5}, {"C", 1.28}};
  tube.hottest_K = 343.15;
  tube.preheat_W = 2000;
  tube.windows = Windows{};
  Limit wetted;
  wetted.name = "wetted material";
  wetted.state = Limit::State::broken;
  tube.limits = {wetted};
  tube.residual = 0;
  tube.profile = Profile{{0, 1}, {0, 0.1}, {0, 0.4}, {343.15, 343.15}, {4e5, 3.5e5}, {std::nullopt, 300.0}, {}};
  return tube;
}

Rating sample_unrated() {
  Rating packed;
  packed.tag = "B-3";
  packed.kind = "packed-tube";
  packed.verdict = Verdict::cannot_tell;
  packed.stands_in_the_way = {"per is not said for the reaction"};
  return packed;
}

ScreenAnswer sample_screen() { return {{sample_head(), {sample_tank(), sample_tube(), sample_unrated()}}, {}}; }

ExamineAnswer sample_examine() {
  ExamineAnswer answer;
  answer.head = sample_head();
  HookupRating& rating = answer.rating;
  rating.text = "[40% K-1 beside 60% P-2]";
  rating.vessel_count = 2;
  rating.whole = sample_tank();
  rating.whole.tag = rating.whole.kind = "";
  rating.whole.medium.reset();
  rating.whole.steady_states.reset();
  rating.whole.limits.clear();
  rating.whole.cautions = {{"screening", "Screening is not design."}, {"share-at-edge", "A share is at its edge."}};
  rating.vessels = {sample_tank(), sample_tube()};
  for (Rating& vessel : rating.vessels) vessel.windows.reset();
  rating.vessels[0].feed_fraction = 0.4;
  rating.vessels[1].feed_fraction = 0.6;
  return answer;
}

RankAnswer sample_rank() {
  RankAnswer answer;
  answer.head = sample_head();
  Ranking& ranking = answer.ranking;
  Ranked first;
  first.rating.text = "K-1 then P-2";
  first.rating.vessel_count = 2;
  first.rating.whole = sample_tank();
  first.value = 0.002;
  first.same_as = {"P-2 then K-1"};
  Ranked second;
  second.rating.text = "P-2";
  second.rating.vessel_count = 1;
  second.rating.whole = sample_tube();
  ranking.top = {first, second};
  ranking.stair = {{1, "P-2", 0.0005}, {2, "K-1 then P-2", 0.002}};
  ranking.offered = 2;
  ranking.most = 3;
  ranking.hookups = 5;
  ranking.rated = 4;
  ranking.complete = "visited";
  return answer;
}
