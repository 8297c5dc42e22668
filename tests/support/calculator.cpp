#include "support/calculator.hpp"

#include <charconv>
#include <cmath>
#include <stdexcept>
#include <string_view>

namespace loqsmith::test {
namespace {

class Calculator {
 public:
  explicit Calculator(const std::string& text) : rest_(text) {}

  double whole() {
    const double value = sum();
    if (!rest_.empty()) fail();
    return value;
  }

  std::vector<double> numbers;

 private:
  [[noreturn]] void fail() const {
    throw std::runtime_error("cannot calculate at \"" + std::string(rest_) +
                             "\"");
  }

  bool take(std::string_view word) {
    if (!rest_.starts_with(word)) return false;
    rest_.remove_prefix(word.size());
    return true;
  }

  double sum() {
    double value = product();
    for (;;) {
      if (take(" + ")) {
        value += product();
      } else if (take(" - ")) {
        value -= product();
      } else {
        return value;
      }
    }
  }

  double product() {
    double value = atom();
    for (;;) {
      if (take(" x ")) {
        value *= atom();
      } else if (take(" / ")) {
        value /= atom();
      } else {
        return value;
      }
    }
  }

  double atom() {
    if (take("sqrt(")) return std::sqrt(closed());
    if (take("(")) return closed();
    double value = 0.0;
    const auto [end, error] =
        std::from_chars(rest_.data(), rest_.data() + rest_.size(), value);
    if (error != std::errc{}) fail();
    rest_.remove_prefix(static_cast<std::size_t>(end - rest_.data()));
    numbers.push_back(value);
    return value;
  }

  double closed() {
    const double value = sum();
    if (!take(")")) fail();
    return value;
  }

  std::string_view rest_;
};

}  // namespace

double calculate(const std::string& expression) {
  return Calculator(expression).whole();
}

std::vector<double> numbers_in(const std::string& expression) {
  Calculator calculator(expression);
  calculator.whole();
  return calculator.numbers;
}

}  // namespace loqsmith::test
