#include "loqsmith/base/ed25519.hpp"

#include <fcntl.h>
#include <openssl/crypto.h>
#include <openssl/evp.h>
#include <openssl/pem.h>
#include <sys/stat.h>

#include <array>
#include <cerrno>
#include <optional>
#include <system_error>
#include <vector>

#include "loqsmith/base/file_ops.hpp"
#include "loqsmith/base/input_error.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;

using KeyPointer = std::unique_ptr<EVP_PKEY, decltype(&EVP_PKEY_free)>;
using Bytes = std::vector<unsigned char>;

constexpr std::size_t kKeyBytes = 32;
constexpr std::size_t kSignatureBytes = 64;
constexpr std::size_t kMostFileBytes = 16384;

[[noreturn]] void refuse(const fs::path& file, const std::string& found,
                         const std::string& expected, const std::string& mend) {
  InputProblem problem;
  problem.file = file.string();
  problem.found = found;
  problem.expected = expected;
  problem.mend = mend;
  throw InputError(problem);
}

std::string hex_of(const unsigned char* bytes, std::size_t size) {
  constexpr std::string_view kHex = "0123456789abcdef";
  std::string text;
  for (std::size_t i = 0; i < size; ++i) {
    text += kHex[bytes[i] >> 4U];
    text += kHex[bytes[i] & 0xFU];
  }
  return text;
}

std::optional<unsigned> hex_digit(char c) {
  if (c >= '0' && c <= '9') return static_cast<unsigned>(c - '0');
  if (c >= 'a' && c <= 'f') return static_cast<unsigned>(c - 'a') + 10U;
  return std::nullopt;
}

// Exactly `size` bytes in lower-case hex; nothing for any other text.
std::optional<Bytes> bytes_of(std::string_view hex, std::size_t size) {
  if (hex.size() != 2 * size) return std::nullopt;
  Bytes bytes;
  for (std::size_t i = 0; i < hex.size(); i += 2) {
    const auto high = hex_digit(hex[i]);
    const auto low = hex_digit(hex[i + 1]);
    if (!high || !low) return std::nullopt;
    bytes.push_back(static_cast<unsigned char>(*high << 4U | *low));
  }
  return bytes;
}

// The mode is that of the very file that is read, not of a name.
void demand_private(int descriptor, const fs::path& file) {
  struct stat found {};
  if (::fstat(descriptor, &found) != 0) {
    throw std::system_error(errno, std::generic_category(), file.string());
  }
  if ((found.st_mode & 0177U) == 0) return;
  refuse(file, "a private key that not only its owner can open",
         "a file of mode 0600", "chmod 600 the file");
}

std::string read_key_file(const fs::path& file, bool is_private) {
  try {
    const Descriptor opened(
        file_ops::open(file, O_RDONLY | O_NONBLOCK | O_CLOEXEC));
    struct stat found {};
    if (::fstat(opened.number(), &found) != 0 || !S_ISREG(found.st_mode)) {
      refuse(file, "something that is no file", "a key in a PEM file", "");
    }
    if (is_private) demand_private(opened.number(), file);
    std::string bytes(kMostFileBytes, '\0');
    bytes.resize(
        file_ops::read(opened.number(), file, bytes.data(), bytes.size()));
    return bytes;
  } catch (const std::system_error& error) {
    refuse(file, error.code().message(), "a key in a PEM file",
           "put the file in its place and allow reading it");
  }
}

// Never asks for a password: a program that runs at night has nobody to ask.
int no_password(char*, int, int, void*) { return -1; }

using ReadPem = EVP_PKEY* (*)(BIO*, EVP_PKEY**, pem_password_cb*, void*);

KeyPointer key_from_pem(const fs::path& file, const std::string& text,
                        ReadPem read_pem, const char* expected) {
  const std::unique_ptr<BIO, decltype(&BIO_free)> bio(
      BIO_new_mem_buf(text.data(), static_cast<int>(text.size())), &BIO_free);
  if (!bio) throw std::bad_alloc();
  KeyPointer key(read_pem(bio.get(), nullptr, &no_password, nullptr),
                 &EVP_PKEY_free);
  if (!key || EVP_PKEY_id(key.get()) != EVP_PKEY_ED25519) {
    refuse(file, "another content", expected,
           "make a pair with openssl genpkey -algorithm ed25519 and openssl "
           "pkey -pubout");
  }
  return key;
}

std::string public_part(const EVP_PKEY* key) {
  std::array<unsigned char, kKeyBytes> bytes{};
  std::size_t size = bytes.size();
  if (EVP_PKEY_get_raw_public_key(key, bytes.data(), &size) != 1 ||
      size != bytes.size()) {
    throw std::bad_alloc();
  }
  return hex_of(bytes.data(), size);
}

const unsigned char* unsigned_of(std::string_view bytes) {
  return reinterpret_cast<const unsigned char*>(bytes.data());
}

using DigestContext = std::unique_ptr<EVP_MD_CTX, decltype(&EVP_MD_CTX_free)>;

}  // namespace

struct SigningKey::Key {
  KeyPointer pointer;
};

SigningKey::SigningKey(std::unique_ptr<Key> key) : key_(std::move(key)) {}
SigningKey::SigningKey(SigningKey&&) noexcept = default;
SigningKey& SigningKey::operator=(SigningKey&&) noexcept = default;
SigningKey::~SigningKey() = default;

SigningKey SigningKey::read(const fs::path& file) {
  std::string text = read_key_file(file, /*is_private=*/true);
  KeyPointer key =
      key_from_pem(file, text, &PEM_read_bio_PrivateKey,
                   "an Ed25519 private key without password in a PEM file");
  OPENSSL_cleanse(text.data(), text.size());
  return SigningKey(std::make_unique<Key>(Key{std::move(key)}));
}

SigningKey SigningKey::from_hex(std::string_view secret) {
  const auto bytes = bytes_of(secret, kKeyBytes);
  if (!bytes) refuse("", "another text", "64 lower-case hex digits", "");
  KeyPointer key(EVP_PKEY_new_raw_private_key(EVP_PKEY_ED25519, nullptr,
                                              bytes->data(), bytes->size()),
                 &EVP_PKEY_free);
  if (!key) throw std::bad_alloc();
  return SigningKey(std::make_unique<Key>(Key{std::move(key)}));
}

std::string SigningKey::public_key() const {
  return public_part(key_->pointer.get());
}

std::string SigningKey::sign(std::string_view bytes) const {
  const DigestContext context(EVP_MD_CTX_new(), &EVP_MD_CTX_free);
  std::array<unsigned char, kSignatureBytes> signature{};
  std::size_t size = signature.size();
  if (!context ||
      EVP_DigestSignInit(context.get(), nullptr, nullptr, nullptr,
                         key_->pointer.get()) != 1 ||
      EVP_DigestSign(context.get(), signature.data(), &size, unsigned_of(bytes),
                     bytes.size()) != 1) {
    throw std::bad_alloc();
  }
  return hex_of(signature.data(), size);
}

std::string read_public_key(const fs::path& file) {
  const std::string text = read_key_file(file, /*is_private=*/false);
  return public_part(key_from_pem(file, text, &PEM_read_bio_PUBKEY,
                                  "an Ed25519 public key in a PEM file")
                         .get());
}

bool is_public_key(std::string_view text) {
  return bytes_of(text, kKeyBytes).has_value();
}

bool is_signed_by(std::string_view public_key, std::string_view bytes,
                  std::string_view signature) {
  const auto key_bytes = bytes_of(public_key, kKeyBytes);
  const auto signature_bytes = bytes_of(signature, kSignatureBytes);
  if (!key_bytes || !signature_bytes) return false;
  const KeyPointer key(
      EVP_PKEY_new_raw_public_key(EVP_PKEY_ED25519, nullptr, key_bytes->data(),
                                  key_bytes->size()),
      &EVP_PKEY_free);
  const DigestContext context(EVP_MD_CTX_new(), &EVP_MD_CTX_free);
  return key && context &&
         EVP_DigestVerifyInit(context.get(), nullptr, nullptr, nullptr,
                              key.get()) == 1 &&
         EVP_DigestVerify(context.get(), signature_bytes->data(),
                          signature_bytes->size(), unsigned_of(bytes),
                          bytes.size()) == 1;
}

}  // namespace loqsmith
