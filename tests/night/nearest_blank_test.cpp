#include "loqsmith/night/learn_sequence.hpp"

namespace loqsmith {
namespace {

std::vector<BlankNoise> blanks_at(const std::vector<int>& injections) {
  std::vector<BlankNoise> blanks;
  for (const int injection : injections) blanks.push_back({injection, {}});
  return blanks;
}

int nearest(const std::vector<BlankNoise>& blanks, int injection) {
  const BlankNoise* blank = nearest_blank(blanks, injection);
  return blank == nullptr ? 0 : blank->injection;
}

TEST(NearestBlank, IsTheNearestEarlierOne) {
  const auto blanks = blanks_at({2, 10, 20});
  EXPECT_EQ(nearest(blanks, 11), 10);
  EXPECT_EQ(nearest(blanks, 19), 10);
  EXPECT_EQ(nearest(blanks, 99), 20);
}

TEST(NearestBlank, IsTheNearestLaterOneWhereNoneIsEarlier) {
  EXPECT_EQ(nearest(blanks_at({5, 9}), 3), 5);
}

TEST(NearestBlank, OfABlankIsNeverItself) {
  EXPECT_EQ(nearest(blanks_at({5, 9}), 9), 5);
  EXPECT_EQ(nearest(blanks_at({5, 9}), 5), 9);
  EXPECT_EQ(nearest(blanks_at({5}), 5), 0);
}

TEST(NearestBlank, IsNoneWhereThereIsNone) {
  EXPECT_EQ(nearest(blanks_at({}), 4), 0);
}

}  // namespace
}  // namespace loqsmith
