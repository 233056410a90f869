#pragma once
#include <string>
#include <utility>
#include <vector>

#include "vatwright/field/scope.hpp"
#include "vatwright/rating/duty.hpp"

namespace vatwright {

/// What everyone who turns drafts into the model tells his findings to.
struct Builder {
  Diagnostics* diagnostics;
  std::vector<Assumed>* assumed;

  /// For messages about one subject: "K-201", "feed".
  [[nodiscard]] Scope about(std::string subject) const {
    Scope scope;
    scope.diagnostics = diagnostics;
    scope.subject = std::move(subject);
    return scope;
  }
  void assume(std::string key, std::string value, std::string why) const {
    assumed->push_back({std::move(key), std::move(value), std::move(why)});
  }
};

}  // namespace vatwright
