#pragma once

#include <filesystem>
#include <map>
#include <optional>
#include <string>
#include <vector>

#include "loqsmith/judgement/rows.hpp"
#include "loqsmith/limits/governing.hpp"
#include "loqsmith/record/result_derivation.hpp"

namespace loqsmith {

// A published run, read back from its own tables and record for explaining it.
// Numbers are the very ones that were published: shortest() gives the tables'
// text again.

/// Where a target's window stands around an apex, in minutes.
struct PublishedWindow {
  double left = 0.0;
  double right = 0.0;
  std::string not_applicable;  ///< empty: learned
};

/// A row of peaks.csv by column; an empty cell: no value.
using PublishedPeak = std::map<std::string, std::string>;

/// One calibration set with its limits.
struct PublishedSet {
  std::string set;
  std::string not_applicable;  ///< why there is no curve; empty: there is one
  std::string model;           ///< "linear", "quadratic", "response-factor"
  std::string weight;
  std::string intercept_is;  ///< "fitted", "zero"
  double intercept = 0.0;
  double slope = 0.0;
  double curvature = 0.0;
  std::size_t points = 0;  ///< standards in the fit
  std::size_t levels = 0;
  std::optional<double> lowest;  ///< accepted
  std::optional<double> highest;
  std::optional<double> addition;  ///< amount of a standard addition
  LimitsOfAnalyte limits;
};

struct PublishedResult {
  ResultRow row;
  ResultDerivation derivation;
  std::string automatic_result;  ///< empty: not amended
  std::string automatic_status;
};

struct PublishedAnalyte {
  std::string analyte;
  std::string concentration_unit;
  std::vector<PublishedSet> sets;
  std::vector<PublishedResult> results;  ///< in run order

  const PublishedSet* set_named(const std::string& name) const;
};

struct PublishedRecord {
  std::string sequence;
  int run = 0;
  std::string program_version;
  std::string method;  ///< id
  std::string revision;
  std::map<std::string, std::string> hashes;       ///< SHA-256 by input path
  std::map<std::string, PublishedWindow> windows;  ///< by target
  std::vector<PublishedAnalyte> analytes;
  std::vector<PublishedPeak> peaks;
  std::vector<CheckRow> checks;

  const PublishedPeak* peak(int injection, const std::string& target) const;
};

/// Reads results.csv, peaks.csv, checks.csv and record.json of a run's folder.
/// @throws InputError where a file is no such table or record, or was written
///         by a version that did not record derivations yet.
PublishedRecord read_published(const std::filesystem::path& folder);

}  // namespace loqsmith
