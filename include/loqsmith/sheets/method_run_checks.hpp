#pragma once

#include <functional>
#include <optional>
#include <string_view>

#include "loqsmith/judgement/settings.hpp"
#include "loqsmith/sheets/method_section.hpp"

namespace loqsmith {

/// A child of `<acceptance>` as it holds for an analyte; nothing: absent.
using AcceptanceChild =
    std::function<std::optional<Section>(std::string_view name)>;

CheckAction check_action(const Section& section);
PercentRange percent_range(const Section& section, std::string_view name);

/// Settings of the checks of blanks, carry-over and peaks.
void read_run_checks(const AcceptanceChild& child,
                     AcceptanceSettings& settings);

}  // namespace loqsmith
