// Damaged AnIML documents: nothing crashes, nothing half read is returned.

#include <gtest/gtest.h>

#include <cmath>
#include <random>
#include <string>

#include "loqsmith/base/input_error.hpp"
#include "loqsmith/formats/chromatogram_file.hpp"
#include "support/animl_builder.hpp"

namespace loqsmith {
namespace {

using test::animl_document;
using test::animl_encoded;
using test::animl_set;
using test::animl_time;
using test::AnimlSeriesPlan;

std::string document_of_all_value_sets() {
  AnimlSeriesPlan packed;
  packed.name = "Packed";
  packed.id = "p";
  packed.type = "Float32";
  packed.values = animl_encoded({1, 2}, "Float32", "startIndex=\"0\"") +
                  animl_encoded({4, 3}, "Float32", "startIndex=\"2\"");
  return animl_document(animl_set({animl_time(), AnimlSeriesPlan{}, packed}));
}

// True when the file was refused; otherwise every trace keeps the promises of
// Trace.
bool refused(const std::string& document) {
  FileContents contents;
  try {
    contents = read_chromatogram_file(document, "a.animl", {});
  } catch (const InputError& error) {
    EXPECT_FALSE(error.problems().empty());
    return true;
  }
  for (const Trace& trace : contents.traces) {
    EXPECT_EQ(trace.minutes.size(), trace.signal.size());
    EXPECT_EQ(trace.header.points, trace.minutes.size());
    for (std::size_t i = 0; i < trace.minutes.size(); ++i) {
      EXPECT_TRUE(std::isfinite(trace.minutes[i]));
      EXPECT_TRUE(std::isfinite(trace.signal[i]));
      EXPECT_TRUE(i == 0 || trace.minutes[i] > trace.minutes[i - 1]);
    }
  }
  return false;
}

TEST(AnimlDamage, ADocumentCutAtAnyByteGivesNoTrace) {
  const std::string document = document_of_all_value_sets();
  ASSERT_FALSE(refused(document));
  // The last byte is the line end behind the root.
  for (std::size_t length = 0; length + 1 < document.size(); ++length) {
    EXPECT_TRUE(refused(document.substr(0, length))) << length;
  }
}

TEST(AnimlDamage, RandomChangesNeverBreakAPromise) {
  const std::string sound = document_of_all_value_sets();
  std::mt19937_64 random(20260301);
  for (int round = 0; round < 3000; ++round) {
    std::string document = sound;
    const auto place = static_cast<std::size_t>(random() % document.size());
    switch (random() % 3) {
      case 0:
        document[place] = static_cast<char>(random() % 256);
        break;
      case 1:
        document.erase(place, random() % 20);
        break;
      default:
        document.insert(place, document.substr(random() % sound.size(), 20));
        break;
    }
    refused(document);
  }
}

TEST(AnimlDamage, NestingWithoutEndIsRefused) {
  std::string inner = animl_set({animl_time(), AnimlSeriesPlan{}});
  for (int depth = 0; depth < 240; ++depth) {
    inner.insert(0, "<Category name=\"c\">");
    inner += "</Category>";
  }
  EXPECT_FALSE(refused(animl_document(inner)));
  for (int depth = 0; depth < 20; ++depth) {
    inner.insert(0, "<Category name=\"c\">");
    inner += "</Category>";
  }
  EXPECT_TRUE(refused(animl_document(inner)));
}

}  // namespace
}  // namespace loqsmith
