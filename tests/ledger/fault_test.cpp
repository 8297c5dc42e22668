// Makes every file operation of a publication, and of a change of the register
// of signers, fail once.

#include <gtest/gtest.h>

#include <cerrno>
#include <optional>
#include <system_error>

#include "ledger_fixture.hpp"
#include "loqsmith/base/file_ops.hpp"
#include "loqsmith/base/halt.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/ledger/signers.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;
using namespace test;

// Fails one operation, the n-th, and says whether it came so far.
class OneFault {
 public:
  OneFault(int n, int error) {
    set_file_hook([this, n, error](FileOperation, const fs::path&) {
      FileFault fault;
      if (++count_ == n) fault.error = error;
      // A full disk takes some of the bytes before it takes none.
      if (count_ == n - 1) fault.most_bytes = 20;
      met_ = met_ || count_ == n;
      return fault;
    });
  }
  ~OneFault() { set_file_hook({}); }
  OneFault(const OneFault&) = delete;
  OneFault& operator=(const OneFault&) = delete;

  bool met() const { return met_; }

 private:
  int count_ = 0;
  bool met_ = false;
};

// The status with which a publication under this fault ends; nothing where the
// fault comes after its last operation.
std::optional<ExitStatus> publish_with_fault(const fs::path& out, int n,
                                             int error) {
  const OneFault fault(n, error);
  ExitStatus status = ExitStatus::Done;
  try {
    publish_run(place_at(out), "a", "2");
  } catch (const Halt& halt) {
    status = halt.status();
  } catch (const std::system_error&) {
    // From the writing of the run's own files, which is the caller's.
    status = ExitStatus::IoFailed;
  }
  if (!fault.met()) return std::nullopt;
  return status;
}

void expect_usable(const fs::path& out, const std::string& when) {
  recover(place_at(out));
  publish_run(place_at(out), "a", "next");
  const VerifyReport report = verify_out(out, std::chrono::milliseconds{0});
  EXPECT_EQ(deviations_of(report), "") << when;
  EXPECT_EQ(join(report.notes, "\n"), "") << when;
}

class Faults : public ::testing::TestWithParam<int> {};

TEST_P(Faults, StopWithIoFailedAndLeaveAnOutThatGoesOn) {
  const TempFolder folder(TempFolder::kept_in_memory());
  publish_run(place_at(folder / "first"), "a");
  int n = 1;
  for (;; ++n) {
    const fs::path out = folder / "out";
    fs::copy(folder / "first", out, fs::copy_options::recursive);
    const auto status = publish_with_fault(out, n, GetParam());
    if (!status) break;
    const std::string when = "fault at operation " + std::to_string(n);
    EXPECT_EQ(*status, ExitStatus::IoFailed) << when;
    expect_usable(out, when);
    fs::remove_all(out);
  }
  EXPECT_GT(n, 50);
}

// A signer is registered after the fault, or by whoever comes next.
TEST_P(Faults, OfTheRegisterAreMendedByTheNextWriter) {
  const TempFolder folder(TempFolder::kept_in_memory());
  publish_run(place_at(folder / "first"), "a");
  add_signer(place_at(folder / "first"), "Ada Quill", std::string(64, '1'));
  int n = 1;
  for (bool met = true; met; ++n) {
    const fs::path out = folder / "out";
    fs::copy(folder / "first", out, fs::copy_options::recursive);
    {
      const OneFault fault(n, GetParam());
      try {
        add_signer(place_at(out), "Ben Moor", std::string(64, '2'));
      } catch (const Halt& halt) {
        EXPECT_EQ(halt.status(), ExitStatus::IoFailed) << n;
      }
      met = fault.met();
    }
    const std::string when = "fault at operation " + std::to_string(n);
    add_signer(place_at(out), "Cleo Ash", std::string(64, '3'));
    const VerifyReport report = verify_out(out, std::chrono::milliseconds{0});
    EXPECT_EQ(deviations_of(report), "") << when;
    EXPECT_EQ(join(report.notes, "\n"), "") << when;
    EXPECT_EQ(list_signers(out).back().name, "Cleo Ash") << when;
    fs::remove_all(out);
  }
  EXPECT_GT(n, 15);
}

INSTANTIATE_TEST_SUITE_P(DiskFullAndIoError, Faults,
                         ::testing::Values(ENOSPC, EIO));

TEST(Interruptions, AreOvercomeAtEveryOperation) {
  const TempFolder folder(TempFolder::kept_in_memory());
  for (int n = 1;; ++n) {
    const auto status = publish_with_fault(folder / "out", n, EINTR);
    if (!status) break;
    EXPECT_EQ(*status, ExitStatus::Done) << n;
    EXPECT_TRUE(fs::exists(folder / "out/a/run-0001/manifest.json"));
    fs::remove_all(folder / "out");
  }
}

}  // namespace
}  // namespace loqsmith
