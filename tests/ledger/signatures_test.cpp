// Persons sign runs, the machine signs what it publishes; whatever was forged
// afterwards shows, even where the whole chain was written anew.

#include "loqsmith/ledger/signatures.hpp"

#include <gtest/gtest.h>

#include <fstream>

#include "ledger_fixture.hpp"
#include "loqsmith/base/digest.hpp"
#include "loqsmith/base/halt.hpp"
#include "loqsmith/base/input_error.hpp"
#include "loqsmith/ledger/chain.hpp"
#include "loqsmith/ledger/sign_run.hpp"
#include "loqsmith/ledger/signers.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;
using namespace test;

// Secret keys of RFC 8032 (2017), section 7.1, tests 1 to 3.
SigningKey adas_key() {
  return SigningKey::from_hex(
      "9d61b19deffd5a60ba844af492ec2cc44449c5697b326919703bac031cae7f60");
}
SigningKey bens_key() {
  return SigningKey::from_hex(
      "4ccd089b28ff96da9db6c346ec114e0f5b8a319f35aba624da8cf6ed4fb8a6fb");
}
SigningKey machine_key() {
  return SigningKey::from_hex(
      "c5aa8df43f9f837bedb7442f31dcb7b166d38535076f094b85ce3a2e0b4458f7");
}

class Signatures : public ::testing::Test {
 protected:
  Signatures() {
    publish("a");
    add_signer(place_, "Ada Quill", adas_key().public_key());
  }

  void publish(const std::string& sequence, bool with_key = true) {
    const SigningKey key = machine_key();
    RunAtWork run = RunAtWork::begin(place_, sequence, "/in/" + sequence, {});
    signed_before_ = run.signed_before();
    write_run(run, "1");
    run.publish({{"status", "done"}}, with_key ? &key : nullptr);
  }

  RunSignature sign(const std::string& meaning = "approved",
                    const std::string& reason = "") {
    return sign_run(place_, {"a/run-0001", meaning, reason}, adas_key());
  }

  std::string deviations(const std::string& key = "") const {
    VerifyRequest request;
    request.machine_key = key;
    return deviations_of(verify_out(out_, request));
  }

  std::string machine_deviations() const {
    return deviations(machine_key().public_key());
  }

  std::vector<LedgerLine> lines() const {
    return read_chain(read_file(out_ / "ledger.jsonl")).lines;
  }

  // The chain written anew with a head that fits, as somebody with write
  // access could, but without the keys.
  void forge(std::vector<LedgerLine> forged) const {
    std::string text;
    LedgerPlace last{0, std::string(kNoLine)};
    for (LedgerLine& line : forged) {
      line.number = last.number + 1;
      line.previous = last.sha256;
      const std::string bytes = ledger_line_text(line);
      last = {line.number, sha256_hex(bytes)};
      text += bytes;
    }
    std::ofstream(out_ / "ledger.jsonl", std::ios::trunc) << text;
    std::ofstream(out_ / "ledger.head", std::ios::trunc) << head_text(last);
  }

  TempFolder folder_{TempFolder::kept_in_memory()};
  fs::path out_ = folder_ / "out";
  PublicationPlace place_ = place_at(out_);
  std::string signed_before_;
};

TEST_F(Signatures, NameTimeAndMeaningStandInTheLedgerWithTheManifest) {
  const RunSignature signature = sign("approved", "second look");
  EXPECT_EQ(signature.signer, "Ada Quill");
  const LedgerLine line = lines().back();
  EXPECT_EQ(line.action, "signature");
  EXPECT_EQ(line.object, "a/run-0001");
  EXPECT_EQ(line.time, signature.time);
  EXPECT_EQ(line.reason, "second look");
  EXPECT_EQ(line.manifest,
            sha256_hex(read_file(out_ / "a/run-0001/manifest.json")));
  EXPECT_EQ(detail_of(line, "meaning"), "approved");
  EXPECT_TRUE(is_line_signed_by(line, adas_key().public_key()));
  EXPECT_FALSE(is_line_signed_by(line, bens_key().public_key()));
  EXPECT_EQ(deviations(), "");
  EXPECT_EQ(verify_out(out_).signatures, 1U);
}

// The documented way to the signed bytes without this program, even for a
// reason that looks like a signature.
TEST_F(Signatures, AreOverTheLineWithoutItsSignature) {
  sign("rejected", ",\"signature\":\"00ff\"");
  const std::string script = "sed -n 4p '" + (out_ / "ledger.jsonl").string() +
                             "' | sed 's/,\"signature\":\"[0-9a-f]*\"//' > '" +
                             (folder_ / "signed").string() + "'";
  ASSERT_EQ(std::system(script.c_str()), 0);
  const std::string bytes = read_file(folder_ / "signed");
  EXPECT_EQ(bytes, signed_text(lines().back()));
  EXPECT_TRUE(is_signed_by(adas_key().public_key(), bytes,
                           lines().back().detail.back().second));
}

TEST_F(Signatures, StayValidWhenTheSignerIsRemovedLater) {
  sign();
  remove_signer(place_, "Ada Quill", "left");
  EXPECT_EQ(deviations(), "");
  EXPECT_THROW(sign(), InputError);
}

TEST_F(Signatures, OnlyRegisteredKeysSignPublishedRunsWithAMeaning) {
  const std::string before = read_file(out_ / "ledger.jsonl");
  const auto refused = [&](const SigningRequest& request, SigningKey key) {
    EXPECT_THROW(sign_run(place_, request, key), InputError);
  };
  refused({"a/run-0001", "approved", ""}, bens_key());
  refused({"a/run-0002", "approved", ""}, adas_key());
  refused({"a/run-0001", "seen", ""}, adas_key());
  refused({"a/run-0001", "rejected", " "}, adas_key());
  EXPECT_EQ(read_file(out_ / "ledger.jsonl"), before);
}

TEST_F(Signatures, WhatHasChangedIsNotSigned) {
  std::ofstream(out_ / "a/run-0001/results.csv") << "injection\n2\n";
  const std::string before = read_file(out_ / "ledger.jsonl");
  EXPECT_THROW(sign(), Halt);
  EXPECT_EQ(read_file(out_ / "ledger.jsonl"), before);
}

TEST_F(Signatures, ForgedOnesShowInAChainWrittenAnew) {
  sign();
  const std::vector<LedgerLine> right = lines();
  const auto expect = [&](auto&& change, const std::string& said) {
    std::vector<LedgerLine> forged = right;
    change(forged);
    forge(forged);
    EXPECT_NE(deviations().find(said), std::string::npos) << deviations();
  };
  using Lines = std::vector<LedgerLine>;
  const std::string not_hers =
      "ledger.jsonl line 4: its signature is not that of Ada Quill";
  expect([](Lines& l) { l[3].detail[1].second = "reviewed"; }, not_hers);
  expect([](Lines& l) { l[3].time = "2027-01-01T00:00:00.000Z"; }, not_hers);
  expect([](Lines& l) { l[3].reason = "looks good"; }, not_hers);
  expect([](Lines& l) { l[3].detail.pop_back(); }, not_hers);
  expect([](Lines& l) { l[0].operator_ = "Somebody Else"; }, not_hers);
  expect([](Lines& l) { l[3].detail[0].second = "Ben Moor"; },
         "its signer, Ben Moor, was not registered then");
  expect([](Lines& l) { l[3].detail[1].second = "seen"; },
         "its meaning is none");
  expect([](Lines& l) { l[3].manifest = std::string(64, '0'); },
         "it signs another manifest");
  expect([](Lines& l) { l[3].object = "b/run-0001"; },
         "it signs b/run-0001, which was not published before");
}

TEST_F(Signatures, DoNotFitAnotherRun) {
  publish("b");
  sign();
  std::vector<LedgerLine> forged = lines();
  forged.back().object = "b/run-0001";
  forged.back().manifest =
      sha256_hex(read_file(out_ / "b/run-0001/manifest.json"));
  forge(forged);
  EXPECT_EQ(deviations(),
            "ledger.jsonl line 6: its signature is not that of Ada Quill\n");
}

TEST_F(Signatures, ALaterRunOfTheSequenceSaysSo) {
  EXPECT_EQ(signed_before_, "");
  const RunSignature signature = sign();
  publish("other");
  EXPECT_EQ(signed_before_, "");
  publish("a");
  EXPECT_EQ(signed_before_, "run-0001 approved by Ada Quill at " +
                                signature.time + " (line 4)");
  EXPECT_EQ(detail_of(lines()[6], "signed_before"), signed_before_);
}

TEST_F(Signatures, TheMachineSignsWhatItPublishes) {
  EXPECT_EQ(detail_of(lines()[1], "machine_key"), machine_key().public_key());
  publish("b");
  EXPECT_EQ(deviations(), "");
  EXPECT_EQ(machine_deviations(), "");
  EXPECT_EQ(deviations(bens_key().public_key()),
            "ledger.jsonl line 2: a/run-0001 is published without a signature "
            "of this key\n"
            "ledger.jsonl line 5: b/run-0001 is published without a signature "
            "of this key\n"
            "ledger.jsonl: no published run bears a signature of this key\n");
  publish("c", /*with_key=*/false);
  EXPECT_EQ(machine_deviations(),
            "ledger.jsonl line 7: c/run-0001 is published without a signature "
            "of this key\n");
}

// Whoever has no key can at most take the signatures away, and then the lines
// below do not fit, or none is left.
TEST_F(Signatures, AChainWrittenAnewShowsAgainstTheMachinesKey) {
  publish("b");
  const std::vector<LedgerLine> right = lines();
  auto forged = right;
  forged[0].operator_ = "Somebody Else";
  forge(forged);
  EXPECT_NE(deviations().find("line 2: its signature is not that of its "
                              "machine_key"),
            std::string::npos);
  forged[1].detail.resize(1);
  forge(forged);
  EXPECT_NE(machine_deviations().find("line 5: b/run-0001 is published"),
            std::string::npos);
  forged[4].detail.resize(1);
  forge(forged);
  EXPECT_EQ(deviations(), "");
  EXPECT_EQ(machine_deviations(),
            "ledger.jsonl: no published run bears a signature of this key\n");
}

TEST(MachineKey, MayComeAfterTheFirstRuns) {
  const TempFolder folder(TempFolder::kept_in_memory());
  const PublicationPlace place = place_at(folder / "out");
  publish_run(place, "a");
  const SigningKey key = machine_key();
  RunAtWork run = RunAtWork::begin(place, "b", "/in/b", {});
  write_run(run, "1");
  run.publish({}, &key);
  VerifyRequest request;
  request.machine_key = key.public_key();
  const VerifyReport report = verify_out(place.out, request);
  EXPECT_EQ(deviations_of(report), "");
  ASSERT_EQ(report.notes.size(), 1U);
  EXPECT_EQ(report.notes.front(),
            "1 run was published before the first signed one");
}

TEST(RunPlace, IsFoundFromTheRunsFolder) {
  const TempFolder folder(TempFolder::kept_in_memory());
  publish_run(place_at(folder / "out"), "deep/a");
  const RunPlace found = find_run_place(folder / "out/deep/a/run-0001/");
  EXPECT_EQ(found.run, "deep/a/run-0001");
  EXPECT_EQ(found.out, folder / "out");
  EXPECT_THROW(find_run_place(folder / "elsewhere/run-0001"), InputError);
}

}  // namespace
}  // namespace loqsmith
