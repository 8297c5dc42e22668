#pragma once

#include <memory>
#include <string>
#include <string_view>

namespace loqsmith {

/// SHA-256 (FIPS 180-4) of the bytes, 64 lower-case hex digits.
std::string sha256_hex(std::string_view bytes);

/// SHA-1, 40 lower-case hex digits: only to check the value that an indexed
/// mzML file carries; it detects damage, not tampering.
std::string sha1_hex(std::string_view bytes);

/// SHA-256 of bytes that come in pieces.
class Sha256 {
 public:
  Sha256();
  ~Sha256();
  Sha256(Sha256&&) noexcept;
  Sha256& operator=(Sha256&&) noexcept;
  Sha256(const Sha256&) = delete;
  Sha256& operator=(const Sha256&) = delete;

  void add(std::string_view bytes);
  std::string finish_hex();  ///< once

 private:
  struct State;
  std::unique_ptr<State> state_;
};

}  // namespace loqsmith
