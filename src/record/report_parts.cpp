#include "loqsmith/record/report_parts.hpp"

#include "loqsmith/record/html.hpp"

namespace loqsmith {

bool is_sample_like(Role role) {
  return role == Role::Sample || repeats_another(role);
}

std::string status_words(Status status) {
  switch (status) {
    case Status::NotDetected:
      return "not detected";
    case Status::Estimated:
      return "estimated";
    case Status::Reportable:
      return "reportable";
    case Status::AboveRange:
      return "above the range";
    case Status::Withheld:
      return "withheld";
  }
  return {};
}

std::string status_mark(Status status) {
  return "<svg class=\"mark\" aria-hidden=\"true\"><use href=\"#mark-" +
         status_name(status) + "\"/></svg>";
}

std::string result_id(int injection, const std::string& analyte) {
  return html_id("r" + std::to_string(injection) + "-", analyte);
}

std::string analyte_id(const std::string& analyte) {
  return html_id("a-", analyte);
}

std::string residuals_id(const std::string& analyte, const std::string& set) {
  return html_id("d-", analyte) + html_id("__", set);
}

std::string limit_row_id(const std::string& analyte, const std::string& set,
                         std::size_t row) {
  return html_id("l" + std::to_string(row) + "-", analyte) + html_id("__", set);
}

}  // namespace loqsmith
