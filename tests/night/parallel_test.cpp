#include "loqsmith/night/parallel.hpp"

#include <atomic>
#include <stdexcept>

namespace loqsmith {
namespace {

TEST(ForEachIndex, VisitsEachIndexOnceWhateverTheThreads) {
  for (const unsigned jobs : {0U, 1U, 2U, 8U, 200U}) {
    std::vector<std::atomic<int>> visits(100);
    for_each_index(visits.size(), jobs,
                   [&](std::size_t i) { visits[i].fetch_add(1); });
    for (const std::atomic<int>& count : visits) EXPECT_EQ(count.load(), 1);
  }
}

TEST(ForEachIndex, DoesNothingForNoWork) {
  for_each_index(0, 4, [](std::size_t) { FAIL() << "there is no index"; });
}

TEST(ForEachIndex, ThrowsTheFirstFailureAgainAndStops) {
  std::atomic<int> done{0};
  EXPECT_THROW(for_each_index(100000, 2,
                              [&](std::size_t i) {
                                if (i == 3) throw std::runtime_error("three");
                                done.fetch_add(1);
                              }),
               std::runtime_error);
  EXPECT_LT(done.load(), 100000);
}

}  // namespace
}  // namespace loqsmith
