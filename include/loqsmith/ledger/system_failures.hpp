#pragma once

#include <system_error>

#include "loqsmith/base/halt.hpp"

namespace loqsmith {

/// Does it; a failure of the operating system becomes Halt 74.
template <class Action>
auto halt_on_failure(Action action) {
  try {
    return action();
  } catch (const std::system_error& error) {
    throw Halt(ExitStatus::IoFailed, error.what());
  }
}

}  // namespace loqsmith
