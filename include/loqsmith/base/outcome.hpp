#pragma once

#include <string>
#include <utility>
#include <variant>

namespace loqsmith {

/// A number that does not exist, and why, in words a chemist understands.
/// Never replaced by a NaN, a zero or an exception.
struct NotApplicable {
  std::string reason;
};

/// Either a value or the reason why there is none.
template <class T>
class Outcome {
 public:
  Outcome(T value) : state_(std::move(value)) {}                 // NOLINT
  Outcome(NotApplicable absent) : state_(std::move(absent)) {}  // NOLINT

  bool has_value() const { return std::holds_alternative<T>(state_); }
  explicit operator bool() const { return has_value(); }

  /// The value; only to be asked for where has_value() holds.
  const T& value() const { return std::get<T>(state_); }
  T& value() { return std::get<T>(state_); }
  const T& operator*() const { return value(); }
  const T* operator->() const { return &value(); }

  /// Why there is no value; only where has_value() does not hold.
  const std::string& reason() const {
    return std::get<NotApplicable>(state_).reason;
  }

 private:
  std::variant<T, NotApplicable> state_;
};

}  // namespace loqsmith
