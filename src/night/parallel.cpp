#include "loqsmith/night/parallel.hpp"

#include <algorithm>
#include <atomic>
#include <exception>
#include <mutex>
#include <thread>
#include <vector>

namespace loqsmith {

void for_each_index(std::size_t count, unsigned jobs,
                    const std::function<void(std::size_t)>& work) {
  std::atomic<std::size_t> next{0};
  std::exception_ptr failure;
  std::mutex failure_mutex;
  const auto loop = [&] {
    for (std::size_t i = next++; i < count; i = next++) {
      try {
        work(i);
      } catch (...) {
        const std::lock_guard<std::mutex> guard(failure_mutex);
        if (!failure) failure = std::current_exception();
        next = count;
      }
    }
  };
  const std::size_t helpers =
      std::min<std::size_t>(std::max(1U, jobs),
                            std::max<std::size_t>(1, count)) -
      1;
  {
    std::vector<std::jthread> threads;
    for (std::size_t i = 0; i < helpers; ++i) threads.emplace_back(loop);
    loop();
  }
  if (failure) std::rethrow_exception(failure);
}

}  // namespace loqsmith
