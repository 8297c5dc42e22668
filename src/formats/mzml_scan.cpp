#include "loqsmith/formats/mzml_scan.hpp"

#include <algorithm>
#include <utility>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/base/xml_characters.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kMostOfAText = 4096;

std::string tag(std::string_view name) {
  constexpr std::size_t kMostOfAName = 60;
  if (name.size() > kMostOfAName) return in_quotes(name);
  return "<" + std::string(name) + ">";
}

}  // namespace

void MzmlScan::start_element(const XmlStart& start) {
  if (skipped_depth_ > 0) {
    ++skipped_depth_;
    return;
  }
  const SchemaElement* rule = nullptr;
  if (frames_.empty()) {
    check_root(start);
    rule = mzml_rule(start.local_name);
  } else {
    rule = rule_of_child(frames_.back(), start);
  }
  if (rule != nullptr && rule->name == "spectrum") {
    ++spectra_;
    skipped_depth_ = 1;
    return;
  }
  Frame frame;
  frame.rule = rule;
  frames_.push_back(std::move(frame));
  if (rule == nullptr) return;
  text_.clear();
  if (rule->name == "fileChecksum") checksum_begin_ = start.end;
  if (rule->name == "chromatogram") source_.places.pass(start.offset);
  check_attributes(*rule, start);
  if (rule->name == "run") begin_run(start);
  begin_node(*rule, start);
}

void MzmlScan::end_element(const XmlEnd&) {
  if (skipped_depth_ > 0) {
    --skipped_depth_;
    return;
  }
  const Frame frame = std::move(frames_.back());
  frames_.pop_back();
  if (frame.rule == nullptr) return;
  check_count(frame);
  if (!open_nodes_.empty()) {
    end_node();
  } else if (frame.rule->holds_text) {
    end_text_element(frame.rule->name);
  }
}

void MzmlScan::text(std::size_t begin, std::size_t end, bool verbatim) {
  if (skipped_depth_ > 0 || frames_.back().rule == nullptr) return;
  const SchemaElement& rule = *frames_.back().rule;
  const std::string_view piece = source_.bytes.substr(begin, end - begin);
  if (!rule.holds_text) {
    if (!std::all_of(piece.begin(), piece.end(), is_xml_blank)) {
      fault(begin, "text inside " + tag(rule.name), "elements only");
    }
  } else if (!open_nodes_.empty()) {
    open_nodes_.back()->text.push_back({begin, end, verbatim});
  } else if (text_.size() < kMostOfAText) {
    text_ += piece.substr(0, kMostOfAText);
  }
}

void MzmlScan::require_whole() {
  if (!run_) refuse(source_.bytes.size(), "no run", "a run element");
  if (indexed_ && !checksum_) {
    refuse(source_.bytes.size(), "an indexedmzML without fileChecksum",
           "a checksum at its end",
           "the document is incomplete: copy or export the file again");
  }
}

void MzmlScan::check_root(const XmlStart& start) {
  if (start.namespace_uri != kMzmlNamespace) {
    refuse(start.offset,
           start.namespace_uri.empty()
               ? "a root element without namespace"
               : "the namespace " + in_quotes(start.namespace_uri),
           "the namespace of mzML 1.1, " + in_quotes(kMzmlNamespace),
           "drafts before mzML 1.1 are not read: export the file again");
  }
  indexed_ = start.local_name == "indexedmzML";
  if (!indexed_ && start.local_name != "mzML") {
    refuse(start.offset, tag(start.local_name), "<mzML> or <indexedmzML>");
  }
}

const SchemaElement* MzmlScan::rule_of_child(Frame& parent,
                                             const XmlStart& start) {
  if (parent.rule == nullptr) return nullptr;
  const std::size_t place = start.namespace_uri == kMzmlNamespace
                                ? parent.rule->place_of(start.local_name)
                                : parent.rule->children.size();
  if (place == parent.rule->children.size()) {
    fault(start.offset, tag(start.name) + " inside " + tag(parent.rule->name),
          "only elements of mzML 1.1");
    return nullptr;
  }
  check_order(parent, place, start);
  return mzml_rule(start.local_name);
}

void MzmlScan::check_order(Frame& parent, std::size_t place,
                           const XmlStart& start) {
  const std::string_view name = start.local_name;
  const SchemaChild& child = parent.rule->children[place];
  if (parent.has_children && place < parent.place) {
    fault(start.offset,
          tag(name) + " too late inside " + tag(parent.rule->name),
          "the order of the schema");
  } else if (parent.has_children && place == parent.place && !child.many) {
    if (name == "run" || name == "chromatogramList" || name == "binary" ||
        name == "mzML") {
      refuse(start.offset, "a second " + tag(name), "only one");
    }
    fault(start.offset, "a second " + tag(name), "only one");
  }
  parent.has_children = true;
  parent.place = std::max(parent.place, place);
  const bool parameter = name == "cvParam" || name == "userParam" ||
                         name == "referenceableParamGroupRef";
  if (child.many && !parameter) ++parent.items;
}

void MzmlScan::check_attributes(const SchemaElement& rule,
                                const XmlStart& start) {
  for (const XmlAttribute& attribute : start.attributes) {
    // Those of other namespaces (schemaLocation, nil, xml:lang) belong to
    // nobody here, and nothing is ever fetched from where they point.
    if (!attribute.namespace_uri.empty()) continue;
    if (!rule.allows_attribute(attribute.local_name)) {
      fault(attribute.offset,
            "the attribute " + in_quotes(attribute.name) + " on " +
                tag(rule.name),
            "only attributes of mzML 1.1");
    }
    if (attribute.local_name == "count") {
      frames_.back().count = xml_value(attribute.raw_value);
    } else if (attribute.local_name == "id" && rule.name != "chromatogram") {
      ids_[std::string(rule.name)].insert(xml_value(attribute.raw_value));
    } else if (rule.name == "index" && attribute.local_name == "name") {
      index_name_ = xml_value(attribute.raw_value);
    } else {
      check_reference(attribute);
    }
  }
  if (rule.name != "offset") return;
  offset_id_.reset();
  for (const XmlAttribute& attribute : start.attributes) {
    if (attribute.name == "idRef") offset_id_ = xml_value(attribute.raw_value);
  }
}

void MzmlScan::check_reference(const XmlAttribute& attribute) {
  const std::string_view target = mzml_reference_target(attribute.local_name);
  if (target.empty()) return;
  const auto known = ids_.find(target);
  const std::string value = xml_value(attribute.raw_value);
  if (known == ids_.end() || !known->second.contains(value)) {
    notes_.add(std::string(attribute.local_name) + " " + in_quotes(value) +
               " refers to nothing in the file");
  }
}

void MzmlScan::begin_run(const XmlStart& start) {
  run_.emplace();
  for (const XmlAttribute& attribute : start.attributes) {
    if (attribute.name == "id") run_->id = xml_value(attribute.raw_value);
    if (attribute.name == "startTimeStamp") {
      run_->start_time = xml_value(attribute.raw_value);
    }
    if (attribute.name == "sampleRef") {
      const auto it = sample_names_.find(xml_value(attribute.raw_value));
      if (it != sample_names_.end()) run_->sample_name = it->second;
    }
  }
}

// The count is a hint that readers must survive being wrong.
void MzmlScan::check_count(const Frame& frame) {
  if (!frame.count || !frame.rule->name.ends_with("List")) return;
  const auto count = parse_whole(*frame.count);
  if (count && *count >= 0 && static_cast<std::size_t>(*count) == frame.items) {
    return;
  }
  notes_.add(std::string(frame.rule->name) + " says count " +
             in_quotes(*frame.count) + " and holds " +
             std::to_string(frame.items));
}

void MzmlScan::end_text_element(std::string_view name) {
  if (name == "fileChecksum") {
    checksum_ = text_;
  } else if (name == "indexListOffset") {
    index_.check_list(text_);
  } else if (name == "offset") {
    index_.check_entry(index_name_, offset_id_ ? &*offset_id_ : nullptr, text_);
  }
}

void MzmlScan::fault(std::size_t offset, const std::string& found,
                     const std::string& expected) {
  const bool in_chromatogram =
      !open_nodes_.empty() && root_.name == "chromatogram";
  // The attributes of a chromatogram are looked at before its node begins.
  const bool on_chromatogram = !frames_.empty() &&
                               frames_.back().rule != nullptr &&
                               frames_.back().rule->name == "chromatogram";
  if (!in_chromatogram && !on_chromatogram) {
    notes_.add(found + ", expected " + expected);
  } else if (!chromatogram_fault_) {
    chromatogram_fault_ = source_.problem(offset, found, expected);
  }
}

void MzmlScan::refuse(std::size_t offset, std::string found,
                      std::string expected, std::string mend) {
  throw InputError(source_.problem(offset, std::move(found),
                                   std::move(expected), std::move(mend)));
}

}  // namespace loqsmith
