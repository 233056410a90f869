#include "like.hpp"

#include <map>
#include <set>
#include <string>
#include <vector>

#include "vatwright/field/merge.hpp"
#include "vatwright/field/scope.hpp"

namespace vatwright {
namespace {

const std::string* text_at(const Table& table, std::string_view key) {
  const Node* node = table.find(key);
  return node ? node->text() : nullptr;
}

class Resolver {
 public:
  Resolver(Array& vessels, Diagnostics& diagnostics) : vessels_(vessels), diagnostics_(diagnostics) {
    for (std::size_t i = 0; i < vessels_.items.size(); ++i)
      if (const Table* t = vessels_.items[i].table())
        if (const std::string* tag = text_at(*t, "tag")) by_tag_.try_emplace(*tag, i), tags_.push_back(*tag);
    states_.assign(vessels_.items.size(), State::untouched);
  }

  void run() {
    for (std::size_t i = 0; i < vessels_.items.size(); ++i) follow(i);
    drop_circles();
  }

 private:
  enum class State { untouched, under_way, done };

  /// Walks the chain of likes from i down to its end, then merges on the way back; no recursion, chains may be long.
  void follow(std::size_t i) {
    std::vector<std::size_t> chain;
    for (std::optional<std::size_t> next = i; next && states_[*next] == State::untouched; next = base_of(*next)) {
      states_[*next] = State::under_way;
      chain.push_back(*next);
    }
    for (auto it = chain.rbegin(); it != chain.rend(); ++it) {
      const auto base = base_of(*it);
      if (base && states_[*base] == State::under_way)
        tell_circle(*it);
      else if (base)
        merge(*it, *base);
      tell_unknown(*it);
      states_[*it] = State::done;
    }
  }

  std::optional<std::size_t> base_of(std::size_t i) const {
    const Table* t = vessels_.items[i].table();
    const std::string* like = t ? text_at(*t, "like") : nullptr;
    const auto found = like ? by_tag_.find(*like) : by_tag_.end();
    return found == by_tag_.end() ? std::nullopt : std::optional(found->second);
  }

  std::string tag(std::size_t i) const {
    const std::string* tag = text_at(*vessels_.items[i].table(), "tag");
    return tag ? *tag : "vessel " + std::to_string(i + 1);
  }
  Place like_place(std::size_t i) const { return vessels_.items[i].table()->find("like")->place; }

  void tell_unknown(std::size_t i) {
    const Table* t = vessels_.items[i].table();
    const std::string* like = t ? text_at(*t, "like") : nullptr;
    if (like && !by_tag_.count(*like))
      diagnostics_.error(like_place(i), tag(i), "like", "no vessel " + quoted(*like), hint(*like, tags_));
  }

  /// A vessel whose likes go round and that has no kind of its own lacks all it needs: told once is enough.
  void drop_circles() {
    for (auto it = circles_.rbegin(); it != circles_.rend(); ++it)
      if (!vessels_.items[*it].table()->find("kind"))
        vessels_.items.erase(vessels_.items.begin() + static_cast<std::ptrdiff_t>(*it));
  }

  void tell_circle(std::size_t i) {
    circles_.insert(i);
    std::string round = tag(i);
    std::size_t at = i;
    for (int step = 0; step < 6; ++step) {
      at = *base_of(at);
      round += " like " + tag(at);
      if (at == i) break;
    }
    if (at != i) round += " ..";
    diagnostics_.error(like_place(i), tag(i), "like", round + " goes round in a circle",
                       "expected a vessel that has its own keys at the end");
  }

  void merge(std::size_t i, std::size_t base) {
    Table& own = *vessels_.items[i].table();
    Table whole = *vessels_.items[base].table();
    for (const std::string_view key : {"tag", "note", "source", "like"}) remove_key(whole, key);
    const std::string *kind = text_at(own, "kind"), *its = text_at(whole, "kind");
    if (kind && its && *kind != *its)
      return diagnostics_.error(own.find("kind")->place, tag(i), "kind",
                                "found " + quoted(*kind) + ", but " + tag(base) + " is a " + *its,
                                "expected the same kind where one vessel is like another");
    merge_into(whole, own);
    own = std::move(whole);
  }

  Array& vessels_;
  Diagnostics& diagnostics_;
  std::map<std::string, std::size_t> by_tag_;
  std::vector<std::string> tags_;
  std::set<std::size_t> circles_;
  std::vector<State> states_;
};

}  // namespace

void resolve_likes(Table& inventory, Diagnostics& diagnostics) {
  Node* vessels = inventory.find("vessel");
  if (Array* array = vessels ? std::get_if<Array>(&vessels->value) : nullptr) Resolver(*array, diagnostics).run();
}

}  // namespace vatwright
