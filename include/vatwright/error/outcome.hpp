#pragma once
#include <string>
#include <variant>

namespace vatwright {

/// Why a calculation gave no answer. It is a result, not an exception: whatever else was asked is still answered.
struct NoAnswer {
  enum class Kind {
    cannot_tell,    ///< data are missing, or the model says nothing there (verdict cannot-tell, exit status untouched)
    does_not_pass,  ///< it can not be done (a tube whose pressure is used up: verdict does-not-fit)
    unsolved        ///< the numerics failed or the residual is too large (verdict cannot-tell, exit status 3)
  };
  Kind kind = Kind::unsolved;
  std::string why;  ///< in words, lower case, without a full stop
};

/// A value, or why there is none.
template <class T>
using Outcome = std::variant<T, NoAnswer>;

template <class T>
[[nodiscard]] const T* answer(const Outcome<T>& outcome) { return std::get_if<T>(&outcome); }
template <class T>
[[nodiscard]] T* answer(Outcome<T>& outcome) { return std::get_if<T>(&outcome); }

}  // namespace vatwright
