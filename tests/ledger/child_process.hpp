#pragma once

#include <sys/wait.h>
#include <unistd.h>

#include <csignal>
#include <functional>
#include <stdexcept>

#include "loqsmith/base/file_ops.hpp"
#include "loqsmith/base/halt.hpp"

namespace loqsmith::test {

/// How a child process ended.
struct ChildEnd {
  bool killed = false;
  int status = 0;  ///< exit status where it was not killed
};

/// Starts a process that does this and ends with 0, with a Halt's status, or
/// with 99 for any other exception.
inline pid_t start_child(const std::function<void()>& action) {
  const pid_t child = ::fork();
  if (child < 0) throw std::runtime_error("cannot fork");
  if (child > 0) return child;
  int status = 0;
  try {
    action();
  } catch (const Halt& halt) {
    status = static_cast<int>(halt.status());
  } catch (...) {
    status = 99;
  }
  ::_exit(status);
}

inline ChildEnd wait_for(pid_t child) {
  int status = 0;
  if (::waitpid(child, &status, 0) != child) {
    throw std::runtime_error("the child is lost");
  }
  if (WIFSIGNALED(status)) return {true, 0};
  return {false, WEXITSTATUS(status)};
}

/// How a process is killed: before its n-th file operation, counted from 1 and
/// without reads, which change nothing; or, torn, after the first 20 bytes of
/// its n-th write.
struct Kill {
  int operation = 0;
  bool torn = false;
};

inline FileHook killing_hook(Kill kill) {
  int count = 0;
  return [kill, count](FileOperation operation,
                       const std::filesystem::path&) mutable {
    FileFault fault;
    if (operation == FileOperation::Read) return fault;
    if (kill.torn && count == kill.operation) ::raise(SIGKILL);
    if (!kill.torn || operation == FileOperation::Write) ++count;
    if (count != kill.operation) return fault;
    if (!kill.torn) ::raise(SIGKILL);
    fault.most_bytes = 20;
    return fault;
  };
}

/// Does this in a process that is killed on the way, unless it ends before.
inline ChildEnd run_and_kill(Kill kill, const std::function<void()>& action) {
  return wait_for(start_child([&] {
    set_file_hook(killing_hook(kill));
    action();
  }));
}

}  // namespace loqsmith::test
