// SPDX-License-Identifier: MIT
#pragma once

#include <functional>
#include <memory>
#include <type_traits>
#include <utility>

namespace bismar {

/// A borrowed callable: no copy, no allocation, and so no owner. It lets a function that is
/// compiled once take any lambda; the callable must outlive the call, which an argument of that
/// call does.
template <class Signature>
class FunctionRef;

template <class Result, class... Arguments>
class FunctionRef<Result(Arguments...)> {
 public:
  /// Implicit, so that a lambda can stand where the argument is expected; it never hides the copy.
  template <class Callable>
  requires(!std::is_same_v<std::remove_cvref_t<Callable>, FunctionRef> &&
           !std::is_function_v<std::remove_reference_t<Callable>> &&
           std::is_invocable_r_v<Result, Callable&, Arguments...>)
      // NOLINTNEXTLINE(google-explicit-constructor,bugprone-forwarding-reference-overload)
      FunctionRef(Callable&& callable)
  noexcept
      : object_(const_cast<void*>(static_cast<const void*>(std::addressof(callable)))),
        call_([](void* object, Arguments... arguments) -> Result {
          using Object = std::remove_reference_t<Callable>;
          return std::invoke(*static_cast<Object*>(object), std::forward<Arguments>(arguments)...);
        }) {}

  Result operator()(Arguments... arguments) const {
    return call_(object_, std::forward<Arguments>(arguments)...);
  }

 private:
  void* object_;
  Result (*call_)(void*, Arguments...);
};

}  // namespace bismar
