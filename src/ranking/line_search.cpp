#include "line_search.hpp"

#include <algorithm>
#include <cmath>

#include "vatwright/numeric/pool.hpp"
#include "vatwright/ranking/enumerate.hpp"

namespace vatwright {
namespace {

using Join = Hookup::Join;

using Pattern = std::vector<int>;

}  // namespace

void LineSearch::Cost::add(const Cost& other) {
  rated += other.rated;
  maps += other.maps;
  bounds += other.bounds;
  gap = std::max(gap, other.gap);
  failed = failed || other.failed;
}

/// A class with what one of its vessels counts in the bound.
struct LineSearch::Sized {
  std::size_t place = 0;  // in twins.classes()
  const Line::OnLine* on_line = nullptr;
  double e_m3 = 0;
  int count = 0;
};

// No vessel is fed at more than all others together reach: what tanks count with at such inlets bounds that again.
std::vector<LineSearch::Sized> LineSearch::sized(double feed_m3_s, int most) const {
  std::vector<Sized> all;
  for (const std::size_t c : classes_)
    all.push_back({c, &*line_.vessels()[c], 0, static_cast<int>(twins_.classes()[c].size())});
  double z_most = 1;
  for (int turn = 0; turn < 4; ++turn) {
    for (Sized& s : all) s.e_m3 = bound_.equivalent_m3(*s.on_line, feed_m3_s, z_most);
    std::ranges::stable_sort(all, [](const Sized& a, const Sized& b) { return a.e_m3 > b.e_m3; });
    double others = 0;
    int left = most - 1;
    for (const Sized& s : all) {
      const int n = std::min(left, s.count);
      others += n * s.e_m3;
      left -= n;
    }
    z_most = bound_.reached(others / feed_m3_s);
    if (!bound_.tanks_sharpen()) break;
  }
  return all;
}

/// One walk through the space from given first members on; for one thread.
class LineSearch::Walk {
 public:
  Walk(const LineSearch& search, const std::vector<Sized>& sized, double feed_m3_s, int fewest, int most,
       double tolerance, Wanted& wanted)
      : search_(search),
        sized_(sized),
        q_(feed_m3_s),
        fewest_(fewest),
        most_(most),
        most_members_(most),
        splits_(search.line_, tolerance),
        wanted_(wanted),
        pad_(tolerance * most),
        pass_m3_s_(std::max(feed_m3_s, search.least_pass_m3_s_)),
        left_(sized.size()) {
    for (std::size_t i = 0; i < sized.size(); ++i) left_[i] = sized[i].count;
  }

  /// No besides.
  void trains_only() { most_members_ = 1; }
  /// All hookups whose first member has `members` vessels, the largest of them the class `first`.
  void run(int members, std::size_t first) {
    taken_.clear();
    if (left_[first] == 0) return;
    take(first);
    choose(members, 1, first, sized_[first].e_m3);
    put_back(first);
  }
  [[nodiscard]] Cost cost() const {
    Cost c = cost_;
    c.maps = splits_.maps();
    c.gap = splits_.gap() * most_;
    return c;
  }

 private:
  struct Member {
    const Hookup* beside = nullptr;    // null: a vessel
    std::vector<std::size_t> classes;  // of its leaves, in the order of places
  };

  void take(std::size_t i) {
    taken_.push_back(i);
    --left_[i];
    ++used_;
  }
  void put_back(std::size_t i) {
    taken_.pop_back();
    ++left_[i];
    --used_;
  }

  /// The most that `n` vessels still free count together, m3.
  [[nodiscard]] double largest_left(int n) const {
    double sum = 0;
    for (std::size_t i = 0; i < left_.size() && n > 0; ++i) {
      const int k = std::min(n, left_[i]);
      sum += k * sized_[i].e_m3;
      n -= k;
    }
    return sum;
  }

  /// Whether what begins with z and these further m3 may still matter.
  bool may_matter(double z, double e_m3) {
    ++cost_.bounds;
    const double floor = wanted_.floor(std::max(fewest_, used_), most_);
    if (!(floor > z)) return true;
    return !(search_.bound_.time(z + pad_) + e_m3 / q_ < floor_time(floor));
  }
  double floor_time(double floor) {
    if (floor != floor_) {
      floor_ = floor;
      floor_time_ = search_.bound_.time(floor * (1 - 1e-10)) * (1 - 1e-9);
    }
    return floor_time_;
  }

  /// Chooses the rest of one member's vessels, in falling size, then joins them in every way.
  void choose(int members, int chosen, std::size_t from, double e_m3) {
    const double others = largest_left(most_ - used_ - (members - chosen));
    if (chosen == members) {
      if (may_matter(z_, e_m3 + others)) join();
      return;
    }
    for (std::size_t i = from; i < sized_.size(); ++i) {
      if (left_[i] == 0) continue;
      if (!may_matter(z_, e_m3 + (members - chosen) * sized_[i].e_m3 + others)) return;
      take(i);
      choose(members, chosen + 1, i, e_m3 + sized_[i].e_m3);
      put_back(i);
    }
  }

  /// The vessels taken last become one member of the train, where together they pass the feed.
  void join() {
    double passes = 0;
    for (const std::size_t i : taken_) passes += sized_[i].on_line->cap_m3_s;
    if (passes < pass_m3_s_ * (1 - 1e-9)) return;
    const std::vector<std::size_t> classes = taken_;
    const double floor = wanted_.floor(std::max(fewest_, used_), most_);
    const double t = floor_time(floor) - largest_left(most_ - used_) / q_;
    const double need = floor > 0 && t > 0 ? search_.bound_.reached(t) - pad_ : 0;
    std::vector<const Line::OnLine*> vessels;
    std::vector<int> first_of_class;
    Pattern pattern;
    for (std::size_t k = 0; k < classes.size(); ++k) {
      vessels.push_back(sized_[classes[k]].on_line);
      first_of_class.push_back(search_.twins_.classes()[class_of(classes[k])].front());
      if (k > 0 && classes[k] == classes[k - 1])
        ++pattern.back();
      else
        pattern.push_back(1);
    }
    if (classes.size() == 1) {
      if (follows_in_order(classes[0]))
        follow(Member{nullptr, classes}, Hookup{Join::vessel, 0, {}, {}}, vessels, 0, need);
      return;
    }
    for (const Hookup& beside : search_.templates_->known_besides(pattern))
      if (search_.twins_.is_shown(beside, first_of_class))
        follow(Member{&beside, classes}, beside, vessels, free_shares_of(beside), need);
  }
  [[nodiscard]] std::size_t class_of(std::size_t i) const { return sized_[i].place; }

  /// Neighbouring vessels that can change places stand by class.
  [[nodiscard]] bool follows_in_order(std::size_t i) const {
    if (members_.empty() || members_.back().beside != nullptr) return true;
    const std::size_t before = class_of(members_.back().classes[0]), now = class_of(i);
    const auto& classes = search_.twins_.classes();
    return before <= now || !search_.twins_.exchange_in_series(classes[before].front(), classes[now].front());
  }

  void follow(Member member, const Hookup& hookup, std::span<const Line::OnLine* const> vessels, int free_shares,
              double need) {
    const double before = z_;
    const Line::Out out = splits_.best(hookup, vessels, z_, q_, need);
    ++cost_.rated;
    if (!std::isfinite(out.z)) {
      cost_.failed = true;
      return;
    }
    if (out.z < need || out.z == Splits::no_shares) return;
    z_ = out.z;
    free_ += free_shares;
    members_.push_back(std::move(member));
    const std::vector<std::size_t> own = std::move(taken_);
    taken_.clear();
    if (used_ >= fewest_ && z_ >= wanted_.floor(used_, used_)) wanted_.found({built(), z_, used_, free_}, splits_);
    for (int m = 1; m <= std::min(most_members_, most_ - used_); ++m) choose(m, 0, 0, 0);
    taken_ = own;
    members_.pop_back();
    free_ -= free_shares;
    z_ = before;
  }

  [[nodiscard]] Hookup built() const {
    std::vector<std::size_t> next(sized_.size(), 0);
    const auto vessel_of = [&](std::size_t i) { return search_.twins_.classes()[class_of(i)][next[i]++]; };
    std::vector<Hookup> parts;
    for (const Member& member : members_) {
      if (member.beside == nullptr) {
        parts.push_back({Join::vessel, vessel_of(member.classes[0]), {}, {}});
      } else {
        std::vector<int> to;
        for (const std::size_t i : member.classes) to.push_back(vessel_of(i));
        parts.push_back(sorted_members(relabelled(*member.beside, to)));
      }
    }
    if (parts.size() == 1) return parts[0];
    return {Join::then, -1, std::move(parts), {}};
  }

  const LineSearch& search_;
  const std::vector<Sized>& sized_;
  double q_;
  int fewest_, most_, most_members_;
  Splits splits_;
  Wanted& wanted_;
  double pad_;  // what the joints before may have missed
  double pass_m3_s_;
  Cost cost_;
  std::vector<int> left_;
  std::vector<std::size_t> taken_;  // by the member being chosen
  std::vector<Member> members_;
  int used_ = 0, free_ = 0;
  double z_ = 0, floor_ = -1, floor_time_ = 0;
};

LineSearch::LineSearch(const Line& line, const Bound& bound, const Twins& twins, std::vector<std::size_t> classes,
                       double least_pass_m3_s)
    : line_(line),
      bound_(bound),
      twins_(twins),
      classes_(std::move(classes)),
      least_pass_m3_s_(least_pass_m3_s),
      templates_(new Templates) {}
LineSearch::~LineSearch() = default;

LineSearch::Cost LineSearch::run(double feed_m3_s, int fewest, int most, double tolerance, int threads,
                                 Wanted& wanted) const {
  templates_->make_besides_up_to(most);
  const std::vector<Sized> all = sized(feed_m3_s, most);
  struct Task {
    int members;
    std::size_t first;
  };
  std::vector<Task> tasks;
  for (int m = 1; m <= most; ++m)
    for (std::size_t i = 0; i < all.size(); ++i) tasks.push_back({m, i});
  std::vector<std::unique_ptr<Wanted>> parts(tasks.size());
  std::vector<Cost> costs(tasks.size());
  for_each_index(tasks.size(), threads, [&](std::size_t i) {
    parts[i] = wanted.part();
    Walk walk(*this, all, feed_m3_s, fewest, most, tolerance, *parts[i]);
    walk.run(tasks[i].members, tasks[i].first);
    costs[i] = walk.cost();
  });
  Cost total;
  for (std::size_t i = 0; i < tasks.size(); ++i) {
    wanted.take(*parts[i]);
    total.add(costs[i]);
  }
  return total;
}

LineSearch::Cost LineSearch::run_among(std::size_t largest, Members members, double feed_m3_s, int fewest, int most,
                                       double tolerance, Wanted& wanted) const {
  templates_->make_besides_up_to(most);
  std::vector<Sized> all = sized(feed_m3_s, most);
  if (all.size() > largest) all.resize(largest);
  Walk walk(*this, all, feed_m3_s, fewest, most, tolerance, wanted);
  if (members == Members::vessels) walk.trains_only();
  for (int m = 1; m <= (members == Members::vessels ? 1 : most); ++m)
    for (std::size_t i = 0; i < all.size(); ++i) walk.run(m, i);
  return walk.cost();
}

}  // namespace vatwright
