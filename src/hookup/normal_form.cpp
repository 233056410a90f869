#include <algorithm>

#include "vatwright/error/expects.hpp"
#include "vatwright/hookup/expression.hpp"

namespace vatwright {
namespace {

using Join = Hookup::Join;

bool all_fixed(const Hookup& h) {
  return std::all_of(h.shares.begin(), h.shares.end(), [](const auto& s) { return s.has_value(); });
}
bool all_free(const Hookup& h) {
  return std::none_of(h.shares.begin(), h.shares.end(), [](const auto& s) { return s.has_value(); });
}
bool others_fixed(const Hookup& h, std::size_t i) {
  for (std::size_t k = 0; k < h.shares.size(); ++k) {
    if (k != i && !h.shares[k]) return false;
  }
  return true;
}

// A single free member takes what the fixed ones leave.
void fix_the_rest(Hookup& h) {
  if (std::count(h.shares.begin(), h.shares.end(), std::nullopt) != 1) return;
  double left = 1;
  for (const auto& share : h.shares) left -= share.value_or(0);
  for (auto& share : h.shares) share = share.value_or(left);
}

bool comes_apart(const Hookup& h, std::size_t i) {
  const Hookup& inner = h.parts[i];
  if (inner.join != Join::beside) return false;
  return h.shares[i] ? all_fixed(inner) || others_fixed(h, i) : all_free(inner);
}

void take_apart(Hookup& h, std::size_t i) {
  const Hookup inner = std::move(h.parts[i]);
  const std::optional<double> outer = h.shares[i];
  const auto at = static_cast<std::ptrdiff_t>(i);
  std::vector<std::optional<double>> shares = inner.shares;
  for (auto& share : shares) {
    if (share && outer) *share *= *outer;
  }
  h.parts.erase(h.parts.begin() + at);
  h.shares.erase(h.shares.begin() + at);
  h.parts.insert(h.parts.begin() + at, inner.parts.begin(), inner.parts.end());
  h.shares.insert(h.shares.begin() + at, shares.begin(), shares.end());
}

void flatten_beside(Hookup& h) {
  fix_the_rest(h);
  for (std::size_t i = 0; i < h.parts.size();) {
    if (comes_apart(h, i)) {
      take_apart(h, i);
      i = 0;  // a neighbour may come apart now
    } else {
      ++i;
    }
  }
  fix_the_rest(h);
}

void flatten_series(Hookup& h) {
  std::vector<Hookup> flat;
  for (Hookup& part : h.parts) {
    if (part.join == Join::then)
      std::move(part.parts.begin(), part.parts.end(), std::back_inserter(flat));
    else
      flat.push_back(std::move(part));
  }
  h.parts = std::move(flat);
}

Hookup fixed(const Hookup& h, const std::vector<double>& shares, std::size_t& next) {
  Hookup out = h;
  for (std::size_t i = 0; i < h.parts.size(); ++i) {
    if (h.join == Join::beside) out.shares[i] = shares[next++];
    out.parts[i] = fixed(h.parts[i], shares, next);
  }
  return out;
}

}  // namespace

Hookup normal_form(Hookup hookup) {
  if (hookup.join == Join::vessel) return hookup;
  for (Hookup& part : hookup.parts) part = normal_form(std::move(part));
  if (hookup.parts.size() == 1) {
    Hookup only = std::move(hookup.parts.front());
    return only;
  }
  if (hookup.join == Join::then)
    flatten_series(hookup);
  else
    flatten_beside(hookup);
  return hookup;
}

std::vector<int> vessels_of(const Hookup& hookup) {
  if (hookup.join == Join::vessel) return {hookup.vessel};
  std::vector<int> all;
  for (const Hookup& part : hookup.parts) {
    const auto some = vessels_of(part);
    all.insert(all.end(), some.begin(), some.end());
  }
  return all;
}

int share_count(const Hookup& hookup) {
  int n = hookup.join == Join::beside ? static_cast<int>(hookup.parts.size()) : 0;
  for (const Hookup& part : hookup.parts) n += share_count(part);
  return n;
}

int free_shares_of(const Hookup& hookup) {
  int n = 0;
  if (hookup.join == Join::beside) {
    const auto open = std::count(hookup.shares.begin(), hookup.shares.end(), std::nullopt);
    n = std::max(0, static_cast<int>(open) - 1);
  }
  for (const Hookup& part : hookup.parts) n += free_shares_of(part);
  return n;
}

Hookup with_shares(const Hookup& hookup, const std::vector<double>& shares) {
  VATWRIGHT_EXPECTS(static_cast<int>(shares.size()) == share_count(hookup));
  std::size_t next = 0;
  return normal_form(fixed(hookup, shares, next));
}

}  // namespace vatwright
