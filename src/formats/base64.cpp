#include "loqsmith/formats/base64.hpp"

#include <array>
#include <cstdint>

#include "loqsmith/base/text.hpp"

namespace loqsmith {
namespace {

constexpr std::uint8_t kForeign = 0xFF;
constexpr std::uint8_t kBlank = 0xFE;
constexpr std::uint8_t kPadding = 0xFD;
constexpr std::uint8_t kLargest = 63;

constexpr std::array<std::uint8_t, 256> values() {
  std::array<std::uint8_t, 256> table{};
  table.fill(kForeign);
  constexpr std::string_view kDigits =
      "ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789+/";
  for (std::size_t i = 0; i < kDigits.size(); ++i) {
    table[static_cast<unsigned char>(kDigits[i])] =
        static_cast<std::uint8_t>(i);
  }
  for (const char c : {' ', '\t', '\r', '\n'}) {
    table[static_cast<unsigned char>(c)] = kBlank;
  }
  table[static_cast<unsigned char>('=')] = kPadding;
  return table;
}

constexpr std::array<std::uint8_t, 256> kValues = values();

std::uint8_t value_of(char c) { return kValues[static_cast<unsigned char>(c)]; }

class Decoder {
 public:
  explicit Decoder(std::string_view text) : text_(text) {
    result_.bytes.resize(text.size() / 4 * 3 + 3);
  }

  Outcome<DecodedBase64> run() {
    while (at_ < text_.size() && reason_.empty()) {
      if (filled_ > 0 || padding_ > 0 || !take_quads()) take_one();
    }
    if (reason_.empty()) finish();
    if (!reason_.empty()) return NotApplicable{reason_};
    result_.bytes.resize(size_);
    return std::move(result_);
  }

 private:
  // Four plain digits a step; false where another character stands among the
  // next four.
  bool take_quads() {
    const std::size_t start = at_;
    while (at_ + 4 <= text_.size()) {
      const std::uint8_t a = value_of(text_[at_]);
      const std::uint8_t b = value_of(text_[at_ + 1]);
      const std::uint8_t c = value_of(text_[at_ + 2]);
      const std::uint8_t d = value_of(text_[at_ + 3]);
      if ((a | b | c | d) > kLargest) break;
      append((std::uint32_t{a} << 18U) | (std::uint32_t{b} << 12U) |
                 (std::uint32_t{c} << 6U) | d,
             3);
      at_ += 4;
    }
    result_.characters += at_ - start;
    return at_ > start;
  }

  void take_one() {
    const char c = text_[at_];
    const std::uint8_t value = value_of(c);
    if (value == kForeign) {
      reason_ = "the character " + in_quotes({&c, 1}) + " at position " +
                std::to_string(at_ + 1) + " of the base64 text";
    } else if (value != kBlank) {
      ++result_.characters;
      take_digit(value);
    }
    ++at_;
  }

  void take_digit(std::uint8_t value) {
    if (value == kPadding) {
      ++padding_;
      if (filled_ < 2 || padding_ + filled_ > 4) {
        reason_ = "base64 padding in the wrong place";
      }
      return;
    }
    if (padding_ > 0) {
      reason_ = "base64 padding before the end";
      return;
    }
    word_ = (word_ << 6U) | value;
    if (++filled_ < 4) return;
    append(word_, 3);
    word_ = 0;
    filled_ = 0;
  }

  void finish() {
    if (filled_ == 0) return;
    if (filled_ + padding_ != 4) {
      reason_ = "base64 text of " + std::to_string(result_.characters) +
                " characters, no multiple of four";
      return;
    }
    const unsigned spare = 6U * static_cast<unsigned>(padding_);
    const std::uint32_t whole = word_ << spare;
    const std::uint32_t unused = padding_ == 1 ? 0xFFU : 0xFFFFU;
    if ((whole & unused) != 0) {
      reason_ = "base64 text whose spare bits are not zero";
      return;
    }
    append(whole, 3U - static_cast<unsigned>(padding_));
  }

  // The buffer has three bytes to spare, so all three may always be written.
  void append(std::uint32_t word, std::size_t count) {
    char* const out = result_.bytes.data() + size_;
    out[0] = static_cast<char>(word >> 16U);
    out[1] = static_cast<char>(word >> 8U);
    out[2] = static_cast<char>(word);
    size_ += count;
  }

  std::string_view text_;
  std::size_t at_ = 0;
  std::size_t size_ = 0;    ///< bytes made
  std::uint32_t word_ = 0;  ///< digits of a quad that came one by one
  std::size_t filled_ = 0;
  std::size_t padding_ = 0;
  DecodedBase64 result_;
  std::string reason_;
};

}  // namespace

Outcome<DecodedBase64> decode_base64(std::string_view text) {
  return Decoder(text).run();
}

}  // namespace loqsmith
