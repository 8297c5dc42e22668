#include "loqsmith/formats/binary_numbers.hpp"

#include <bit>
#include <cstdint>
#include <cstring>

namespace loqsmith {
namespace {

static_assert(std::endian::native == std::endian::little);

constexpr std::int64_t kLastExact = std::int64_t{1} << 53U;

template <class Stored>
std::vector<double> copy_widened(std::string_view bytes) {
  std::vector<double> values(bytes.size() / sizeof(Stored));
  for (std::size_t i = 0; i < values.size(); ++i) {
    Stored stored{};
    std::memcpy(&stored, bytes.data() + i * sizeof(Stored), sizeof(Stored));
    values[i] = static_cast<double>(stored);
  }
  return values;
}

Outcome<std::vector<double>> copy_exact_integers(std::string_view bytes) {
  for (std::size_t i = 0; i + 8 <= bytes.size(); i += 8) {
    std::int64_t stored = 0;
    std::memcpy(&stored, bytes.data() + i, sizeof stored);
    if (stored > kLastExact || stored < -kLastExact) {
      return NotApplicable{"the integer " + std::to_string(stored) +
                           " at index " + std::to_string(i / 8) +
                           ", beyond what a double holds exactly"};
    }
  }
  return copy_widened<std::int64_t>(bytes);
}

}  // namespace

std::size_t width_of(NumberType type) {
  switch (type) {
    case NumberType::Float32:
    case NumberType::Int32:
      return 4;
    case NumberType::Float64:
    case NumberType::Int64:
      return 8;
  }
  return 8;
}

std::string number_type_name(NumberType type) {
  switch (type) {
    case NumberType::Float32:
      return "32-bit float";
    case NumberType::Float64:
      return "64-bit float";
    case NumberType::Int32:
      return "32-bit integer";
    case NumberType::Int64:
      return "64-bit integer";
  }
  return {};
}

Outcome<std::vector<double>> widen(std::string_view bytes, NumberType type) {
  switch (type) {
    case NumberType::Float32:
      return copy_widened<float>(bytes);
    case NumberType::Float64:
      return copy_widened<double>(bytes);
    case NumberType::Int32:
      return copy_widened<std::int32_t>(bytes);
    case NumberType::Int64:
      return copy_exact_integers(bytes);
  }
  return NotApplicable{"an unknown number type"};
}

}  // namespace loqsmith
