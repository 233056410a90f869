#include <numeric>
#include <set>

#include "hookup/site.hpp"
#include "support/catch.hpp"
#include "vatwright/ranking/enumerate.hpp"

using namespace vatwright;
using namespace vatwright::test;

namespace {
std::vector<int> first(int n) {
  std::vector<int> v(static_cast<std::size_t>(n));
  std::iota(v.begin(), v.end(), 0);
  return v;
}
}  // namespace

TEST_CASE("labelled hookups are counted as the series-parallel posets are", "[enumerate]") {
  // OEIS A048172; R. P. Stanley, Proc. Amer. Math. Soc. 45 (1974) 295; Enumerative Combinatorics 2, Problem 5.39
  const std::vector<long long> all = {1, 3, 19, 195, 2791, 51303, 1152019, 30564075, 935494831, 32447734143};
  for (int n = 1; n <= 10; ++n) CHECK(count_hookups(n) == all[static_cast<std::size_t>(n - 1)]);
  // OEIS A058349 (headed by a series) and A048174 (headed by a beside)
  const std::vector<long long> series = {2, 12, 122, 1740, 31922, 715932, 18978122};
  const std::vector<long long> beside = {1, 7, 73, 1051, 19381, 436087, 11585953};
  for (int n = 2; n <= 8; ++n) {
    CHECK(count_series(n) == series[static_cast<std::size_t>(n - 2)]);
    CHECK(*count_hookups(n) - *count_series(n) == beside[static_cast<std::size_t>(n - 2)]);
  }
  // sum of C(n, k) a(k), own sum of the published a(k)
  const std::vector<long long> subsets = {1, 5, 31, 293, 3991, 71405, 1577311, 41387813};
  for (int n = 1; n <= 8; ++n) CHECK(count_hookups_up_to(n, n) == subsets[static_cast<std::size_t>(n - 1)]);
  CHECK_FALSE(count_hookups(30));
  CHECK_FALSE(count_hookups_up_to(100, 30));
}

TEST_CASE("every labelled hookup is listed once", "[enumerate]") {
  Site site;
  for (int i = 0; i < 6; ++i) site.vessels.push_back(tank("V" + std::to_string(i), 1));
  for (int n = 1; n <= 6; ++n) {
    std::set<std::string> texts;
    long long series = 0;
    const auto all = hookups_of(first(n));
    for (const Hookup& h : all) {
      texts.insert(to_text(h, site, {}));
      series += h.join == Hookup::Join::then ? 1 : 0;
      CHECK(normal_form(h) == h);
      CHECK(sorted_members(h) == h);
    }
    CHECK(static_cast<long long>(all.size()) == count_hookups(n));
    CHECK(texts.size() == all.size());
    if (n > 1) CHECK(series == count_series(n));
  }
}

TEST_CASE("equal vessels leave as many hookups as there are unlabelled ones", "[enumerate]") {
  // OEIS A003430, unlabelled series-parallel posets
  const std::vector<std::size_t> all = {1, 2, 5, 15, 48, 167};
  for (int n = 1; n <= 6; ++n) CHECK(hookups_of_classes({n}).size() == all[static_cast<std::size_t>(n - 1)]);
  for (int n = 1; n <= 5; ++n) {
    const std::vector<int> differ(static_cast<std::size_t>(n), 1);
    CHECK(static_cast<long long>(hookups_of_classes(differ).size()) == count_hookups(n));
  }
}

TEST_CASE("two equals among others: orbits counted by Burnside's lemma", "[enumerate]") {
  // The hookups fixed by exchanging vessels 0 and 1 are counted on the full list: orbits = (all + fixed)/2.
  for (int n = 2; n <= 5; ++n) {
    const auto all = hookups_of(first(n));
    auto swapped = first(n);
    std::swap(swapped[0], swapped[1]);
    std::size_t fixed = 0;
    for (const Hookup& h : all) fixed += sorted_members(relabelled(h, swapped)) == h ? 1u : 0u;
    std::vector<int> counts(static_cast<std::size_t>(n - 1), 1);
    counts[0] = 2;
    CHECK(hookups_of_classes(counts).size() == (all.size() + fixed) / 2);
  }
}
