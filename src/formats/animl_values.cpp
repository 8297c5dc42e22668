#include "loqsmith/formats/animl_values.hpp"

#include <algorithm>
#include <cstdint>
#include <optional>
#include <utility>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/base/xml_scan.hpp"
#include "loqsmith/formats/base64.hpp"

namespace loqsmith {
namespace {

// One value set. Indices count from zero, both inclusive in the document.
struct Block {
  const AnimlNode* node = nullptr;
  std::size_t start = 0;
  std::size_t count = 0;
  std::vector<double> values;  ///< none where they are generated
  double first = 0.0;
  double increment = 0.0;
};

bool is_generated(const AnimlNode& set) {
  return set.name == "AutoIncrementedValueSet";
}

class SeriesDecoder {
 public:
  SeriesDecoder(const AnimlSeries& series, std::size_t length,
                std::size_t& generated_left, DocumentSource& source)
      : series_(series),
        length_(length),
        generated_left_(generated_left),
        source_(source) {}

  std::vector<double> run() {
    std::vector<const AnimlNode*> sets;
    for (const AnimlNode& child : series_.node->children) {
      if (child.name == "Unit") continue;
      if (!sets.empty() && sets.front()->name != child.name) {
        fail(child,
             "a <" + std::string(child.name) + "> beside <" +
                 std::string(sets.front()->name) + ">",
             "one kind of value sets");
      }
      sets.push_back(&child);
    }
    std::vector<Block> blocks;
    blocks.reserve(sets.size());
    for (const AnimlNode* set : sets) {
      blocks.push_back(read_block(*set, sets.size() > 1));
    }
    require_no_holes(blocks);
    return put_together(blocks);
  }

 private:
  [[noreturn]] void fail(const AnimlNode& node, const std::string& found,
                         std::string expected) {
    throw InputError(source_.problem(
        node.offset, found + " in the " + std::string(series_.word),
        std::move(expected), "export the file again"));
  }

  std::optional<std::size_t> index(const AnimlNode& set,
                                   std::string_view name) {
    const std::string* written = set.attribute(name);
    if (written == nullptr) return std::nullopt;
    const auto value = parse_whole(*written);
    if (!value || *value < 0 || static_cast<std::size_t>(*value) >= length_) {
      fail(set, std::string(name) + " " + in_quotes(*written),
           "an index from 0 and below the length " + std::to_string(length_));
    }
    return static_cast<std::size_t>(*value);
  }

  Block read_block(const AnimlNode& set, bool one_of_several) {
    Block block;
    block.node = &set;
    const auto start = index(set, "startIndex");
    const auto end = index(set, "endIndex");
    if (one_of_several && !start) {
      fail(set, "one of several value sets without startIndex",
           "an index on each");
    }
    block.start = start.value_or(0);
    if (end && *end < block.start) {
      fail(set,
           "endIndex " + std::to_string(*end) + " before startIndex " +
               std::to_string(block.start),
           "an endIndex not before startIndex");
    }
    if (is_generated(set)) {
      if (length_ == 0) fail(set, "a value set", "none, as the length 0 says");
      block.count = end.value_or(length_ - 1) + 1 - block.start;
      read_rule(set, block);
      return block;
    }
    block.values = set.name == "EncodedValueSet" ? encoded(set) : listed(set);
    block.count = block.values.size();
    if (end && block.count != *end + 1 - block.start) {
      fail(set, std::to_string(block.count) + " values",
           std::to_string(*end + 1 - block.start) +
               ", as startIndex and endIndex say");
    }
    return block;
  }

  void read_rule(const AnimlNode& set, Block& block) {
    block.first = rule_value(set, "StartValue");
    block.increment = rule_value(set, "Increment");
    if (series_.is_time && !(block.increment > 0.0)) {
      fail(set, "the increment " + shortest(block.increment),
           "an increment above 0");
    }
  }

  double rule_value(const AnimlNode& set, std::string_view name) {
    const AnimlNode* node = set.child(name);
    if (node == nullptr || node->children.size() != 1) {
      fail(set,
           node == nullptr ? "no " + std::string(name)
                           : std::to_string(node->children.size()) +
                                 " values of " + std::string(name),
           "one value");
    }
    const AnimlNode& value = node->children.front();
    std::string storage;
    return number(set, value.name,
                  joined_text(value.text, source_.bytes, storage));
  }

  double number(const AnimlNode& set, std::string_view element,
                std::string_view text) {
    const std::string_view wanted = element_of(series_.type);
    if (element != wanted) {
      fail(set, "the value element <" + std::string(element) + ">",
           "<" + std::string(wanted) + ">, as seriesType says");
    }
    const auto value = parse_animl_number(text, series_.type);
    if (!value) fail(set, value.reason(), "finite numbers of the seriesType");
    return *value;
  }

  static std::string_view element_of(NumberType type) {
    for (const std::string_view name : {"Int32", "Int64", "Float32"}) {
      const AnimlType* known = animl_type(name);
      if (known->number == type) return known->element;
    }
    return animl_type("Float64")->element;
  }

  std::vector<double> listed(const AnimlNode& set) {
    if (set.values.empty()) fail(set, "an empty value set", "values");
    std::vector<double> values;
    values.reserve(set.values.size());
    for (const AnimlValue& value : set.values) {
      const std::string_view raw =
          source_.bytes.substr(value.begin, value.end - value.begin);
      // Comments and sections between digits would hide what is written.
      if (raw.find('<') != std::string_view::npos) {
        fail(set, "markup inside a value", "plain text");
      }
      values.push_back(raw.find('&') == std::string_view::npos
                           ? number(set, value.element, raw)
                           : number(set, value.element, xml_text(raw)));
    }
    return values;
  }

  std::vector<double> encoded(const AnimlNode& set) {
    std::string storage;
    auto decoded = decode_base64(joined_text(set.text, source_.bytes, storage));
    if (!decoded) fail(set, decoded.reason(), "sound data");
    const std::string& bytes = decoded.value().bytes;
    if (bytes.size() % width_of(series_.type) != 0) {
      fail(set, std::to_string(bytes.size()) + " bytes",
           "whole values of " + std::to_string(width_of(series_.type)) +
               " bytes");
    }
    auto values = widen(bytes, series_.type);
    if (!values) fail(set, values.reason(), "sound data");
    return std::move(values.value());
  }

  void require_no_holes(std::vector<Block>& blocks) {
    std::stable_sort(
        blocks.begin(), blocks.end(),
        [](const Block& a, const Block& b) { return a.start < b.start; });
    std::size_t next = 0;
    std::size_t generated = 0;
    for (const Block& block : blocks) {
      if (block.start > next) {
        fail(*block.node,
             "no values from index " + std::to_string(next) + " to " +
                 std::to_string(block.start - 1),
             "a value for each index");
      }
      if (block.start < next) {
        fail(*block.node,
             "a second value for index " + std::to_string(block.start),
             "one value for each index");
      }
      next += block.count;
      if (is_generated(*block.node)) generated += block.count;
    }
    if (next != length_) {
      fail(*series_.node, std::to_string(next) + " values",
           std::to_string(length_) + ", the length of the SeriesSet");
    }
    if (!series_.is_time) spend(generated);
  }

  void spend(std::size_t generated) {
    if (generated > generated_left_) {
      fail(*series_.node, std::to_string(generated) + " generated values",
           "at most " + std::to_string(kMostGenerated) + " in a file");
    }
    generated_left_ -= generated;
  }

  // Each generated value by one multiplication, so that rounding errors do not
  // add up along the trace.
  std::vector<double> put_together(std::vector<Block>& blocks) const {
    if (blocks.size() == 1 && !is_generated(*blocks.front().node)) {
      return std::move(blocks.front().values);
    }
    std::vector<double> values;
    values.reserve(length_);
    for (const Block& block : blocks) {
      values.insert(values.end(), block.values.begin(), block.values.end());
      if (!is_generated(*block.node)) continue;
      for (std::size_t i = 0; i < block.count; ++i) {
        values.push_back(block.first +
                         static_cast<double>(i) * block.increment);
      }
    }
    return values;
  }

  const AnimlSeries& series_;
  std::size_t length_;
  std::size_t& generated_left_;
  DocumentSource& source_;
};

}  // namespace

std::vector<double> decode_animl_series(const AnimlSeries& series,
                                        std::size_t length,
                                        std::size_t& generated_left,
                                        DocumentSource& source) {
  return SeriesDecoder(series, length, generated_left, source).run();
}

std::string animl_encoding(const AnimlNode& series) {
  if (series.child("EncodedValueSet") != nullptr) return "encoded";
  if (series.child("IndividualValueSet") != nullptr) {
    return "individual values";
  }
  if (series.child("AutoIncrementedValueSet") != nullptr) {
    return "auto-incremented";
  }
  return "no values";
}

}  // namespace loqsmith
