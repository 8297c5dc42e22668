#include <gtest/gtest.h>

#include <string>
#include <vector>

#include "loqsmith/base/input_error.hpp"
#include "loqsmith/formats/chromatogram_file.hpp"
#include "support/mzml_builder.hpp"

namespace loqsmith {
namespace {

using test::mzml_document;
using test::MzmlTrace;

MzmlTrace srm(const std::string& id, double precursor, double product) {
  MzmlTrace trace;
  trace.id = id;
  trace.type = "MS:1001473";
  trace.precursor_mz = precursor;
  trace.product_mz = product;
  return trace;
}

FileContents contents() {
  MzmlTrace refused = srm("refused", 300.0, 100.0);
  refused.time_unit.clear();
  return read_chromatogram_file(
      mzml_document({MzmlTrace{}, srm("a", 233.099998, 72.0999985),
                     srm("b", 233.1, 46.0), srm("c", 141.0, 45.0),
                     srm("d", 141.0, 45.0), refused}),
      "a.mzML", {});
}

TraceSelector selector_for(double precursor, double product) {
  TraceSelector selector;
  selector.id = "trace";
  selector.kind = TraceSelector::Kind::Srm;
  selector.precursor_mz = precursor;
  selector.product_mz = product;
  selector.tolerance_mz = 0.3;
  return selector;
}

std::string refusal(const TraceSelector& selector, const std::string& run) {
  try {
    const Trace& trace = select_trace(contents(), selector, run, "a.mzML");
    ADD_FAILURE() << "selected " << trace.header.id;
  } catch (const InputError& error) {
    return error.what();
  }
  return {};
}

void expect_parts(const std::string& text,
                  const std::vector<std::string>& parts) {
  for (const std::string& part : parts) {
    EXPECT_NE(text.find(part), std::string::npos) << part << " in " << text;
  }
}

TEST(SelectTrace, FindsTheOneThatIsMeant) {
  const FileContents file = contents();
  EXPECT_EQ(
      select_trace(file, selector_for(233.1, 72.1), "", "a.mzML").header.id,
      "a");
  EXPECT_EQ(
      select_trace(file, selector_for(233.1, 46.0), "run1", "a.mzML").header.id,
      "b");
  TraceSelector tic;
  tic.kind = TraceSelector::Kind::Tic;
  EXPECT_EQ(select_trace(file, tic, "", "a.mzML").header.id, "TIC");
}

TEST(SelectTrace, ListsWhatThereIsWhenNoneMatches) {
  expect_parts(refusal(selector_for(500.0, 72.1), ""),
               {"precursor 500", "\"TIC\" (tic", "\"d\" (srm 141 > 45",
                "\"refused\" (srm 300 > 100, run \"run1\") refused"});
}

TEST(SelectTrace, ListsWhatWasLeftOutToo) {
  const std::vector<TraceSelector> wanted{selector_for(500.0, 72.1)};
  const FileContents file = read_chromatogram_file(mzml_document({MzmlTrace{}}),
                                                   "a.mzML", {}, &wanted);
  EXPECT_TRUE(file.traces.empty());
  try {
    select_trace(file, wanted[0], "", "a.mzML");
    FAIL();
  } catch (const InputError& error) {
    expect_parts(error.what(), {"\"TIC\" (tic"});
  }
}

TEST(SelectTrace, ListsTheCandidatesWhenSeveralMatch) {
  const std::string text = refusal(selector_for(141.0, 45.0), "");
  expect_parts(text, {"\"c\" (srm", "\"d\" (srm"});
  EXPECT_EQ(text.find("\"a\""), std::string::npos);
}

TEST(SelectTrace, GivesARefusedTracesOwnProblem) {
  expect_parts(refusal(selector_for(300.0, 100.0), ""),
               {"no unit on the time array", "chromatogram \"refused\""});
}

TEST(SelectTrace, NamesTheRunsWhenTheRunIsNotThere) {
  expect_parts(refusal(selector_for(233.1, 72.1), "run9"),
               {"the run \"run9\"", "found \"run1\""});
}

TEST(SelectTrace, NeverSelectsByATypeThatIsNotStated) {
  MzmlTrace untyped;
  untyped.type = "MS:4000104";
  const FileContents file =
      read_chromatogram_file(mzml_document({untyped}), "a.mzML", {});
  TraceSelector tic;
  tic.kind = TraceSelector::Kind::Tic;
  EXPECT_THROW(select_trace(file, tic, "", "a.mzML"), InputError);
  TraceSelector by_name;
  by_name.name = "TIC";
  EXPECT_EQ(select_trace(file, by_name, "", "a.mzML").header.id, "TIC");
}

TEST(SelectTrace, RefusesExtractedTraces) {
  TraceSelector selector;
  selector.kind = TraceSelector::Kind::Extracted;
  expect_parts(refusal(selector, ""), {"not available in this version"});
}

}  // namespace
}  // namespace loqsmith
