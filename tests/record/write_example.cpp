// Writes the example run's report and record into a folder, to look at.

#include <filesystem>
#include <fstream>
#include <iostream>

#include "loqsmith/record/record_json.hpp"
#include "loqsmith/record/report.hpp"
#include "record/example_run.hpp"

int main(int count, char** arguments) {
  if (count != 2) {
    std::cerr << "usage: write_example FOLDER\n";
    return 64;
  }
  const std::filesystem::path folder = arguments[1];
  const loqsmith::PublishedRun run = loqsmith::test::example_run();
  std::ofstream report(folder / "report.html");
  loqsmith::write_report(report, run);
  std::ofstream record(folder / "record.json");
  loqsmith::write_record(record, run);
  return report.flush() && record.flush() ? 0 : 74;
}
