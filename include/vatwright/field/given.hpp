#pragma once
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "vatwright/error/diagnostic.hpp"
#include "vatwright/quantity/quantity.hpp"

namespace vatwright {

/// What a file says under one key, with the place of the value. `written` without a value: it stood there and was
/// wrong, which has been told already.
template <class T>
struct Given {
  std::optional<T> value;
  Place place;
  bool written = false;

  explicit operator bool() const { return value.has_value(); }
  const T& operator*() const { return *value; }
  const T* operator->() const { return &*value; }
};

/// A number with a unit whose dimension can only be judged beside other keys (a rate constant), and as it was written.
struct Raw {
  Quantity quantity;
  std::string text;
  Place place;
};

/// An entry of a table whose keys are names: of species, utilities, cases.
template <class T>
struct Named {
  std::string name;
  Place name_place;
  T value;
  Place place;
};
template <class T>
using ByName = std::vector<Named<T>>;

/// Two ends of a range, the lower one left out where a single figure was written.
struct Bounds {
  std::optional<double> lo;
  double hi = 0;
};

/// Half-width of a 95 % interval on a key: `key` is its full path, "reaction.acylation.rate.k".
/// relative: a fraction, log-normal; otherwise SI, normal.
struct FoundSpread {
  std::string key;
  bool relative = true;
  double half_width = 0;
};

}  // namespace vatwright
