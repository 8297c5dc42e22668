// Damaged documents: nothing crashes, nothing half read is returned, nothing is
// invented.

#include <gtest/gtest.h>

#include <cmath>
#include <random>
#include <string>
#include <vector>

#include "loqsmith/base/input_error.hpp"
#include "loqsmith/formats/chromatogram_file.hpp"
#include "support/mzml_builder.hpp"

namespace loqsmith {
namespace {

using test::mzml_document;
using test::MzmlDocumentPlan;
using test::MzmlTrace;

std::string indexed_document() {
  MzmlTrace srm;
  srm.id = "srm";
  srm.type = "MS:1001473";
  srm.precursor_mz = 233.1;
  srm.product_mz = 72.1;
  srm.zlib = true;
  srm.signal_type = "MS:1000521";
  MzmlDocumentPlan plan;
  plan.traces = {MzmlTrace{}, srm};
  plan.sample_name = "well 3";
  plan.start_time = "2026-03-01T08:15:00Z";
  plan.indexed = true;
  return mzml_document(plan);
}

// Every trace that comes back keeps the promises of Trace.
void expect_promises(const FileContents& contents) {
  for (const Trace& trace : contents.traces) {
    ASSERT_EQ(trace.minutes.size(), trace.signal.size());
    ASSERT_EQ(trace.header.points, trace.minutes.size());
    for (std::size_t i = 0; i < trace.minutes.size(); ++i) {
      ASSERT_TRUE(std::isfinite(trace.minutes[i]));
      ASSERT_TRUE(std::isfinite(trace.signal[i]));
      ASSERT_TRUE(i == 0 || trace.minutes[i] > trace.minutes[i - 1]);
    }
    EXPECT_FALSE(trace.header.time_unit.empty());
  }
  for (const RefusedTrace& refused : contents.refused) {
    EXPECT_FALSE(describe(refused.problem).empty());
  }
}

// True when the file was refused as a whole.
bool refused(const std::string& document, bool checksum_required) {
  try {
    expect_promises(
        read_chromatogram_file(document, "a.mzML", {"", checksum_required}));
  } catch (const InputError& error) {
    EXPECT_FALSE(error.problems().empty());
    return true;
  }
  return false;
}

TEST(MzmlDamage, ADocumentCutAtAnyByteGivesNoTrace) {
  for (const std::string& document :
       {indexed_document(), mzml_document({MzmlTrace{}})}) {
    ASSERT_FALSE(refused(document, true));
    // The line feed behind the root's end belongs to nobody.
    for (std::size_t size = 0; size + 1 < document.size(); ++size) {
      ASSERT_TRUE(refused(document.substr(0, size), false)) << size;
    }
  }
}

TEST(MzmlDamage, AnyFlippedBitIsSeenByTheChecksum) {
  const std::string document = indexed_document();
  const std::size_t covered = document.find("<fileChecksum>") + 14;
  for (std::size_t at = 0; at < covered; ++at) {
    for (const unsigned bit : {1U, 5U}) {
      std::string damaged = document;
      damaged[at] = static_cast<char>(static_cast<unsigned char>(damaged[at]) ^
                                      (1U << bit));
      ASSERT_TRUE(refused(damaged, true)) << at << " bit " << bit;
    }
  }
}

TEST(MzmlDamage, FlippedBitsNeverBreakAPromise) {
  std::mt19937_64 random(20260301);
  const std::string document = indexed_document();
  for (int round = 0; round < 2500; ++round) {
    std::string damaged = document;
    const auto flips = 1 + random() % 4;
    for (std::size_t i = 0; i < flips; ++i) {
      char& c = damaged[random() % damaged.size()];
      c = static_cast<char>(static_cast<unsigned char>(c) ^
                            (1U << (random() % 8)));
    }
    refused(damaged, false);
  }
}

TEST(MzmlDamage, PiecesCutOutOrDoubledNeverBreakAPromise) {
  std::mt19937_64 random(20260302);
  const std::string document = indexed_document();
  for (int round = 0; round < 2000; ++round) {
    std::string damaged = document;
    const std::size_t from = random() % damaged.size();
    const std::size_t length = 1 + random() % 200;
    if (random() % 2 == 0) {
      damaged.erase(from, length);
    } else {
      damaged.insert(random() % damaged.size(), document.substr(from, length));
    }
    refused(damaged, false);
  }
}

// Begin and end of every element, found by an own walk over the tags.
std::vector<std::pair<std::size_t, std::size_t>> elements(
    const std::string& document) {
  std::vector<std::pair<std::size_t, std::size_t>> found;
  std::vector<std::size_t> open;
  for (std::size_t at = document.find('<'); at != std::string::npos;
       at = document.find('<', at + 1)) {
    const std::size_t end = document.find('>', at) + 1;
    if (document[at + 1] == '?') continue;
    if (document[at + 1] == '/') {
      found.emplace_back(open.back(), end);
      open.pop_back();
    } else if (document[end - 2] == '/') {
      found.emplace_back(at, end);
    } else {
      open.push_back(at);
    }
  }
  return found;
}

TEST(MzmlDamage, WithoutAnyOneElementNothingIsInvented) {
  const std::string document = indexed_document();
  const auto all = elements(document);
  EXPECT_EQ(all.size(), 60U);
  for (const auto& [begin, end] : all) {
    std::string damaged = document;
    const std::string removed = damaged.substr(begin, end - begin);
    damaged.erase(begin, end - begin);
    SCOPED_TRACE(removed.substr(0, 120));
    const bool whole_refused = refused(damaged, false);
    const bool needed =
        removed.starts_with("<mzML") || removed.starts_with("<indexedmzML") ||
        removed.starts_with("<run") || removed.starts_with("<fileChecksum");
    EXPECT_EQ(whole_refused, needed);
    if (whole_refused) continue;
    const FileContents contents =
        read_chromatogram_file(damaged, "a.mzML", {"", false});
    const bool of_an_array =
        removed.starts_with("<binary") ||
        removed.find("-bit float\"") != std::string::npos ||
        removed.starts_with(
            "<cvParam cvRef=\"MS\" "
            "accession=\"MS:1000595\"") ||
        removed.starts_with(
            "<cvParam cvRef=\"MS\" "
            "accession=\"MS:1000515\"");
    if (of_an_array && !removed.starts_with("<chromatogram") &&
        removed.find("<chromatogram ") == std::string::npos) {
      EXPECT_EQ(contents.refused.size(), 1U);
      EXPECT_EQ(contents.traces.size(), 1U);
    }
  }
}

// Whether a chromatogram cannot be read without the attribute at `at`.
bool chromatogram_needs(const std::string& document, std::size_t at,
                        const std::string& attribute) {
  const auto last = [&](std::string_view text) {
    const std::size_t found = document.rfind(text, at);
    return found == std::string::npos ? 0 : found;
  };
  const bool in_array = last("<binaryDataArray ") > last("</binaryDataArray>");
  const bool of_chromatogram = last("<") == last("<chromatogram ");
  return attribute.starts_with("defaultArrayLength=") ||
         attribute.starts_with("encodedLength=") ||
         attribute == "value=\"233.1\"" || attribute == "value=\"72.1\"" ||
         (of_chromatogram && attribute.starts_with("id=")) ||
         (in_array && (attribute.starts_with("accession=") ||
                       attribute.starts_with("unitAccession=")));
}

TEST(MzmlDamage, WithoutAnyOneAttributeNothingIsInvented) {
  const std::string document = indexed_document();
  std::size_t removed = 0;
  for (std::size_t at = document.find("=\""); at != std::string::npos;
       at = document.find("=\"", at + 1)) {
    const std::size_t begin = document.rfind(' ', at);
    const std::size_t end = document.find('"', at + 2) + 1;
    const std::string attribute = document.substr(begin + 1, end - begin - 1);
    SCOPED_TRACE(attribute);
    std::string damaged = document;
    damaged.erase(begin, end - begin);
    ++removed;
    // The inner element inherits the outer one's namespace.
    const bool needed =
        at == document.find("=\"http:") || attribute == "version=\"1.0\"";
    EXPECT_EQ(refused(damaged, false), needed);
    if (needed) continue;
    const FileContents contents =
        read_chromatogram_file(damaged, "a.mzML", {"", false});
    EXPECT_EQ(contents.refused.size(),
              chromatogram_needs(document, at, attribute) ? 1U : 0U);
  }
  EXPECT_GT(removed, 100U);
}

}  // namespace
}  // namespace loqsmith
