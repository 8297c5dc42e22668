#include "loqsmith/base/digest.hpp"

#include <openssl/evp.h>

#include <array>
#include <new>

namespace loqsmith {
namespace {

using Context = std::unique_ptr<EVP_MD_CTX, decltype(&EVP_MD_CTX_free)>;

std::string finish(EVP_MD_CTX* context) {
  std::array<unsigned char, EVP_MAX_MD_SIZE> digest{};
  unsigned length = 0;
  if (EVP_DigestFinal_ex(context, digest.data(), &length) != 1) {
    throw std::bad_alloc();
  }
  constexpr std::string_view kHex = "0123456789abcdef";
  std::string text;
  for (unsigned i = 0; i < length; ++i) {
    text += kHex[digest[i] >> 4U];
    text += kHex[digest[i] & 0xFU];
  }
  return text;
}

Context begin(const EVP_MD* kind) {
  Context context(EVP_MD_CTX_new(), &EVP_MD_CTX_free);
  if (!context || EVP_DigestInit_ex(context.get(), kind, nullptr) != 1) {
    throw std::bad_alloc();
  }
  return context;
}

std::string digest(std::string_view bytes, const EVP_MD* kind) {
  const Context context = begin(kind);
  EVP_DigestUpdate(context.get(), bytes.data(), bytes.size());
  return finish(context.get());
}

}  // namespace

std::string sha256_hex(std::string_view bytes) {
  return digest(bytes, EVP_sha256());
}

std::string sha1_hex(std::string_view bytes) {
  return digest(bytes, EVP_sha1());
}

struct Sha256::State {
  Context context = begin(EVP_sha256());
};

Sha256::Sha256() : state_(std::make_unique<State>()) {}
Sha256::~Sha256() = default;
Sha256::Sha256(Sha256&&) noexcept = default;
Sha256& Sha256::operator=(Sha256&&) noexcept = default;

void Sha256::add(std::string_view bytes) {
  EVP_DigestUpdate(state_->context.get(), bytes.data(), bytes.size());
}

std::string Sha256::finish_hex() { return finish(state_->context.get()); }

}  // namespace loqsmith
