#include "golden/processed.hpp"

#include "loqsmith/base/files.hpp"

namespace loqsmith::test {

namespace fs = std::filesystem;

fs::path sample_run(const std::string& name) {
  return fs::path(LOQSMITH_SOURCE_DIR) / "sample-runs" / name;
}

fs::path copy_of_sample_run(const std::string& name, const fs::path& where) {
  const fs::path copy = where / name;
  fs::create_directories(where);
  fs::copy(sample_run(name), copy, fs::copy_options::recursive);
  return copy;
}

ProgramRun process(const fs::path& folder, const fs::path& out,
                   const std::vector<std::string>& more,
                   const std::vector<std::string>& environment,
                   const std::string& working_folder) {
  std::vector<std::string> arguments{"process", folder.string(), "--out",
                                     out.string()};
  arguments.insert(arguments.end(), more.begin(), more.end());
  return run_program(LOQSMITH_PROGRAM, arguments, environment, working_folder);
}

std::map<std::string, std::string> tables_of(const fs::path& run) {
  std::map<std::string, std::string> tables;
  for (const fs::directory_entry& entry : fs::directory_iterator(run)) {
    if (entry.path().extension() == ".csv") {
      tables[entry.path().filename().string()] = read_file(entry.path());
    }
  }
  return tables;
}

const std::vector<std::string>& table_names() {
  static const std::vector<std::string> names{
      "calibration.csv", "checks.csv",    "diagnostics.csv",
      "limits.csv",      "peaks.csv",     "reportable.csv",
      "results.csv",     "standards.csv", "summary.csv"};
  return names;
}

std::vector<std::string> names_of(
    const std::map<std::string, std::string>& tables) {
  std::vector<std::string> names;
  for (const auto& [name, bytes] : tables) names.push_back(name);
  return names;
}

bool holds(const std::string& text, const std::string& part) {
  return text.find(part) != std::string::npos;
}

}  // namespace loqsmith::test
