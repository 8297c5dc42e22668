#include "loqsmith/formats/animl_units.hpp"

#include <array>
#include <utility>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"

namespace loqsmith {
namespace {

struct KnownLabel {
  std::string_view label;
  double seconds = 1.0;  ///< one unit
  TimeUnit unit;
};

// Source: AnIML unit entities for technique definitions (ASTM E13.15), from
// memory.
constexpr std::array kLabels{
    KnownLabel{"min", 60.0, {1.0, 1.0, true}},
    KnownLabel{"s", 1.0, {1.0, 60.0, true}},
    KnownLabel{"ms", 1e-3, {1.0, 60000.0, true}},
    KnownLabel{"h", 3600.0, {60.0, 1.0, true}},
};

const KnownLabel* known_label(std::string_view label) {
  for (const KnownLabel& known : kLabels) {
    if (known.label == label) return &known;
  }
  return nullptr;
}

// A factor that means one of the known units converts as exactly as its label.
TimeUnit unit_of_factor(double seconds) {
  for (const KnownLabel& known : kLabels) {
    if (known.seconds == seconds) return known.unit;
  }
  return {seconds, 60.0, true};
}

class TimeUnitReader {
 public:
  TimeUnitReader(const AnimlNode& unit, DocumentSource& source)
      : unit_(unit), source_(source), label_(unit.text_of("label")) {}

  AnimlTimeUnit run() {
    AnimlTimeUnit result;
    result.stated = true;
    result.label = label_;
    result.is_time = means_time();
    if (!result.is_time) return result;
    if (label_.empty()) fail("no label on the time unit", "a label");
    const KnownLabel* known = known_label(label_);
    if (unit_.children.empty()) {
      if (known == nullptr) {
        fail("the time unit " + in_quotes(label_) + " without SIUnit",
             "min, s, ms or h, or an SIUnit");
      }
      result.unit = known->unit;
      return result;
    }
    const double seconds = si_seconds();
    if (known != nullptr && known->seconds != seconds) {
      fail("the time unit " + in_quotes(label_) + " with the factor " +
               shortest(seconds),
           "a label and an SIUnit that agree");
    }
    result.unit = unit_of_factor(seconds);
    return result;
  }

 private:
  [[noreturn]] void fail(std::string found, std::string expected) {
    throw InputError(source_.problem(unit_.offset, std::move(found),
                                     std::move(expected),
                                     "state the time unit in the file"));
  }

  std::string symbol(const AnimlNode& si) const {
    std::string storage;
    return collapsed(joined_text(si.text, source_.bytes, storage));
  }

  double number(const AnimlNode& si, std::string_view name, double otherwise) {
    const std::string* written = si.attribute(name);
    if (written == nullptr) return otherwise;
    const auto value = parse_number(*written);
    if (!value) {
      fail("the " + std::string(name) + " " + in_quotes(*written) +
               " of an SIUnit",
           "a plain decimal number");
    }
    return *value;
  }

  bool means_time() {
    if (known_label(label_) != nullptr || unit_.text_of("quantity") == "Time") {
      return true;
    }
    return unit_.children.size() == 1 && symbol(unit_.children[0]) == "s" &&
           number(unit_.children[0], "exponent", 1.0) == 1.0;
  }

  double si_seconds() {
    const AnimlNode& si = unit_.children.front();
    if (unit_.children.size() != 1 || symbol(si) != "s" ||
        number(si, "exponent", 1.0) != 1.0 ||
        number(si, "offset", 0.0) != 0.0) {
      fail("the time unit " + in_quotes(label_) +
               " with an SIUnit that is no time",
           "exactly one SIUnit s with exponent 1 and offset 0");
    }
    const double factor = number(si, "factor", 1.0);
    if (!(factor > 0.0)) {
      fail("the factor " + shortest(factor) + " of the time unit",
           "a factor above 0");
    }
    return factor;
  }

  const AnimlNode& unit_;
  DocumentSource& source_;
  std::string label_;
};

}  // namespace

AnimlTimeUnit read_animl_time_unit(const AnimlNode& series,
                                   DocumentSource& source) {
  const AnimlNode* unit = series.child("Unit");
  if (unit == nullptr) return {};
  return TimeUnitReader(*unit, source).run();
}

std::string animl_unit_label(const AnimlNode& series) {
  const AnimlNode* unit = series.child("Unit");
  return unit == nullptr ? std::string() : unit->text_of("label");
}

}  // namespace loqsmith
