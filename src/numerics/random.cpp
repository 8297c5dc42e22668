#include "loqsmith/numerics/random.hpp"

#include "loqsmith/numerics/normal.hpp"

namespace loqsmith {

std::uint64_t seed_from_text(std::string_view text) {
  std::uint64_t hash = 0xcbf29ce484222325u;
  for (const char letter : text) {
    hash ^= static_cast<unsigned char>(letter);
    hash *= 0x100000001b3u;
  }
  return hash;
}

RandomStream::RandomStream(std::string_view name)
    : engine_(seed_from_text(name)) {}

double RandomStream::uniform() {
  // 52 bits and a half step keep clear of 0 and of 1.
  const double step = static_cast<double>(engine_() >> 12);
  return (step + 0.5) * 0x1p-52;
}

double RandomStream::normal() { return normal_quantile(uniform()); }

}  // namespace loqsmith
