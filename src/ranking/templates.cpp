#include "templates.hpp"

#include <algorithm>
#include <iterator>

#include "vatwright/ranking/enumerate.hpp"

namespace vatwright {

const std::vector<Hookup>& Templates::of(const std::vector<int>& pattern) {
  const auto [it, is_new] = all_.try_emplace(pattern);
  if (is_new) it->second = hookups_of_classes(pattern);
  return it->second;
}

const std::vector<Hookup>& Templates::besides(const std::vector<int>& pattern) {
  const auto [it, is_new] = besides_.try_emplace(pattern);
  if (is_new)
    std::ranges::copy_if(of(pattern), std::back_inserter(it->second),
                         [](const Hookup& h) { return h.join == Hookup::Join::beside; });
  return it->second;
}

void Templates::make_besides_up_to(int vessels) {
  std::vector<int> pattern;
  for (; made_up_to_ < vessels; ++made_up_to_) make_besides(pattern, made_up_to_ + 1);
}

void Templates::make_besides(std::vector<int>& pattern, int left) {
  if (left == 0) {
    besides(pattern);
    return;
  }
  for (int n = 1; n <= left; ++n) {
    pattern.push_back(n);
    make_besides(pattern, left - n);
    pattern.pop_back();
  }
}

}  // namespace vatwright
