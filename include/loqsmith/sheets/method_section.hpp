#pragma once

#include <optional>
#include <stdexcept>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

#include "loqsmith/sheets/method.hpp"
#include "loqsmith/sheets/method_tree.hpp"
#include "loqsmith/sheets/value_check.hpp"

namespace loqsmith {

/// One element's attributes as they hold for an analyte: its own, else the
/// method's, else the default. Where attributes exclude each other, one given
/// by the analyte also displaces the method's other one, and one given
/// anywhere displaces the default of the other.
class Section {
 public:
  /// @param own     of the analyte, or the only one; may be null
  /// @param shared  of the method; may be null
  explicit Section(const ElementRule& rule, const MethodElement* own,
                   const MethodElement* shared = nullptr)
      : rule_(rule), own_(own), shared_(shared) {}

  const ElementRule& rule() const { return rule_; }

  /// What was written; nothing where left out or not valid.
  std::optional<std::string> given(std::string_view name) const;

  /// What holds; nothing where left out without a default.
  std::optional<std::string> text(std::string_view name) const;

  /// What holds for an attribute that is required or has a default.
  std::string value(std::string_view name) const;
  double number(std::string_view name) const { return number_of(value(name)); }
  int whole(std::string_view name) const { return whole_of(value(name)); }
  std::optional<double> optional_number(std::string_view name) const;

  /// The value as a setting.
  template <class T>
  T pick(std::string_view name,
         const std::vector<std::pair<std::string_view, T>>& meanings) const {
    const std::string word = value(name);
    for (const auto& [known, meaning] : meanings) {
      if (known == word) return meaning;
    }
    throw std::logic_error("no setting for " + std::string(name) + '=' + word);
  }

  /// Appends the defaults that hold.
  void note_defaults(const std::string& element,
                     std::vector<DefaultUsed>& defaults) const;

 private:
  bool displaces(const MethodElement* element, std::string_view name) const;

  const ElementRule& rule_;
  const MethodElement* own_;
  const MethodElement* shared_;
};

}  // namespace loqsmith
