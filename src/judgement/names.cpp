#include "loqsmith/judgement/settings.hpp"

namespace loqsmith {

std::string check_action_name(CheckAction action) {
  switch (action) {
    case CheckAction::Withhold:
      return "withhold";
    case CheckAction::Flag:
      return "flag";
  }
  return {};
}

std::string status_name(Status status) {
  switch (status) {
    case Status::NotDetected:
      return "not-detected";
    case Status::Estimated:
      return "estimated";
    case Status::Reportable:
      return "reportable";
    case Status::AboveRange:
      return "above-range";
    case Status::Withheld:
      return "withheld";
  }
  return {};
}

}  // namespace loqsmith
