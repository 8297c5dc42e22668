// The register of signers: its file, its lines in the ledger, and what shows
// when one of the two was changed.

#include "loqsmith/ledger/signers.hpp"

#include <gtest/gtest.h>

#include <fstream>

#include "ledger_fixture.hpp"
#include "loqsmith/base/digest.hpp"
#include "loqsmith/base/file_ops.hpp"
#include "loqsmith/base/halt.hpp"
#include "loqsmith/base/input_error.hpp"
#include "loqsmith/ledger/chain.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;
using namespace test;

// Public keys of RFC 8032 (2017), section 7.1, tests 1 and 2.
const std::string kAdasKey =
    "d75a980182b10ab7d54bfed3c964073a0ee172f3daa62325af021a68f707511a";
const std::string kBensKey =
    "3d4017c3e843895a92b70aa74d1b7ebc9c982ccf2ec4968cc0cd55f12af4660c";

const std::string kBothAdded =
    "{\"change\":\"added\",\"name\":\"Ada Quill\","
    "\"public_key\":\"" +
    kAdasKey +
    "\"}\n"
    "{\"change\":\"added\",\"name\":\"Ben Moor\","
    "\"public_key\":\"" +
    kBensKey + "\"}\n";

class Signers : public ::testing::Test {
 protected:
  Signers() {
    publish_run(place_, "a");
    add_signer(place_, "Ada Quill", kAdasKey);
    add_signer(place_, "Ben Moor", kBensKey);
  }

  std::string deviations() const { return deviations_of(verify_out(out_)); }
  fs::path file() const { return out_ / "signers.jsonl"; }

  void overwrite(const std::string& text) const {
    std::ofstream(file(), std::ios::binary | std::ios::trunc) << text;
  }

  std::vector<LedgerLine> lines() const {
    return read_chain(read_file(out_ / "ledger.jsonl")).lines;
  }

  TempFolder folder_{TempFolder::kept_in_memory()};
  fs::path out_ = folder_ / "out";
  PublicationPlace place_ = place_at(out_);
};

TEST_F(Signers, EachChangeStandsInFileAndLedger) {
  EXPECT_EQ(read_file(file()), kBothAdded);
  const LedgerLine line = lines().back();
  EXPECT_EQ(line.action, "signer-added");
  EXPECT_EQ(line.object, "Ben Moor");
  EXPECT_EQ(detail_of(line, "public_key"), kBensKey);
  EXPECT_EQ(detail_of(line, "register"), sha256_hex(kBothAdded));
  EXPECT_EQ(deviations(), "");
  const std::vector<Signer> listed = list_signers(out_);
  ASSERT_EQ(listed.size(), 2U);
  EXPECT_EQ(listed[0].name, "Ada Quill");
  EXPECT_EQ(listed[1].public_key, kBensKey);
  EXPECT_EQ(listed[1].line, line.number);
  EXPECT_EQ(listed[1].since, line.time);
}

TEST_F(Signers, ARemovedOneMayComeBackWithAnotherKey) {
  remove_signer(place_, "Ada Quill", "left the laboratory");
  ASSERT_EQ(list_signers(out_).size(), 1U);
  EXPECT_EQ(list_signers(out_)[0].name, "Ben Moor");
  EXPECT_EQ(lines().back().action, "signer-removed");
  EXPECT_EQ(lines().back().reason, "left the laboratory");
  const std::string new_key(64, '1');
  add_signer(place_, "Ada Quill", new_key);
  EXPECT_EQ(list_signers(out_)[1].public_key, new_key);
  EXPECT_EQ(deviations(), "");
}

TEST_F(Signers, NamesAndKeysAreRegisteredOnce) {
  const std::string other_key(64, '1');
  const std::string before = read_file(out_ / "ledger.jsonl");
  EXPECT_THROW(add_signer(place_, "Ada Quill", other_key), InputError);
  EXPECT_THROW(add_signer(place_, "Cleo Ash", kAdasKey), InputError);
  EXPECT_THROW(remove_signer(place_, "Cleo Ash", "x"), InputError);
  EXPECT_THROW(add_signer(place_, "Cleo Ash", "d75a"), InputError);
  for (const std::string& unfit :
       {std::string(), std::string(" Cleo"), std::string("Cleo\n"),
        std::string("\xFF"), std::string(201, 'c')}) {
    EXPECT_THROW(add_signer(place_, unfit, other_key), InputError);
  }
  EXPECT_EQ(read_file(out_ / "ledger.jsonl"), before);
}

TEST_F(Signers, EveryOtherRegisterFileIsADeviationAndStopsWriters) {
  const std::string said =
      "signers.jsonl: it is not what the lines of the ledger make it\n";
  std::string swapped = kBothAdded;
  swapped.replace(swapped.find("Ben"), 3, "Bea");
  for (const std::string& text :
       {std::string(), swapped, kBothAdded + kBothAdded, kBothAdded + "\n"}) {
    overwrite(text);
    EXPECT_EQ(deviations(), said) << text;
    EXPECT_THROW(recover(place_), Halt);
    EXPECT_THROW(list_signers(out_), Halt);
  }
  fs::remove(file());
  EXPECT_EQ(deviations(), said);
}

TEST_F(Signers, AnInterruptedChangeIsMendedByTheNextWriter) {
  set_file_hook([&](FileOperation operation, const fs::path& path) {
    const bool hit = operation == FileOperation::Rename &&
                     path.filename().string().starts_with("signers");
    return FileFault{hit ? EIO : 0};
  });
  EXPECT_THROW(remove_signer(place_, "Ben Moor", "x"), Halt);
  set_file_hook({});
  EXPECT_EQ(deviations(),
            "signers.jsonl: the last change that the ledger knows is missing: "
            "its writer was interrupted, the next start renews it\n");
  EXPECT_EQ(recover(place_),
            (std::vector<std::string>{
                "signers.jsonl was one change behind: renewed"}));
  EXPECT_EQ(deviations(), "");
  EXPECT_EQ(list_signers(out_).size(), 1U);
}

TEST_F(Signers, ChangesThatNoRegisterCouldHaveSeenAreDeviations) {
  const auto said_of = [&](std::size_t index, auto&& change) {
    std::vector<LedgerLine> changed = lines();
    change(changed[index]);
    const auto deviations = collect_signers(changed).deviations();
    return deviations.empty() ? "" : deviations.front().what;
  };
  EXPECT_EQ(said_of(2, [](LedgerLine&) {}), "");
  EXPECT_EQ(said_of(2, [](LedgerLine& line) { line.object = "Bea Moor"; }),
            "its register is not the SHA-256 of signers.jsonl");
  EXPECT_EQ(said_of(3, [](LedgerLine& line) { line.object = "Ada Quill"; }),
            "it adds a name that is registered");
  EXPECT_EQ(
      said_of(3,
              [](LedgerLine& line) { line.detail.front().second = kAdasKey; }),
      "it adds a key that is registered");
  EXPECT_EQ(
      said_of(2, [](LedgerLine& line) { line.action = "signer-removed"; }),
      "it removes a signer who is not registered");
}

TEST(SignersOfNobody, LeaveNoFile) {
  const TempFolder folder(TempFolder::kept_in_memory());
  const PublicationPlace place = place_at(folder / "out");
  publish_run(place, "a");
  EXPECT_TRUE(list_signers(place.out).empty());
  EXPECT_FALSE(fs::exists(place.out / "signers.jsonl"));
  EXPECT_THROW(publish_run(place, "signers.jsonl"), InputError);
  std::ofstream(place.out / "signers.jsonl") << "{}\n";
  EXPECT_EQ(deviations_of(verify_out(place.out)),
            "signers.jsonl: it is not what the lines of the ledger make it\n");
}

}  // namespace
}  // namespace loqsmith
