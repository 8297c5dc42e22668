#include "loqsmith/cli/terminal.hpp"

#include <pwd.h>
#include <unistd.h>

#include <array>
#include <cstdio>
#include <utility>

#include "loqsmith/night/build_info.hpp"

namespace loqsmith {
namespace {

std::string user_name() {
  std::array<char, 4096> buffer{};
  passwd entry{};
  passwd* found = nullptr;
  getpwuid_r(geteuid(), &entry, buffer.data(), buffer.size(), &found);
  return found != nullptr ? std::string(found->pw_name)
                          : "uid " + std::to_string(geteuid());
}

std::string host_name() {
  std::array<char, 256> buffer{};
  if (gethostname(buffer.data(), buffer.size() - 1) != 0) return "unknown";
  return buffer.data();
}

}  // namespace

ProgressLine::ProgressLine(std::string title)
    : title_(std::move(title)),
      on_terminal_(isatty(STDERR_FILENO) == 1),
      begun_(std::chrono::steady_clock::now()),
      last_(begun_) {}

ProgressLine::~ProgressLine() {
  if (shown_) std::fputs("\r\x1b[K", stderr);
}

void ProgressLine::show(std::size_t done, std::size_t all) {
  if (!on_terminal_ || all == 0) return;
  const auto now = std::chrono::steady_clock::now();
  if (shown_ && done < all && now - last_ < std::chrono::milliseconds(100)) {
    return;
  }
  last_ = now;
  shown_ = true;
  constexpr std::size_t kWidth = 30;
  const std::size_t filled = kWidth * done / all;
  const std::string bar =
      std::string(filled, '=') + std::string(kWidth - filled, '.');
  const double spent = std::chrono::duration<double>(now - begun_).count();
  const double left = done > 0 ? spent * static_cast<double>(all - done) /
                                     static_cast<double>(done)
                               : 0.0;
  std::fprintf(stderr, "\r\x1b[K%s  %s  %zu of %zu files, %.0f s left",
               title_.c_str(), bar.c_str(), done, all, left);
  std::fflush(stderr);
}

LedgerActor current_actor(const std::string& operator_name) {
  return {user_name(), operator_name, host_name(),
          "loqsmith " + program_version()};
}

}  // namespace loqsmith
