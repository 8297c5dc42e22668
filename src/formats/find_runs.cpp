#include <algorithm>

#include "loqsmith/formats/chromatogram_file.hpp"

namespace loqsmith {
namespace {

// Which of its texts a run or step is found by.
template <class Text>
std::vector<MeantRun> whole_runs(const FileContents& contents,
                                 const std::string& wanted, Text text) {
  std::vector<MeantRun> found;
  for (const FileRun& run : contents.runs) {
    if (run.*text == wanted) found.push_back({&run, nullptr});
  }
  return found;
}

template <class Text>
std::vector<MeantRun> inner_steps(const FileContents& contents,
                                  const std::string& wanted, Text text) {
  std::vector<MeantRun> found;
  for (const FileRun& run : contents.runs) {
    for (const FileStep& step : run.steps) {
      if (step.*text == wanted) found.push_back({&run, &step});
    }
  }
  return found;
}

}  // namespace

bool MeantRun::holds(const TraceHeader& header) const {
  if (header.run != run->id) return false;
  return step == nullptr || std::find(step->traces.begin(), step->traces.end(),
                                      header.id) != step->traces.end();
}

std::vector<MeantRun> find_runs(const FileContents& contents,
                                const std::string& run) {
  std::vector<MeantRun> found;
  if (run.empty()) {
    for (const FileRun& each : contents.runs) found.push_back({&each, nullptr});
    return found;
  }
  found = whole_runs(contents, run, &FileRun::id);
  if (found.empty()) found = inner_steps(contents, run, &FileStep::id);
  if (found.empty()) found = whole_runs(contents, run, &FileRun::name);
  if (found.empty()) found = inner_steps(contents, run, &FileStep::name);
  return found;
}

}  // namespace loqsmith
