#pragma once

#include <filesystem>
#include <memory>
#include <string>
#include <string_view>

namespace loqsmith {

// Ed25519 signatures (RFC 8032, 2017, section 5.1; pure, without context). Keys
// lie in PEM files (RFC 8410, 2018), as `openssl genpkey -algorithm ed25519`
// and `openssl pkey -pubout` write them. Elsewhere public keys are 64 and
// signatures 128 lower-case hex digits.

/// A key that signs. Its file is read once; nothing shows what is in it.
class SigningKey {
 public:
  /// @throws InputError where the file cannot be read, is no unencrypted
  ///         Ed25519 private key, or may be opened by group or others: mode
  ///         0600, or 0400
  static SigningKey read(const std::filesystem::path& file);

  /// From the 32 secret bytes, 64 hex digits: for published vectors.
  /// @throws InputError for any other text
  static SigningKey from_hex(std::string_view secret);

  SigningKey(SigningKey&&) noexcept;
  SigningKey& operator=(SigningKey&&) noexcept;
  SigningKey(const SigningKey&) = delete;
  SigningKey& operator=(const SigningKey&) = delete;
  ~SigningKey();

  std::string public_key() const;
  std::string sign(std::string_view bytes) const;

 private:
  struct Key;
  explicit SigningKey(std::unique_ptr<Key> key);
  std::unique_ptr<Key> key_;
};

/// The public key in a PEM file.
/// @throws InputError where the file cannot be read or holds none
std::string read_public_key(const std::filesystem::path& file);

/// True for a public key as read_public_key() gives it.
bool is_public_key(std::string_view text);

/// Whether the signature over these bytes was made with the private key of
/// `public_key`. False for texts that are no key or no signature.
bool is_signed_by(std::string_view public_key, std::string_view bytes,
                  std::string_view signature);

}  // namespace loqsmith
