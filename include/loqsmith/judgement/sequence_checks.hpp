#pragma once

#include <optional>
#include <string>
#include <vector>

#include "loqsmith/judgement/judge_analyte.hpp"
#include "loqsmith/judgement/rows.hpp"

namespace loqsmith {

// The checks that every run makes of its files and sheets. Each returns one
// failed row a finding; or one passing row where it found nothing. A row that
// is neither says what could not be compared.

/// A file in the folder that no row of the sequence names.
std::vector<CheckRow> check_unlisted_files(const SequenceFacts& facts);

/// The same trace data under two injections: the later one is named.
std::vector<CheckRow> check_same_data(const SequenceFacts& facts);

/// A sample name in the file that differs from the sheet's (blanks at both
/// ends aside).
std::vector<CheckRow> check_sample_names(const Sequence& sequence,
                                         const SequenceFacts& facts);

/// A file or a trace of it that was refused; its results are withheld.
std::vector<CheckRow> check_refused_files(const SequenceFacts& facts);

/// A file that was accepted although something in it is worth saying.
std::vector<CheckRow> check_file_warnings(const SequenceFacts& facts);

/// A start time in the file earlier than that of an injection before it in run
/// order. Times with and without zone are never compared with each other.
std::vector<CheckRow> check_order(const SequenceFacts& facts);

/// The sheet's `acquired` and the file's own start time, more than a second
/// apart (files and sheets cut fractions differently). Neither overrides the
/// other.
std::vector<CheckRow> check_acquired_times(const Sequence& sequence,
                                           const SequenceFacts& facts);

/// Levels used after they had expired: one row a level and lot, its first late
/// injection named. The injection's time is the sheet's `acquired`, otherwise
/// the file's start. A plain date is good to the end of that day. Where one of
/// the two times has no zone, the clock readings are compared as they stand.
std::vector<CheckRow> check_expired_lots(const Sequence& sequence,
                                         const SequenceFacts& facts);

/// Where the rows of one of these checks are gathered.
class Findings {
 public:
  explicit Findings(std::string check) : check_(std::move(check)) {}

  void add(std::optional<int> injection, std::string note,
           std::string affects = {});
  void not_compared(const std::string& note);
  /// The findings, or a passing row; then what could not be compared.
  std::vector<CheckRow> rows() const;

 private:
  CheckRow blank_row() const;

  std::string check_;
  std::vector<CheckRow> failed_;
  std::vector<CheckRow> unchecked_;
};

}  // namespace loqsmith
