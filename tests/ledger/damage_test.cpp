// Every small change to a ledger, head, manifest or published file shows.

#include <gtest/gtest.h>

#include <fstream>

#include "ledger_fixture.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/ledger/signers.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;
using namespace test;

class Damage : public ::testing::Test {
 protected:
  Damage() : folder_(TempFolder::kept_in_memory()), out_(folder_ / "out") {
    const PublicationPlace place = place_at(out_);
    publish_run(place, "a");
    RunAtWork::begin(place, "b", "/in/b", {});
    recover(place);
    ledger_ = read_file(out_ / "ledger.jsonl");
  }

  // One way to change a file's bytes, told as a place in the deviations.
  void expect_named(const std::string& name, const std::string& bytes,
                    const std::string& change) {
    std::ofstream(out_ / name, std::ios::binary | std::ios::trunc) << bytes;
    const VerifyReport report = verify_out(out_, std::chrono::milliseconds{0});
    bool named = false;
    for (const Deviation& deviation : report.deviations) {
      named = named || deviation.place.find(name) != std::string::npos;
    }
    EXPECT_TRUE(named) << name << ": " << change << '\n'
                       << deviations_of(report);
    ++changes_;
  }

  // Each byte changed in three ways (one bit, another case, all bits), taken
  // out, written twice, and the file cut there.
  void try_every_byte(const std::string& name) {
    const std::string bytes = read_file(out_ / name);
    for (std::size_t i = 0; i < bytes.size(); ++i) {
      const std::string at = " at byte " + std::to_string(i);
      for (const unsigned mask : {1U << (i % 5), 0x20U, 0xFFU}) {
        std::string changed = bytes;
        changed[i] =
            static_cast<char>(static_cast<unsigned char>(changed[i]) ^ mask);
        expect_named(name, changed, "changed" + at);
      }
      expect_named(name, std::string(bytes).erase(i, 1), "one less" + at);
      expect_named(name, std::string(bytes).insert(i, 1, bytes[i]),
                   "one more" + at);
      expect_named(name, bytes.substr(0, i), "cut" + at);
    }
    for (const char* more : {"\n", " ", "x"}) {
      expect_named(name, bytes + more, "one more at the end");
    }
    restore(name, bytes);
  }

  void restore(const std::string& name, const std::string& bytes) {
    std::ofstream(out_ / name, std::ios::binary | std::ios::trunc) << bytes;
    EXPECT_EQ(deviations_of(verify_out(out_)), "");
  }

  std::vector<std::string> lines() const {
    std::vector<std::string> parts = split(ledger_, '\n');
    parts.pop_back();
    for (std::string& part : parts) part += '\n';
    return parts;
  }

  TempFolder folder_;
  fs::path out_;
  std::string ledger_;
  int changes_ = 0;
};

TEST_F(Damage, OfAnyByteOfTheLedgerShows) {
  try_every_byte("ledger.jsonl");
  EXPECT_GT(changes_, 6 * 1000);
}

TEST_F(Damage, OfAnyByteOfTheHeadShows) {
  try_every_byte("ledger.head");
  EXPECT_GT(changes_, 6 * 60);
}

TEST_F(Damage, OfAnyByteOfManifestsAndPublishedFilesShows) {
  for (const std::string& file : files_below(out_ / "a/run-0001")) {
    try_every_byte("a/run-0001/" + file);
  }
  EXPECT_GT(changes_, 6 * 300);
}

TEST_F(Damage, OfAnyByteOfTheRegisterShows) {
  add_signer(place_at(out_), "Ada Quill", std::string(64, '1'));
  add_signer(place_at(out_), "Ben Moor", std::string(64, '2'));
  try_every_byte("signers.jsonl");
  EXPECT_GT(changes_, 6 * 200);
}

TEST_F(Damage, BySwappingLeavingOutOrRepeatingLinesShows) {
  const auto whole = lines();
  for (std::size_t i = 0; i < whole.size(); ++i) {
    const std::string number = std::to_string(i + 1);
    auto less = whole;
    less.erase(less.begin() + static_cast<std::ptrdiff_t>(i));
    expect_named("ledger.jsonl", join(less, ""), "without line " + number);
    auto more = whole;
    more.insert(more.begin() + static_cast<std::ptrdiff_t>(i), whole[i]);
    expect_named("ledger.jsonl", join(more, ""), "twice line " + number);
    for (std::size_t j = i + 1; j < whole.size(); ++j) {
      auto swapped = whole;
      std::swap(swapped[i], swapped[j]);
      expect_named("ledger.jsonl", join(swapped, ""),
                   "lines " + number + " and " + std::to_string(j + 1));
    }
  }
}

TEST_F(Damage, ByAnOlderLedgerWithItsHeadShowsInTheFiles) {
  const TempFolder other(TempFolder::kept_in_memory());
  fs::copy(out_, other / "out", fs::copy_options::recursive);
  publish_run(place_at(out_), "a", "2");
  for (const char* name : {"ledger.jsonl", "ledger.head"}) {
    fs::copy_file(other / "out" / name, out_ / name,
                  fs::copy_options::overwrite_existing);
  }
  const std::string found = deviations_of(verify_out(out_));
  EXPECT_NE(found.find("a/run-0002/results.csv: no manifest names this file"),
            std::string::npos)
      << found;
}

}  // namespace
}  // namespace loqsmith
