#include "splits.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <limits>

#include "roof.hpp"
#include "vatwright/hookup/share_space.hpp"

namespace vatwright {
namespace {

using Join = Hookup::Join;
using Out = Line::Out;

constexpr double infinite = std::numeric_limits<double>::infinity();
constexpr double hair = 1e-12;      // of a flow: within this of a feed line it passes
constexpr double rounding = 1e-10;  // of a flow: sums of feed lines and least flows may miss each other by so much
constexpr std::size_t most_trials = 240;
/// A cell bends as its ends say where it is this share of the whole range, and flows change by less than this factor.
constexpr double trusted = 1.0 / 100, octave = 1.25;
constexpr std::size_t most_branches = 8;

}  // namespace

/// One branch of a joint, or several single vessels that go as one.
struct Splits::Branch {
  const Hookup* hookup = nullptr;  // null: a group
  Line::OnLine group;
  std::array<std::size_t, most_branches> members{};  // places in the joint's parts
  std::size_t count = 1;
  double cap = infinite;
};

struct Splits::Joint {
  std::array<Branch, most_branches> branches;
  std::size_t count = 0;
  bool any_group = false, too_narrow = false;                      // too_narrow: the caps do not pass the flow
  double z_in = 0, least = 0;                                      // least: flow of a branch
  std::array<double, most_branches + 1> cap_from{}, least_from{};  // sums over the branches from here on
};

/// Both sides of a joint at one flow f of the first branch.
struct Splits::Trial {
  double f;
  Out first, rest;
  Side one, other;  // moles converted on either side, by f
  double value, slope;
};

double caps_pass(const Hookup& hookup, std::span<const Line::OnLine* const> vessels) {
  return most_flow(hookup, [&](int place) { return vessels[static_cast<std::size_t>(place)]->cap_m3_s; });
}

Out Splits::best(const Hookup& hookup, std::span<const Line::OnLine* const> vessels, double z_in, double feed_m3_s,
                 double need) {
  vessels_ = vessels;
  if (caps_pass(hookup, vessels_) < feed_m3_s * (1 - hair)) return {no_shares, 0, 0};
  return pass(hookup, z_in, feed_m3_s, need);
}

Out Splits::pass(const Hookup& hookup, double z_in, double q, double need) {
  if (hookup.join == Join::vessel) {
    ++maps_;
    return line_.out(vessel(hookup), z_in, q);
  }
  return hookup.join == Join::then ? along(hookup, z_in, q, need) : joint(hookup, z_in, q, need, nullptr);
}

Out Splits::along(const Hookup& hookup, double z_in, double q, double need) {
  Out whole{z_in, 1, 0};
  for (const Hookup& part : hookup.parts) {
    const bool last = &part == &hookup.parts.back();
    const Out out = pass(part, whole.z, q, last ? need : 0);
    if (!(out.z >= 0)) return out;
    whole = {out.z, out.dz_in * whole.dz_in, out.dz_in * whole.dq + out.dq};
  }
  return whole;
}

Out Splits::through(const Branch& branch, double z_in, double q, double need) {
  if (branch.hookup != nullptr) return pass(*branch.hookup, z_in, q, need);
  ++maps_;
  return line_.out(branch.group, z_in, q);
}

/// Whether two members go as one: single vessels of one kind and rate, of which outlets are concave in space time.
bool Splits::go_as_one(const Hookup& a, const Hookup& b) const {
  if (a.join != Join::vessel || b.join != Join::vessel) return false;
  const Line::OnLine &x = vessel(a), &y = vessel(b);
  if (x.track != y.track || x.is_tank != y.is_tank) return false;
  return x.is_tank ? line_.tanks_concave() : line_.falls();
}

Splits::Joint Splits::joint_of(const Hookup& hookup, double z_in, double q, bool grouped) const {
  Joint j;
  j.z_in = z_in;
  j.least = least_share * q;
  for (std::size_t i = 0; i < hookup.parts.size(); ++i) {
    const Hookup& part = hookup.parts[i];
    std::size_t at = grouped ? 0 : j.count;
    while (at < j.count && !go_as_one(hookup.parts[j.branches[at].members[0]], part)) ++at;
    Branch& b = j.branches[at];
    if (at == j.count) {
      ++j.count;
      b.hookup = &part;
      b.members[0] = i;
      b.cap = caps_pass(part, vessels_);
      continue;
    }
    if (b.hookup != nullptr) {  // the second: now it is a group
      b.group = vessel(*b.hookup);
      b.hookup = nullptr;
      j.any_group = true;
    }
    b.group.volume_m3 += vessel(part).volume_m3;
    b.members[b.count++] = i;
  }
  for (std::size_t at = 0; at < j.count; ++at) {
    Branch& b = j.branches[at];
    if (b.hookup != nullptr) continue;
    b.cap = infinite;
    for (std::size_t m = 0; m < b.count; ++m) {
      const Line::OnLine& one = vessel(hookup.parts[b.members[m]]);
      b.cap = std::min(b.cap, one.cap_m3_s * b.group.volume_m3 / one.volume_m3);
    }
  }
  for (std::size_t at = j.count; at-- > 0;) {
    const Branch& b = j.branches[at];
    const double least = j.least * static_cast<double>(b.count);
    j.cap_from[at] = j.cap_from[at + 1] + b.cap;
    j.least_from[at] = j.least_from[at + 1] + least;
    j.too_narrow = j.too_narrow || b.cap < least * (1 - hair);
  }
  j.too_narrow = j.too_narrow || j.cap_from[0] < q * (1 - hair);
  return j;
}

// With groups first; where a cap binds inside one, its members are split each for itself.
Out Splits::joint(const Hookup& hookup, double z_in, double q, double need, std::vector<double>* flows) {
  for (const bool grouped : {true, false}) {
    const Joint j = joint_of(hookup, z_in, q, grouped);
    if (j.too_narrow) continue;
    std::vector<double> of_branches;
    const Out out = split(j, 0, q, need, flows != nullptr || j.any_group ? &of_branches : nullptr);
    if (!(out.z >= 0)) return out;
    bool binds = false;
    for (std::size_t at = 0; at < of_branches.size(); ++at) {
      const Branch& b = j.branches[at];
      binds = binds || (b.hookup == nullptr && of_branches[at] >= b.cap * (1 - 1e-9));
    }
    if (binds) continue;
    if (flows == nullptr) return out;
    flows->assign(hookup.parts.size(), 0);
    for (std::size_t at = 0; at < j.count; ++at) {
      const Branch& b = j.branches[at];
      for (std::size_t m = 0; m < b.count; ++m) {
        const std::size_t i = b.members[m];
        const double share = b.hookup != nullptr ? 1 : vessel(hookup.parts[i]).volume_m3 / b.group.volume_m3;
        (*flows)[i] = of_branches[at] * share;
      }
    }
    return out;
  }
  return {no_shares, 0, 0};
}

Splits::Trial Splits::tried(const Joint& j, std::size_t from, double q, double f) {
  Trial t;
  t.f = f;
  t.first = through(j.branches[from], j.z_in, f, 0);
  t.rest = split(j, from + 1, q - f, 0, nullptr);
  const double made = t.first.z - j.z_in, made_of_rest = t.rest.z - j.z_in;
  t.one = {f * made, made + f * t.first.dq};
  t.other = {(q - f) * made_of_rest, -made_of_rest - (q - f) * t.rest.dq};
  t.value = t.one.value + t.other.value;
  t.slope = t.one.slope + t.other.slope;
  return t;
}

/// How what the branches from here on make bends in a cell. A single vessel tells it; of several in series or beside
/// each other it is what slopes say, where rates fall (they were concave throughout, see the tests) or the cell is
/// narrow.
int Splits::bend_of(const Joint& j, std::size_t from, std::size_t to, double z_lo, double z_hi, double slope_falls_by,
                    bool narrow) const {
  const Branch& b = j.branches[from];
  const bool single = to - from == 1 && (b.hookup == nullptr || b.hookup->join == Join::vessel);
  if (single) return line_.bends(b.hookup != nullptr ? vessel(*b.hookup) : b.group, j.z_in, z_lo, z_hi);
  if (!line_.falls() && !narrow) return 0;
  return slope_falls_by >= 0 ? -1 : 1;
}

Out Splits::split(const Joint& j, std::size_t from, double q, double need, std::vector<double>* flows) {
  if (from + 1 == j.count) {
    if (flows != nullptr) flows->push_back(q);
    return through(j.branches[from], j.z_in, q, need);
  }
  const double least = j.least * static_cast<double>(j.branches[from].count);
  const double at_cap_of_rest = q - j.cap_from[from + 1], at_least_of_rest = q - j.least_from[from + 1];
  double lo = std::max(least, at_cap_of_rest), hi = std::min(j.branches[from].cap, at_least_of_rest);
  if (lo > hi + rounding * q) return {no_shares, 0, 0};
  if (lo > hi) lo = hi = (lo + hi) / 2;

  std::array<Trial, most_trials> trials;   // rising f
  std::array<double, most_trials> bounds;  // of the cell after each
  std::size_t count = 0;
  const auto insert = [&](const Trial& t) {
    std::size_t at = count++;
    for (; at > 0 && trials[at - 1].f > t.f; --at) {
      trials[at] = trials[at - 1];
      bounds[at] = bounds[at - 1];
    }
    trials[at] = t;
    return at;
  };
  const auto bound_cell = [&](std::size_t i) {
    const Trial &a = trials[i], &b = trials[i + 1];
    const Roof falling = straight(a.f, b.f, a.f * (a.first.z - j.z_in), b.f * (a.first.z - j.z_in));
    const Roof rising = straight(a.f, b.f, (q - a.f) * (b.rest.z - j.z_in), (q - b.f) * (b.rest.z - j.z_in));
    const bool narrow = b.f - a.f <= trusted * (hi - lo);
    const bool for_one = narrow && b.f <= octave * a.f, for_other = narrow && q - a.f <= octave * (q - b.f);
    const int one_bends = bend_of(j, from, from + 1, b.first.z, a.first.z, a.one.slope - b.one.slope, for_one);
    const int other_bends = bend_of(j, from + 1, j.count, a.rest.z, b.rest.z, a.other.slope - b.other.slope, for_other);
    const Roof one = roof(a.f, b.f, a.one, b.one, falling, one_bends);
    const Roof other = roof(a.f, b.f, a.other, b.other, rising, other_bends);
    bounds[i] = -infinite;
    for (const double f : {a.f, one.ridge, other.ridge, b.f})
      bounds[i] = std::max(bounds[i], one.over(f) + other.over(f));
  };
  const double need_moles = (need - j.z_in) * q;

  static constexpr std::array<double, 7> many = {0, 0.06, 0.25, 0.5, 0.75, 0.94, 1};
  static constexpr std::array<double, 3> few = {0, 0.5, 1};  // where all is concave
  std::span<const double> starts = line_.tanks_concave() ? std::span<const double>(few) : many;
  if (hi - lo <= hair * q) starts = starts.first(1);
  std::size_t best = 0;
  for (std::size_t i = 0; i < starts.size(); ++i) {
    const Trial t = tried(j, from, q, lo + (hi - lo) * starts[i]);
    if (!std::isfinite(t.value)) return {std::numeric_limits<double>::quiet_NaN(), 0, 0};
    insert(t);
    if (trials[i].value > trials[best].value) best = i;
  }
  for (std::size_t i = 0; i + 1 < count; ++i) bound_cell(i);
  const double tolerance = tolerance_ * q;
  double gap = 0;
  bool halve = false;
  while (count > 1) {
    std::size_t top = 0;
    for (std::size_t i = 1; i + 1 < count; ++i)
      if (bounds[i] > bounds[top]) top = i;
    gap = bounds[top] - trials[best].value;
    if (gap <= tolerance) break;
    if (bounds[top] < need_moles) return {j.z_in + bounds[top] / q, 0, 0};
    const double a = trials[top].f, b = trials[top + 1].f, width = b - a;
    if (width <= hair * q || count == most_trials) break;
    double f = a + width / 2;
    if (!halve && trials[top].slope > 0 && trials[top + 1].slope < 0) {  // it peaks inside: secant of the slopes
      f = a + width * trials[top].slope / (trials[top].slope - trials[top + 1].slope);
      f = std::clamp(f, a + 1e-4 * width, b - 1e-4 * width);
    }
    const Trial t = tried(j, from, q, f);
    if (!std::isfinite(t.value)) return {std::numeric_limits<double>::quiet_NaN(), 0, 0};
    const std::size_t at = insert(t);
    halve = !halve && std::max(f - a, b - f) > 0.8 * width;
    if (best >= at) ++best;
    if (t.value > trials[best].value) best = at;
    bound_cell(at - 1);
    bound_cell(at);
  }
  if (gap > tolerance) gap_ = std::max(gap_, gap / q);

  const Trial& t = trials[best];
  if (flows != nullptr) {
    flows->push_back(t.f);
    split(j, from + 1, q - t.f, 0, flows);
  }
  const double w = t.f / q, z = w * t.first.z + (1 - w) * t.rest.z;
  // Where one more drop would go: to the branch that is free to take it.
  double worth = w * t.one.slope - (1 - w) * t.other.slope;
  const bool at_lo = t.f <= lo * (1 + hair), at_hi = t.f >= hi * (1 - hair);
  if (at_lo && t.slope < 0)
    worth = at_cap_of_rest >= least ? t.one.slope : from == 0 ? worth : -t.other.slope;
  else if (at_hi && t.slope > 0)
    worth = j.branches[from].cap <= at_least_of_rest ? -t.other.slope : from == 0 ? worth : t.one.slope;
  return {z, w * t.first.dz_in + (1 - w) * t.rest.dz_in, (worth - (z - j.z_in)) / q};
}

std::vector<double> Splits::shares(const Hookup& hookup, std::span<const Line::OnLine* const> vessels, double z_in,
                                   double feed_m3_s) {
  vessels_ = vessels;
  std::vector<double> told;
  tell(hookup, z_in, feed_m3_s, told);
  return told;
}

void Splits::tell(const Hookup& hookup, double z_in, double q, std::vector<double>& told) {
  if (hookup.join == Join::vessel) return;
  if (hookup.join == Join::then) {
    for (const Hookup& part : hookup.parts) {
      tell(part, z_in, q, told);
      z_in = pass(part, z_in, q, 0).z;
    }
    return;
  }
  std::vector<double> flows;
  joint(hookup, z_in, q, 0, &flows);
  for (std::size_t i = 0; i < hookup.parts.size(); ++i) {
    told.push_back(flows[i] / q);
    tell(hookup.parts[i], z_in, flows[i], told);
  }
}

}  // namespace vatwright
