#include "vatwright/hookup/network.hpp"

#include <algorithm>
#include <numeric>

#include "vatwright/hookup/mix.hpp"

namespace vatwright {
namespace {

/// One vessel with what arrives at it, and the run made for that.
struct Leaf {
  Leaf(const Problem& problem, int index)
      : vessel(problem.site.vessels[static_cast<std::size_t>(index)]), operation(operation_of(problem, vessel)) {}
  const Vessel& vessel;
  Operation operation;
  Stream arrives;
  std::optional<VesselRun> run;

  VesselRun& run_for(const Stream& in, const Duty& duty) {
    const bool same = run && in.xi_mol_m3 == arrives.xi_mol_m3 && in.temperature_K == arrives.temperature_K &&
                      in.pressure_Pa == arrives.pressure_Pa;
    if (!same) {
      run.reset();  // it may still look at what arrived
      arrives = in;
      run.emplace(vessel, duty.chemistry, operation, duty.start, arrives);
    }
    return *run;
  }
};

NoAnswer nothing_arrives(const NoAnswer& before) {
  return {NoAnswer::Kind::cannot_tell, "nothing is known of what arrives: " + before.why};
}

Outcome<Stream> outlet_of(const Outcome<VesselOutcome>& outcome) {
  if (const auto* why = std::get_if<NoAnswer>(&outcome)) return *why;
  const auto& got = std::get<VesselOutcome>(outcome);
  if (got.cycle) return NoAnswer{NoAnswer::Kind::cannot_tell, "the start ends in a cycle, there is no steady outlet"};
  return got.outlet;
}

/// Jacketed vessels on one medium of which only the `total` is stated share it evenly.
void share_totals(std::vector<Leaf>& leaves) {
  const auto takes_of = [](const Utility* medium) {
    return [medium](const Leaf& leaf) {
      const Utility* own = leaf.operation.medium;
      return own != nullptr && own == medium && !own->flow_m3_s && own->total_m3_s;
    };
  };
  for (Leaf& leaf : leaves)
    if (takes_of(leaf.operation.medium)(leaf)) {
      const auto sharing = std::ranges::count_if(leaves, takes_of(leaf.operation.medium));
      leaf.operation.medium_flow_m3_s = *leaf.operation.medium->total_m3_s / static_cast<double>(sharing);
    }
}

}  // namespace

struct Network::Model {
  const Problem& problem;
  Hookup hookup;
  std::vector<int> vessels;
  std::vector<Leaf> leaves;
  std::vector<double> volumes;
  Stream feed;
};

// One walk over the tree: places and shares are counted in the order of the text.
struct Network::Walk {
  Model& m;
  const std::vector<double>& shares;
  Detail detail;
  std::vector<VesselPass>* passes;  // null: only the outlet is wanted
  std::size_t next_share = 0, next_leaf = 0;

  Outcome<Stream> pass(const Hookup& h, const Outcome<Stream>& in, double q, bool first) {
    if (h.join == Hookup::Join::vessel) return through(in, q, first);
    return h.join == Hookup::Join::then ? along(h, in, q, first) : split(h, in, q, first);
  }

  Outcome<Stream> along(const Hookup& h, const Outcome<Stream>& in, double q, bool first) {
    Outcome<Stream> now = in;
    for (const Hookup& part : h.parts) {
      now = pass(part, now, q, first);
      first = false;
    }
    return now;
  }

  Outcome<Stream> split(const Hookup& h, const Outcome<Stream>& in, double q, bool first) {
    std::vector<Stream> branches;
    std::optional<NoAnswer> failed;
    for (const Hookup& part : h.parts) {
      const double share = shares[next_share++];
      auto out = pass(part, in, q * share, first);
      if (auto* why = std::get_if<NoAnswer>(&out)) {
        if (!failed) failed = *why;
      } else {
        branches.push_back(std::move(std::get<Stream>(out)));
      }
    }
    if (failed) return *failed;
    return mix(m.problem.duty.chemistry, branches);
  }

  Outcome<Stream> through(const Outcome<Stream>& in, double q, bool first) {
    Leaf& leaf = m.leaves[next_leaf++];
    const Stream* arrives = std::get_if<Stream>(&in);
    if (!arrives) {
      const auto& before = std::get<NoAnswer>(in);
      if (passes) passes->push_back({q, 0, std::nullopt, nothing_arrives(before)});
      return before;
    }
    Stream entering = *arrives;
    if (first)
      entering.pressure_Pa = leaf.operation.pressure_Pa.value_or(entering.pressure_Pa);  // fed at its own pressure
    auto outcome = leaf.run_for(entering, m.problem.duty).at(q, detail);
    auto out = outlet_of(outcome);
    if (auto* stream = std::get_if<Stream>(&out)) stream->feed_m3_s = q;
    if (passes) {
      const auto from = first ? std::nullopt : std::optional(arrives->pressure_Pa);
      passes->push_back({q, arrives->temperature_K, from, std::move(outcome)});
    }
    return out;
  }
};

Network::Network(const Problem& problem, const Hookup& hookup)
    : model_(std::make_unique<Model>(Model{problem, hookup, vessels_of(hookup), {}, {}, whole_feed(problem.duty)})) {
  for (const int v : model_->vessels) {
    model_->leaves.emplace_back(problem, v);
    const bool gas = problem.duty.chemistry.feed.phase == Phase::gas;
    const Leaf& leaf = model_->leaves.back();
    model_->volumes.push_back(fluid_volume(leaf.vessel.kind, gas ? 1 : leaf.operation.fill));
  }
  share_totals(model_->leaves);
}
Network::~Network() = default;
Network::Network(Network&&) noexcept = default;
Network& Network::operator=(Network&&) noexcept = default;

NetworkOutcome Network::at(double feed_m3_s, const std::vector<double>& shares, Detail detail) {
  NetworkOutcome out;
  out.vessels.reserve(model_->leaves.size());
  Walk walk{*model_, shares, detail, &out.vessels};
  out.outlet = walk.pass(model_->hookup, model_->feed, feed_m3_s, true);
  return out;
}

Outcome<Stream> Network::outlet(double feed_m3_s, const std::vector<double>& shares) {
  Walk walk{*model_, shares, Detail::map, nullptr};
  return walk.pass(model_->hookup, model_->feed, feed_m3_s, true);
}

const Hookup& Network::hookup() const { return model_->hookup; }
const std::vector<int>& Network::vessels() const { return model_->vessels; }
const Operation& Network::operation(std::size_t place) const { return model_->leaves[place].operation; }
const std::vector<double>& Network::volumes() const { return model_->volumes; }

std::pair<double, double> search_range(const Network& network) {
  return search_range(std::accumulate(network.volumes().begin(), network.volumes().end(), 0.0));
}

}  // namespace vatwright
