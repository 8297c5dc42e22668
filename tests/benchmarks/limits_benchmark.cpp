#include <benchmark/benchmark.h>

#include <cstddef>
#include <ctime>
#include <string>
#include <vector>

#include "limits/whole_evidence.hpp"
#include "loqsmith/limits/governing.hpp"

// What the limits of a night cost: 200 analytes by every procedure.

namespace loqsmith {
namespace {

constexpr int kAnalytes = 200;
constexpr double kAimSeconds = 4.0;

std::vector<LimitEvidence> night() {
  std::vector<LimitEvidence> analytes;
  for (int i = 0; i < kAnalytes; ++i) {
    analytes.push_back(
        test::whole_evidence("analyte " + std::to_string(i + 1)));
  }
  return analytes;
}

// Every row of the table; those with a second way that costs more, that too.
LimitSettings every_procedure() {
  LimitSettings settings;
  for (const LimitProcedure& row : limit_procedures()) {
    if (row.compute == nullptr) continue;
    ProcedureSettings one = test::procedure(std::string(row.name));
    one.detection = 0.4;
    one.quantitation = 1.2;
    one.offset_blank_mean = true;  // draws its bounds
    one.variance_linear = true;    // iterates
    settings.procedures.push_back(one);
  }
  return settings;
}

void compute_all(benchmark::State& state, const LimitSettings& settings) {
  const std::vector<LimitEvidence> analytes = night();
  std::size_t estimates = 0;
  const std::clock_t begin = std::clock();
  for (auto _ : state) {
    estimates = 0;
    for (const LimitEvidence& evidence : analytes) {
      const LimitsOfAnalyte found = compute_limits(evidence, settings);
      for (const LimitRow& row : found.rows)
        estimates += row.estimate ? 1U : 0U;
      benchmark::DoNotOptimize(found);
    }
  }
  state.counters["procedures"] =
      static_cast<double>(settings.procedures.size());
  state.counters["estimates"] = static_cast<double>(estimates);
  const double seconds = static_cast<double>(std::clock() - begin) /
                         static_cast<double>(CLOCKS_PER_SEC);
  state.counters["of_the_aim"] =
      seconds / static_cast<double>(state.iterations()) / kAimSeconds;
}

void limits_of_a_night(benchmark::State& state) {
  compute_all(state, every_procedure());
}
BENCHMARK(limits_of_a_night)->Unit(benchmark::kMillisecond);

// One procedure alone, by its place in the table.
void one_procedure(benchmark::State& state) {
  LimitSettings settings = every_procedure();
  const std::size_t which = static_cast<std::size_t>(state.range(0));
  settings.procedures = {settings.procedures[which]};
  state.SetLabel(settings.procedures.front().name);
  compute_all(state, settings);
}
BENCHMARK(one_procedure)
    ->DenseRange(0, static_cast<int>(every_procedure().procedures.size()) - 1)
    ->Unit(benchmark::kMillisecond);

}  // namespace
}  // namespace loqsmith

BENCHMARK_MAIN();
