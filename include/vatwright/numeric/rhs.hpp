#pragma once
#include <functional>
#include <memory>
#include <span>
#include <type_traits>

namespace vatwright {

/// A reference to a callable R(Args..): type erasure without allocation, so that the solvers compile once. It must not
/// outlive the callable.
template <class Signature>
class FunctionRef;
template <class R, class... Args>
class FunctionRef<R(Args...)> {
 public:
  template <class F>
  requires(!std::is_same_v<std::remove_cvref_t<F>, FunctionRef> && std::is_invocable_r_v<R, F&, Args...>)
      FunctionRef(F&& f)  // NOLINT(google-explicit-constructor): passes like a reference
      : object_(const_cast<void*>(static_cast<const void*>(std::addressof(f)))), call_([](void* o, Args... args) -> R {
          return (*static_cast<std::remove_reference_t<F>*>(o))(static_cast<Args>(args)...);
        }) {}
  R operator()(Args... args) const { return call_(object_, static_cast<Args>(args)...); }

 private:
  void* object_;
  R (*call_)(void*, Args...);
};

using Function = FunctionRef<double(double)>;
/// dy/dt = f(t, y): reads y, writes dydt of the same length.
using Rhs = FunctionRef<void(double t, std::span<const double> y, std::span<double> dydt)>;
/// J(t, y): df_i/dy_j row by row into an n x n span.
using Jacobian = FunctionRef<void(double t, std::span<const double> y, std::span<double> J)>;

}  // namespace vatwright
