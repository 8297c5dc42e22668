#include "loqsmith/formats/text_places.hpp"

#include <gtest/gtest.h>

#include <random>
#include <string>

namespace loqsmith {
namespace {

TEST(TextPlaces, AgreeWithCountingFromTheBeginning) {
  std::mt19937_64 random(7);
  for (int round = 0; round < 200; ++round) {
    std::string text = round % 2 == 0 ? "\xEF\xBB\xBF" : "";
    while (text.size() < 60) text += random() % 4 == 0 ? '\n' : 'x';
    TextPlaces places(text);
    for (int step = 0; step < 30; ++step) {
      if (random() % 3 == 0) places.pass(3 + random() % (text.size() - 2));
      const std::size_t offset = 3 + random() % (text.size() - 2);
      const TextPlace found = places.at(offset);
      const TextPlace wanted = line_column(text, offset);
      ASSERT_EQ(found.line, wanted.line) << text << offset;
      ASSERT_EQ(found.column, wanted.column) << text << offset;
    }
  }
}

}  // namespace
}  // namespace loqsmith
