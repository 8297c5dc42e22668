#include <map>
#include <ostream>

#include "loqsmith/base/csv.hpp"
#include "loqsmith/judgement/reasons.hpp"
#include "loqsmith/record/cells.hpp"
#include "loqsmith/record/tables.hpp"

namespace loqsmith {
namespace {

const std::vector<std::string> kHead = {
    "injection",      "analyte",        "found",
    "retention_time", "start",          "end",
    "area",           "height",         "template_response",
    "width_half",     "tailing",        "asymmetry",
    "plates",         "resolution",     "signal_to_noise",
    "noise",          "noise_source",   "response_noise",
    "baseline",       "overlap",        "manual",
    "note",           "capacity_factor"};
constexpr std::size_t kNote = 21;

// The peak's reasons, and why no response noise is predicted.
std::vector<std::string> words_of(const Peak& peak) {
  std::vector<std::string> words = peak.reasons;
  const std::string absent = reason_word(peak.response_noise_absent);
  if (!absent.empty()) words.push_back(absent);
  return words;
}

std::vector<std::string> cells_of(int injection, const std::string& target,
                                  const Peak& peak) {
  return {injection_cell(injection),
          text_cell(target),
          yes_no_cell(peak.found),
          number_cell(peak.retention_minutes),
          number_cell(peak.start_minutes),
          number_cell(peak.end_minutes),
          number_cell(peak.area),
          number_cell(peak.height),
          number_cell(peak.template_response),
          number_cell(peak.width_half_minutes),
          number_cell(peak.tailing),
          number_cell(peak.asymmetry),
          number_cell(peak.plates),
          number_cell(peak.resolution),
          number_cell(peak.signal_to_noise),
          number_cell(peak.noise),
          text_cell(peak.noise_source),
          number_cell(peak.response_noise),
          text_cell(peak.baseline),
          text_cell(peak.overlap),
          yes_no_cell(peak.manual),
          words_cell(words_of(peak)),
          number_cell(peak.capacity_factor)};
}

std::vector<std::string> absent_cells(int injection, const std::string& target,
                                      const std::string& reason) {
  std::vector<std::string> cells(kHead.size());
  cells.front() = injection_cell(injection);
  cells[1] = text_cell(target);
  cells[kNote] = text_cell(reason);
  return cells;
}

// Internal standards, analytes, second traces, each in the method's order.
std::vector<std::string> targets_of(const Method& method) {
  std::vector<std::string> targets;
  for (const InternalStandardSettings& standard : method.internal_standards) {
    targets.push_back(standard.target.id);
  }
  for (const AnalyteSettings& analyte : method.analytes) {
    targets.push_back(analyte.target.id);
  }
  for (const AnalyteSettings& analyte : method.analytes) {
    if (analyte.second_target) targets.push_back(analyte.second_target->id);
  }
  return targets;
}

using PeakIndex = std::map<std::pair<int, std::string>, const PeakRow*>;

PeakIndex index_of(const PublishedRun& run) {
  PeakIndex index;
  for (const PeakRow& row : run.peaks) {
    index.emplace(std::pair(row.injection, row.target), &row);
  }
  return index;
}

}  // namespace

void write_peaks_table(std::ostream& out, const PublishedRun& run) {
  const PeakIndex index = index_of(run);
  const std::vector<std::string> targets = targets_of(run.method);
  write_csv_row(out, kHead);
  for (const Injection& injection : run.sequence.injections) {
    for (const std::string& target : targets) {
      const auto row = index.find({injection.number, target});
      if (row == index.end()) {
        const bool conditioning = injection.role == Role::Conditioning;
        write_csv_row(
            out, absent_cells(injection.number, target,
                              conditioning ? "conditioning" : "not-measured"));
      } else if (row->second->peak) {
        write_csv_row(out,
                      cells_of(injection.number, target, *row->second->peak));
      } else {
        write_csv_row(out, absent_cells(injection.number, target,
                                        row->second->peak.reason()));
      }
    }
  }
}

}  // namespace loqsmith
