#include <map>

#include "loqsmith/base/text.hpp"
#include "loqsmith/judgement/sequence_checks.hpp"

namespace loqsmith {

std::vector<CheckRow> check_unlisted_files(const SequenceFacts& facts) {
  Findings findings("unlisted-file");
  for (const std::string& file : facts.unlisted_files) {
    findings.add(std::nullopt, file + ": no row of the sequence names it");
  }
  return findings.rows();
}

std::vector<CheckRow> check_same_data(const SequenceFacts& facts) {
  Findings findings("same-data-twice");
  std::map<std::string, int> first;
  for (const SequenceFacts::FileFact& file : facts.files) {
    if (file.data_hash.empty()) continue;
    const auto [known, is_new] = first.emplace(file.data_hash, file.injection);
    if (is_new) continue;
    findings.add(file.injection,
                 "the trace data of injection " +
                     std::to_string(known->second) + " once more",
                 "injections " + std::to_string(known->second) + " and " +
                     std::to_string(file.injection));
  }
  return findings.rows();
}

std::vector<CheckRow> check_sample_names(const Sequence& sequence,
                                         const SequenceFacts& facts) {
  Findings findings("name-differs");
  std::map<int, const Injection*> sheet;
  for (const Injection& one : sequence.injections) sheet[one.number] = &one;
  for (const SequenceFacts::FileFact& file : facts.files) {
    const auto row = sheet.find(file.injection);
    const std::string_view stated = trim(file.sample_name);
    if (stated.empty() || row == sheet.end()) continue;
    if (stated == trim(row->second->sample)) continue;
    findings.add(file.injection, "the file says " + in_quotes(stated) +
                                     ", the sheet " +
                                     in_quotes(row->second->sample));
  }
  return findings.rows();
}

std::vector<CheckRow> check_refused_files(const SequenceFacts& facts) {
  Findings findings("file-refused");
  for (const SequenceFacts::FileFact& file : facts.files) {
    if (file.problem.empty()) continue;
    findings.add(file.injection, file.problem, "the injection: withheld");
  }
  return findings.rows();
}

std::vector<CheckRow> check_file_warnings(const SequenceFacts& facts) {
  Findings findings("file-warning");
  for (const SequenceFacts::FileFact& file : facts.files) {
    for (const std::string& warning : file.warnings) {
      findings.add(file.injection, warning);
    }
  }
  // Accepted, only worth saying: a plain mzML file always has one.
  std::vector<CheckRow> rows = findings.rows();
  for (CheckRow& row : rows) row.passed = true;
  return rows;
}

std::vector<CheckRow> always_checked(const Sequence& sequence,
                                     const SequenceFacts& facts) {
  std::vector<CheckRow> rows;
  for (const std::vector<CheckRow>& more :
       {check_unlisted_files(facts), check_same_data(facts), check_order(facts),
        check_sample_names(sequence, facts),
        check_acquired_times(sequence, facts),
        check_expired_lots(sequence, facts), check_refused_files(facts),
        check_file_warnings(facts)}) {
    rows.insert(rows.end(), more.begin(), more.end());
  }
  return rows;
}

}  // namespace loqsmith
